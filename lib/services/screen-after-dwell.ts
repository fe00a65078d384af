import { randomUUID } from "node:crypto";
import { database, type Queryable, type Transaction } from "@/db/client";
import {
  addApproaches,
  beginScreening,
  countProtected,
  engagementById,
  nextProtected,
  screeningOfRun,
} from "@/db/queries/after-dwell";
import type { EngagementRow } from "@/db/queries/engagements";
import { elementSetsById, stationsWithLaser } from "@/db/queries/facts";
import { passRowsById } from "@/db/queries/passes";
import { inTransaction } from "@/db/transaction";
import { config } from "@/lib/config";
import { makeSiteFrame } from "@/lib/physics/frames/earth";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { type AfterObject, type AfterPaths, pathsAfter, screenAfter } from "@/lib/planning/after-dwell";
import { protectedClassNamed } from "@/lib/planning/keep-out";
import { bodyOf, elementsOf, laserOf, siteOf } from "./domain-rows";
import { addJob } from "./queue";

/** The days after a dwell that are looked at. */
export const AFTER_DAYS = 3;

/** Objects of one chunk: both ways against so many take about a second. */
const CHUNK = 150;

const DAY_MS = 86_400_000;

/** Where a screening stands: the run it belongs to, and the last object looked at. */
export interface AfterDwellPayload {
  readonly engagementId: string;
  readonly run: string | null;
  readonly afterId: string | null;
  /** Objects looked at before; a chunk that is given out twice finds more and does nothing. */
  readonly checked: number;
}

/** Asks for the screening of the days after a dwell, in the transaction that books or changes it. */
export async function queueAfterDwell(tx: Transaction, engagementId: string): Promise<void> {
  const payload = { engagementId, run: null, afterId: null, checked: 0 } satisfies AfterDwellPayload;
  // Advice can wait: mail and sweeps go first.
  await addJob(tx, "screen-after-dwell", payload, { jobKey: `after-dwell ${engagementId}`, priority: 20 });
}

/**
 * One chunk of the screening after a dwell. The first begins the run; each writes what it found and asks for
 * the next in the same transaction, so that a killed worker's chunk is done once. A chunk of a former run, or
 * of an engagement that is gone, does nothing.
 */
export async function screenAfterDwell(payload: AfterDwellPayload, nowMs: number): Promise<void> {
  const engagement = await engagementById(database(), payload.engagementId);
  if (!engagement) return;
  const ready = await groundOf(database(), engagement);
  await inTransaction(async (tx) => {
    const run = payload.run ?? (await begin(tx, engagement, ready, nowMs));
    if (!ready.ok) return;
    const screening = await screeningOfRun(tx, engagement.id, run);
    if (screening?.state !== "running" || screening.checked !== payload.checked) return;
    const rows = await nextProtected(tx, payload.afterId, CHUNK);
    const { objects, blind } = objectsOf(rows);
    const found = screenAfter({
      paths: ready.paths,
      objects,
      fromMs: screening.fromAt.getTime(),
      toMs: screening.toAt.getTime(),
      thresholdKm: screening.thresholdKm,
      areaM2: ready.areaM2,
      axisBandKm: engagement.effect.semiMajorAxisAfterKm,
    });
    const approaches = found.approaches.map(({ objectId, atMs, ...approach }) => {
      return { ...approach, screeningId: screening.id, protectedObjectId: objectId, at: new Date(atMs) };
    });
    const last = rows.length < CHUNK;
    const checked = screening.checked + rows.length;
    await addApproaches(tx, screening.id, approaches, {
      checked,
      unseen: [...screening.unseen, ...blind, ...found.unseen],
      state: last ? "done" : "running",
      updatedAt: new Date(nowMs),
    });
    const afterId = rows.at(-1)?.object.id ?? null;
    if (last) return;
    const next = { engagementId: engagement.id, run, afterId, checked } satisfies AfterDwellPayload;
    await addJob(tx, "screen-after-dwell", next, { priority: 20 });
  });
}

type Ground =
  | { readonly ok: true; readonly paths: AfterPaths; readonly areaM2: number }
  | { readonly ok: false; readonly reason: string };

/** Both ways of the fragment after the engagement's dwell, from the records that it rests on. */
async function groundOf(q: Queryable, engagement: EngagementRow): Promise<Ground> {
  const [row] = await passRowsById(q, [engagement.passId]);
  const [set] = await elementSetsById(q, [engagement.elementSetId]);
  const [place] = await stationsWithLaser(q, [engagement.stationId]);
  if (!row || !set || !place)
    return { ok: false, reason: "The pass, its element set or its station is gone." };
  if (place.laser?.id !== engagement.laserSettingId) {
    return { ok: false, reason: "The engagement's laser setting is no longer the active one." };
  }
  const laser = laserOf(place.laser);
  const body = bodyOf(row);
  const made = makeOrbit(elementsOf(set));
  if (!laser.ok) return laser;
  if (!body.ok) return body;
  if (!made.ok) return made;
  const got = pathsAfter({
    orbit: made.orbit,
    frame: makeSiteFrame(siteOf(place.station)),
    laser: laser.laser,
    body: body.body,
    fromMs: engagement.dwellFrom.getTime(),
    toMs: engagement.dwellTo.getTime(),
  });
  return got.ok ? { ok: true, paths: got.paths, areaM2: row.areaM2 } : got;
}

/** Writes the run that begins; gives its identifier. */
async function begin(
  tx: Transaction,
  engagement: EngagementRow,
  ready: Ground,
  nowMs: number,
): Promise<string> {
  const run = randomUUID();
  const fromMs = engagement.dwellTo.getTime();
  await beginScreening(tx, {
    engagementId: engagement.id,
    run,
    state: ready.ok ? "running" : "refused",
    reason: ready.ok ? null : ready.reason,
    fromAt: new Date(fromMs),
    toAt: new Date(fromMs + AFTER_DAYS * DAY_MS),
    thresholdKm: config().DWELLBOOK_CLOSE_APPROACH_KM,
    elementSetId: engagement.elementSetId,
    total: await countProtected(tx),
    updatedAt: new Date(nowMs),
  });
  return run;
}

/** The objects that can be screened against; of the others, why they can't. */
function objectsOf(rows: Awaited<ReturnType<typeof nextProtected>>): {
  objects: AfterObject[];
  blind: string[];
} {
  const objects: AfterObject[] = [];
  const blind: string[] = [];
  for (const { object, set } of rows) {
    const made = set && makeOrbit(elementsOf(set));
    if (!made) blind.push(`${object.name}: it has no element set`);
    else if (!made.ok) blind.push(`${object.name}: ${made.reason}`);
    else {
      // The table admits the four classes only; anything else would be taken as the largest.
      const kind = protectedClassNamed(object.class) ?? "crewed";
      objects.push({ id: object.id, name: object.name, class: kind, orbit: made.orbit });
    }
  }
  return { objects, blind };
}
