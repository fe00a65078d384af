import { database } from "@/db/client";
import { coordinationRows, stationsWithLaser } from "@/db/queries/facts";
import type { AirspaceVolumeBody } from "@/lib/contracts/airspace";
import type { Actor } from "@/lib/engagement/roles";
import { mustReadBook } from "./must-read-book";
import { makeScene, type StationScene } from "./station-scene";

type Coordination = Awaited<ReturnType<typeof coordinationRows>>;

/** Every airspace volume with its hours ahead and the stations whose beam can reach it, by name. */
export async function listAirspace(actor: Actor, nowMs: number): Promise<{ volumes: AirspaceVolumeBody[] }> {
  mustReadBook(actor);
  const q = database();
  const coordination = await coordinationRows(q);
  const scenes = (await stationsWithLaser(q, null)).map((row) => makeScene(row, coordination));
  return { volumes: coordination.volumeRows.map((row) => volumeBody(row, coordination, scenes, nowMs)) };
}

function volumeBody(
  row: Coordination["volumeRows"][number],
  coordination: Coordination,
  scenes: readonly StationScene[],
  nowMs: number,
): AirspaceVolumeBody {
  const { activeSpans, scheduleKnownUntil, ...figures } = row;
  const ahead = activeSpans.filter((span) => Date.parse(span.to) > nowMs);
  return {
    ...figures,
    authorityName: coordination.authorityRows.find(({ id }) => id === row.authorityId)?.name ?? null,
    activeSpans: ahead.map(({ from, to }) => ({
      from: new Date(from).toISOString(),
      to: new Date(to).toISOString(),
    })),
    hoursKnown: activeSpans.length > 0 && scheduleKnownUntil.getTime() > nowMs,
    scheduleKnownUntil: scheduleKnownUntil.toISOString(),
    activeNow: ahead.some((span) => Date.parse(span.from) <= nowMs),
    stations: scenes
      .filter((scene) => scene.volumes.some((volume) => volume.id === row.id))
      .map(({ station }) => ({ id: station.id, name: station.name })),
  };
}
