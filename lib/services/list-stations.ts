import { database } from "@/db/client";
import { liveCountByStation, passesAheadByStation, stationRows } from "@/db/queries/stations";
import type { LaserSettingBody, StationBody } from "@/lib/contracts/stations";
import type { Actor } from "@/lib/engagement/roles";
import { mustReadBook } from "./must-read-book";

type Rows = Awaited<ReturnType<typeof stationRows>>;

/** Every station with its limits, its laser settings and what lies ahead, by name. */
export async function listStations(actor: Actor, nowMs: number): Promise<{ stations: StationBody[] }> {
  mustReadBook(actor);
  const q = database();
  const rows = await stationRows(q);
  const ahead = new Map((await passesAheadByStation(q, new Date(nowMs))).map((row) => [row.stationId, row]));
  const live = new Map((await liveCountByStation(q)).map((row) => [row.stationId, row.count]));
  const bodies = rows.stations.map((station) => {
    const passes = ahead.get(station.id);
    return {
      ...station,
      lasers: rows.lasers.filter((laser) => laser.stationId === station.id).map(laserBody),
      authorities: rows.links
        .filter((link) => link.stationId === station.id)
        .map(({ authorityId, authorityName, kind }) => ({ id: authorityId, name: authorityName, kind })),
      nextPassAt: passes?.nextAt?.toISOString() ?? null,
      passesAhead: passes?.count ?? 0,
      liveEngagements: live.get(station.id) ?? 0,
    };
  });
  return { stations: bodies };
}

/** One station, or null. */
export async function readStation(actor: Actor, id: string, nowMs: number): Promise<StationBody | null> {
  const { stations } = await listStations(actor, nowMs);
  return stations.find((station) => station.id === id) ?? null;
}

function laserBody(laser: Rows["lasers"][number]): LaserSettingBody {
  const { stationId: _stationId, ...figures } = laser;
  return { ...figures, meanPowerW: laser.pulseEnergyJ * laser.repetitionRateHz };
}
