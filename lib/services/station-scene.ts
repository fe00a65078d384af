import type { coordinationRows, stationsWithLaser } from "@/db/queries/facts";
import { DEG } from "@/lib/physics/constants";
import {
  airspaceKey,
  type PlacedVolume,
  placeVolume,
  type StationMap,
  stationMap,
} from "@/lib/planning/airspace";
import { withinReach } from "@/lib/planning/airspace-stretches";
import type { StationFacts, VolumeFacts } from "@/lib/planning/pass-facts";
import { siteOf } from "./domain-rows";
import { volumeFacts } from "./fact-rows";

type StationRow = Awaited<ReturnType<typeof stationsWithLaser>>[number];
type Coordination = Awaited<ReturnType<typeof coordinationRows>>;

/** A station with its laser, its map, and the airspace volumes that its beam can reach. */
export interface StationScene {
  readonly station: StationRow["station"];
  readonly laser: StationRow["laser"];
  readonly map: StationMap;
  readonly facts: StationFacts;
  readonly placed: readonly PlacedVolume[];
  readonly volumes: readonly VolumeFacts[];
  /** Ids and versions of those volumes; a pass measured under another key is out of date. */
  readonly airspaceKey: string;
  readonly authorityIds: readonly string[];
}

/** Puts the station's surroundings together; work of a millisecond, done once per station and request. */
export function makeScene(row: StationRow, coordination: Coordination): StationScene {
  const { station, laser } = row;
  const map = stationMap(siteOf(station));
  const placed: PlacedVolume[] = [];
  const volumes: VolumeFacts[] = [];
  for (const volume of coordination.volumeRows) {
    const there = placeVolume(map, volume);
    if (!withinReach(map, there, station.minElevationDeg * DEG)) continue;
    placed.push(there);
    volumes.push(volumeFacts(volume));
  }
  return {
    station,
    laser,
    map,
    facts: stationFacts(station),
    placed,
    volumes,
    airspaceKey: airspaceKey(placed),
    authorityIds: coordination.linkRows
      .filter((link) => link.stationId === station.id)
      .map((link) => link.authorityId),
  };
}

function stationFacts(station: StationRow["station"]): StationFacts {
  const { id, name, version, minElevationDeg, maxElevationDeg } = station;
  const { horizonMask, maxAzimuthRateDegPerS, openingHours, slewS, coolDownS, elementAgeLimitH } = station;
  return {
    id,
    name,
    version,
    minElevationDeg,
    maxElevationDeg,
    horizonMask,
    maxAzimuthRateDegPerS,
    openingHours,
    slewS,
    coolDownS,
    elementAgeLimitH,
  };
}
