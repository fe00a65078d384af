import { and, eq, gte, inArray, lte, notExists, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { engagements } from "../schema/engagements";
import { fragments } from "../schema/objects";
import { beamCrossings, passes } from "../schema/passes";
import { LIVE_STATES } from "./passes";

export type NewPass = typeof passes.$inferInsert;
export type NewCrossing = typeof beamCrossings.$inferInsert;

/** What a sweep needs to know of a stored pass. */
export interface StoredPass {
  readonly id: string;
  readonly stationId: string;
  readonly elementSetId: string;
  readonly riseMs: number;
  readonly culminateMs: number;
  readonly setMs: number;
  /** Everything imported up to then was taken into account; null: never screened. */
  readonly screenedAt: Date | null;
}

/** A fragment's name under lock: two sweeps of the same fragment write one after the other. Null: no such fragment. */
export async function lockFragment(q: Queryable, fragmentId: string): Promise<{ name: string } | null> {
  const [row] = await q
    .select({ name: fragments.name })
    .from(fragments)
    .where(eq(fragments.id, fragmentId))
    .for("no key update");
  return row ?? null;
}

/** The stored passes of a fragment that culminate in [from, to]. */
export async function storedPasses(
  q: Queryable,
  fragmentId: string,
  from: Date,
  to: Date,
): Promise<StoredPass[]> {
  const rows = await q
    .select({
      id: passes.id,
      stationId: passes.stationId,
      elementSetId: passes.elementSetId,
      riseAt: passes.riseAt,
      culminateAt: passes.culminateAt,
      setAt: passes.setAt,
      screenedAt: passes.screenedAt,
    })
    .from(passes)
    .where(
      and(eq(passes.fragmentId, fragmentId), gte(passes.culminateAt, from), lte(passes.culminateAt, to)),
    );
  return rows.map(({ riseAt, culminateAt, setAt, ...row }) => ({
    ...row,
    riseMs: riseAt.getTime(),
    culminateMs: culminateAt.getTime(),
    setMs: setAt.getTime(),
  }));
}

/**
 * Writes passes under their ids: new ones are added, known ones get their new figures. The plan stays: its
 * own versions tell that it is out of date. A pass that had vanished and is found again stands again.
 */
export async function upsertPasses(q: Queryable, rows: readonly NewPass[]): Promise<void> {
  if (rows.length === 0) return;
  const excluded = (column: { name: string }) => sql.raw(`excluded.${column.name}`);
  await q
    .insert(passes)
    .values([...rows])
    .onConflictDoUpdate({
      target: passes.id,
      set: {
        elementSetId: excluded(passes.elementSetId),
        laserSettingId: excluded(passes.laserSettingId),
        riseAt: excluded(passes.riseAt),
        culminateAt: excluded(passes.culminateAt),
        setAt: excluded(passes.setAt),
        maxElevationDeg: excluded(passes.maxElevationDeg),
        riseAzimuthDeg: excluded(passes.riseAzimuthDeg),
        culminationAzimuthDeg: excluded(passes.culminationAzimuthDeg),
        setAzimuthDeg: excluded(passes.setAzimuthDeg),
        minRangeKm: excluded(passes.minRangeKm),
        underWayAtFrom: excluded(passes.underWayAtFrom),
        underWayAtTo: excluded(passes.underWayAtTo),
        vanishedAt: sql`null`,
        screenedAt: excluded(passes.screenedAt),
        screeningGaps: excluded(passes.screeningGaps),
        computedAt: excluded(passes.computedAt),
      },
    });
}

/** Takes out passes that are found no more; one that an engagement stands on is marked and kept. */
export async function removeVanished(
  q: Queryable,
  passIds: readonly string[],
  vanishedAt: Date,
): Promise<void> {
  if (passIds.length === 0) return;
  const mine = inArray(passes.id, [...passIds]);
  const engaged = q.select({ one: sql`1` }).from(engagements).where(eq(engagements.passId, passes.id));
  await q.delete(passes).where(and(mine, notExists(engaged)));
  await q
    .update(passes)
    .set({ vanishedAt })
    .where(and(mine, sql`${passes.vanishedAt} is null`));
}

/** When the beam of each of these passes is closed by which object, as one text for each pass that has crossings. */
export async function crossingTexts(q: Queryable, passIds: readonly string[]): Promise<Map<string, string>> {
  if (passIds.length === 0) return new Map();
  const { passId, protectedObjectId, fromAt, toAt } = beamCrossings;
  const rows = await q
    .select({ passId, protectedObjectId, fromAt, toAt })
    .from(beamCrossings)
    .where(inArray(passId, [...passIds]));
  const byPass = new Map<string, typeof rows>();
  for (const row of rows) byPass.set(row.passId, [...(byPass.get(row.passId) ?? []), row]);
  return new Map([...byPass].map(([id, crossings]) => [id, crossingText(crossings)]));
}

/** Crossings as one text to compare: which object, from when to when. */
export function crossingText(
  crossings: readonly Pick<NewCrossing, "protectedObjectId" | "fromAt" | "toAt">[],
): string {
  return crossings
    .map(
      ({ protectedObjectId, fromAt, toAt }) => `${protectedObjectId} ${fromAt.getTime()} ${toAt.getTime()}`,
    )
    .sort()
    .join("\n");
}

/** Replaces the crossings of these passes. */
export async function replaceCrossings(
  q: Queryable,
  passIds: readonly string[],
  rows: readonly NewCrossing[],
): Promise<void> {
  if (passIds.length > 0) await q.delete(beamCrossings).where(inArray(beamCrossings.passId, [...passIds]));
  for (let i = 0; i < rows.length; i += 1000) await q.insert(beamCrossings).values(rows.slice(i, i + 1000));
}

/** Live engagements of a fragment. */
export async function liveEngagementIds(q: Queryable, fragmentId: string): Promise<string[]> {
  const rows = await q
    .select({ id: engagements.id })
    .from(engagements)
    .where(and(eq(engagements.fragmentId, fragmentId), inArray(engagements.state, LIVE_STATES)))
    .orderBy(engagements.id);
  return rows.map((row) => row.id);
}
