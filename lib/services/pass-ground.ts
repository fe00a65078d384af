import type { Queryable } from "@/db/client";
import { stationsWithLaser } from "@/db/queries/facts";
import type { PassRow } from "@/db/queries/passes";
import type { GroundBody } from "@/lib/contracts/pass-surroundings";
import { DEG } from "@/lib/physics/constants";
import { geodeticFromEcef, temeToEcef } from "@/lib/physics/frames/earth";
import { footprintRadiusRad, groundPoints } from "@/lib/physics/frames/ground";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { sunPositionKm } from "@/lib/physics/sky/sun";
import { scale } from "@/lib/physics/vector";
import type { Interval } from "@/lib/planning/interval";
import { isoOf } from "./closure-body";

const STEP_MS = 30_000;

/**
 * The ground track around a pass and the circles of all stations at the fragment's height; null where SGP4
 * gives no state somewhere in that half orbit.
 */
export async function groundBody(
  q: Queryable,
  orbit: Orbit,
  row: PassRow,
  dwell: Interval | null,
): Promise<GroundBody | null> {
  const culminateMs = row.culminateAt.getTime();
  const track = groundPoints(orbit, trackTimes(row, orbit.periodS, dwell));
  const highest = groundPoints(orbit, [culminateMs]);
  const heightKm = highest.ok ? highest.points[0]?.heightKm : undefined;
  if (!track.ok || heightKm === undefined) return null;
  const stations = await stationsWithLaser(q, null);
  return {
    points: track.points.map(({ atMs, ...point }) => ({ at: isoOf(atMs), ...point })),
    heightKm,
    stations: stations.map(({ station }) => ({
      id: station.id,
      name: station.name,
      latitudeDeg: station.latitudeDeg,
      longitudeDeg: station.longitudeDeg,
      minElevationDeg: station.minElevationDeg,
      footprintDeg: footprintRadiusRad(heightKm, station.minElevationDeg * DEG) / DEG,
    })),
    midnight: midnightPoint(culminateMs),
  };
}

/** Whole steps of half a minute, and the moments that marks on the map need exactly. */
function trackTimes(row: PassRow, periodS: number, dwell: Interval | null): number[] {
  const [riseMs, culminateMs, setMs] = [row.riseAt, row.culminateAt, row.setAt].map((at) => at.getTime()) as [
    number,
    number,
    number,
  ];
  const fromMs = Math.min(culminateMs - 250 * periodS, riseMs);
  const toMs = Math.max(culminateMs + 250 * periodS, setMs);
  const times = new Set([riseMs, culminateMs, setMs, fromMs, toMs]);
  if (dwell) times.add(dwell.fromMs).add(dwell.toMs);
  for (let atMs = fromMs; atMs < toMs; atMs += STEP_MS) times.add(Math.round(atMs));
  return [...times].map(Math.round).sort((a, b) => a - b);
}

function midnightPoint(atMs: number): GroundBody["midnight"] {
  const sun = temeToEcef({ rKm: sunPositionKm(atMs), vKmPerS: { x: 0, y: 0, z: 0 } }, atMs);
  const { latitudeDeg, longitudeDeg } = geodeticFromEcef(scale(sun.rKm, -1));
  return { latitudeDeg, longitudeDeg };
}
