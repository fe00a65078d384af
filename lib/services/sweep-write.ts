import { randomUUID } from "node:crypto";
import type { Transaction } from "@/db/client";
import { newestSetsOfFragments } from "@/db/queries/element-sets";
import {
  crossingText,
  crossingTexts,
  liveEngagementIds,
  lockFragment,
  type NewPass,
  removeVanished,
  replaceCrossings,
  type StoredPass,
  storedPasses,
  upsertPasses,
} from "@/db/queries/sweep-passes";
import { DEG } from "@/lib/physics/constants";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { addJobs } from "./queue";
import type { Screening } from "./screen-pass";
import type { FoundPass, SweepSpan } from "./sweep-find";
import type { SweepGround } from "./sweep-ground";
import { matchPasses } from "./sweep-match";
import { planSwept } from "./sweep-plans";

/** A found pass with its screening. */
export interface ScreenedPass extends FoundPass {
  readonly screening: Screening;
}

/** What was worked out for a fragment, and from which element set. */
export interface WorkedFragment {
  readonly fragmentId: string;
  readonly elementSetId: string;
  readonly orbit: Orbit;
  readonly screened: readonly ScreenedPass[];
}

/** A pass as it is written: under its old identity, or a new one. */
interface WrittenPass {
  readonly id: string;
  readonly before: StoredPass | null;
  readonly found: ScreenedPass;
}

/**
 * Writes everything of one fragment and gives the number of its passes; null when its newest element set
 * is another one by now. What a chunk that read the protected objects later has written stays as it is.
 */
export async function writeFragment(
  tx: Transaction,
  worked: WorkedFragment,
  span: SweepSpan,
  ground: SweepGround,
): Promise<number | null> {
  const { fragmentId } = worked;
  if (!(await lockFragment(tx, fragmentId))) return 0;
  const [newest] = await newestSetsOfFragments(tx, [fragmentId]);
  if (newest?.id !== worked.elementSetId) return null;
  const quarterMs = (worked.orbit.periodS * 1000) / 4;
  const fromMs = Math.max(span.fromMs, span.nowMs);
  const [from, to] = [new Date(fromMs - quarterMs), new Date(span.toMs + quarterMs)];
  const stored = await storedPasses(tx, fragmentId, from, to);
  if (stored.some(({ screenedAt }) => screenedAt !== null && screenedAt > ground.readAt)) {
    return stored.length;
  }
  const { kept, added, missing } = matchPasses(stored, worked.screened, quarterMs);
  const written: readonly WrittenPass[] = [
    ...kept.map(({ stored: before, found }) => ({ id: before.id, before, found })),
    ...added
      .filter(({ event }) => event.riseMs < span.toMs)
      .map((found) => ({ id: randomUUID(), before: null, found })),
  ];
  const vanished = missing.filter(
    ({ riseMs, culminateMs }) => riseMs > span.nowMs && culminateMs >= fromMs && culminateMs < span.toMs,
  );
  await removeVanished(
    tx,
    vanished.map(({ id }) => id),
    new Date(span.nowMs),
  );
  await writePasses(tx, worked, written, span.nowMs, ground);
  await askForRescreening(tx, fragmentId);
  return written.length;
}

/** Writes passes, crossings and, where something changed, plans. */
async function writePasses(
  tx: Transaction,
  worked: WorkedFragment,
  written: readonly WrittenPass[],
  nowMs: number,
  ground: SweepGround,
): Promise<void> {
  const ids = written.map(({ id }) => id);
  const rows = written.map(({ id, found }) => passRow(id, found, worked, ground));
  const crossingsBefore = await crossingTexts(tx, ids);
  await upsertPasses(tx, rows);
  const crossings = written.flatMap(({ id, found }) =>
    found.screening.crossings.map((crossing) => ({ ...crossing, passId: id })),
  );
  await replaceCrossings(tx, ids, crossings);
  const isChanged = ({ id, before, found }: WrittenPass, i: number) =>
    before === null ||
    !isSameGeometry(before, rows[i]) ||
    (crossingsBefore.get(id) ?? "") !== crossingText(found.screening.crossings);
  const changed = new Set(written.filter(isChanged).map(({ id }) => id));
  await planSwept(
    tx,
    [...changed],
    ids.filter((id) => !changed.has(id)),
    nowMs,
  );
}

/** True when the same element set gave the same times before. */
function isSameGeometry(before: StoredPass, row: NewPass | undefined): boolean {
  return (
    before.elementSetId === row?.elementSetId &&
    before.riseMs === row.riseAt.getTime() &&
    before.setMs === row.setAt.getTime()
  );
}

/** What stands booked on the fragment is judged again by what is known now. */
async function askForRescreening(tx: Transaction, fragmentId: string): Promise<void> {
  const engagementIds = await liveEngagementIds(tx, fragmentId);
  await addJobs(
    tx,
    "rescreen-engagement",
    engagementIds.map((engagementId) => ({
      payload: { engagementId },
      jobKey: `rescreen-engagement ${engagementId}`,
    })),
  );
}

function passRow(id: string, found: ScreenedPass, worked: WorkedFragment, ground: SweepGround): NewPass {
  const { station, event, screening } = found;
  const toDeg = (rad: number) => rad / DEG;
  return {
    id,
    fragmentId: worked.fragmentId,
    stationId: station.id,
    elementSetId: worked.elementSetId,
    laserSettingId: station.laserSettingId,
    riseAt: new Date(Math.round(event.riseMs)),
    culminateAt: new Date(Math.round(event.culminateMs)),
    setAt: new Date(Math.round(event.setMs)),
    maxElevationDeg: toDeg(event.maxElevationRad),
    riseAzimuthDeg: toDeg(event.riseAzimuthRad),
    culminationAzimuthDeg: toDeg(event.culminationAzimuthRad),
    setAzimuthDeg: toDeg(event.setAzimuthRad),
    minRangeKm: event.minRangeKm,
    underWayAtFrom: event.underWayAtFrom,
    underWayAtTo: event.underWayAtTo,
    screenedAt: ground.readAt,
    screeningGaps: [...screening.gaps],
    computedAt: ground.readAt,
  };
}
