import { asc, eq, lt } from "drizzle-orm";
import type { Transaction } from "@/db/client";
import { airspaceVolumes, authorities, stationAuthorities } from "@/db/schema/authorities";
import { laserSettings, stations } from "@/db/schema/stations";
import { CLEARING_DESK, INVENTED_AUTHORITIES, INVENTED_VOLUMES, type InventedVolume } from "./authorities";
import { INVENTED_STATIONS } from "./stations";

const DAY_MS = 86_400_000;
const MINUTE_MS = 60_000;

/** How far ahead the demo's airspace schedules are known. */
const SCHEDULE_DAYS = 12;

/** Inserts authorities, stations, their lasers and airspace; returns authority ids by name. */
export async function fillStations(tx: Transaction, nowMs: number): Promise<Map<string, string>> {
  const madeAuthorities = await tx
    .insert(authorities)
    .values([...INVENTED_AUTHORITIES])
    .returning({ id: authorities.id, name: authorities.name });
  const authorityIds = new Map(madeAuthorities.map((a) => [a.name, a.id]));
  const deskId = idOf(authorityIds, CLEARING_DESK);
  for (const invented of INVENTED_STATIONS) {
    const [made] = await tx.insert(stations).values(invented.station).returning({ id: stations.id });
    if (!made) throw new Error(`station ${invented.station.name} was not inserted`);
    await tx.insert(laserSettings).values({ ...invented.laser, stationId: made.id });
    await tx.insert(stationAuthorities).values({ stationId: made.id, authorityId: deskId });
  }
  for (const volume of INVENTED_VOLUMES) {
    await tx.insert(airspaceVolumes).values({
      name: volume.name,
      authorityId: idOf(authorityIds, volume.authority),
      ring: volume.ring,
      floorText: volume.floorText,
      ceilingText: volume.ceilingText,
      floorM: volume.floorM,
      ceilingM: volume.ceilingM,
      liftable: volume.liftable,
      source: "invented for the demo",
      ...scheduleFrom(volume, nowMs),
    });
  }
  return authorityIds;
}

/** Carries the demo's airspace schedules on when they would soon end. */
export async function extendSchedules(tx: Transaction, nowMs: number): Promise<void> {
  const soon = new Date(nowMs + (SCHEDULE_DAYS - 1) * DAY_MS);
  const ending = await tx
    .select({ id: airspaceVolumes.id, name: airspaceVolumes.name, version: airspaceVolumes.version })
    .from(airspaceVolumes)
    .where(lt(airspaceVolumes.scheduleKnownUntil, soon))
    .orderBy(asc(airspaceVolumes.name));
  for (const row of ending) {
    const volume = INVENTED_VOLUMES.find((v) => v.name === row.name);
    if (!volume) continue;
    await tx
      .update(airspaceVolumes)
      .set({ ...scheduleFrom(volume, nowMs), version: row.version + 1 })
      .where(eq(airspaceVolumes.id, row.id));
  }
}

function scheduleFrom(volume: InventedVolume, nowMs: number) {
  const midnightMs = Math.floor(nowMs / DAY_MS) * DAY_MS;
  const lengthMin = (volume.daily.toMin - volume.daily.fromMin + 1440) % 1440;
  const activeSpans = Array.from({ length: SCHEDULE_DAYS + 3 }, (_, i) => {
    const fromMs = midnightMs + (i - 3) * DAY_MS + volume.daily.fromMin * MINUTE_MS;
    return {
      from: new Date(fromMs).toISOString(),
      to: new Date(fromMs + lengthMin * MINUTE_MS).toISOString(),
    };
  });
  return { activeSpans, scheduleKnownUntil: new Date(midnightMs + SCHEDULE_DAYS * DAY_MS) };
}

function idOf(ids: Map<string, string>, name: string): string {
  const id = ids.get(name);
  if (!id) throw new Error(`no authority named ${name}`);
  return id;
}
