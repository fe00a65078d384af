import { and, asc, eq, gt, inArray, isNotNull, sql } from "drizzle-orm";
import type { Queryable, Transaction } from "../client";
import { afterDwellApproaches, afterDwellScreenings } from "../schema/after-dwell";
import { engagements } from "../schema/engagements";
import { elementSets, protectedObjects } from "../schema/objects";
import type { EngagementRow } from "./engagements";

export type ScreeningRow = typeof afterDwellScreenings.$inferSelect;
export type NewScreeningRow = typeof afterDwellScreenings.$inferInsert;
export type NewApproachRow = typeof afterDwellApproaches.$inferInsert;

/** The engagement as it stands, unlocked. */
export async function engagementById(q: Queryable, id: string): Promise<EngagementRow | null> {
  const [row] = await q.select().from(engagements).where(eq(engagements.id, id));
  return row ?? null;
}

/** Begins a screening anew: a former one of the engagement is forgotten with its approaches. */
export async function beginScreening(tx: Transaction, row: NewScreeningRow): Promise<void> {
  await tx.delete(afterDwellScreenings).where(eq(afterDwellScreenings.engagementId, row.engagementId));
  await tx.insert(afterDwellScreenings).values(row);
}

/** The screening of an engagement while it is the given run; locked, so that a chunk is written once. */
export async function screeningOfRun(
  tx: Transaction,
  engagementId: string,
  run: string,
): Promise<ScreeningRow | null> {
  const [row] = await tx
    .select()
    .from(afterDwellScreenings)
    .where(and(eq(afterDwellScreenings.engagementId, engagementId), eq(afterDwellScreenings.run, run)))
    .for("update");
  return row ?? null;
}

/** The last screening of an engagement, or null. */
export async function screeningOf(q: Queryable, engagementId: string): Promise<ScreeningRow | null> {
  const [row] = await q
    .select()
    .from(afterDwellScreenings)
    .where(eq(afterDwellScreenings.engagementId, engagementId));
  return row ?? null;
}

/** Adds what a chunk found, and says how far the screening is. */
export async function addApproaches(
  tx: Transaction,
  id: string,
  found: readonly NewApproachRow[],
  progress: Pick<ScreeningRow, "checked" | "unseen" | "state" | "updatedAt">,
): Promise<void> {
  if (found.length > 0) await tx.insert(afterDwellApproaches).values([...found]);
  await tx.update(afterDwellScreenings).set(progress).where(eq(afterDwellScreenings.id, id));
}

/** The approaches of a screening by time, with the objects' names. */
export async function approachesOf(q: Queryable, screeningId: string) {
  return await q
    .select({
      approach: afterDwellApproaches,
      name: protectedObjects.name,
      class: protectedObjects.class,
    })
    .from(afterDwellApproaches)
    .innerJoin(protectedObjects, eq(protectedObjects.id, afterDwellApproaches.protectedObjectId))
    .where(eq(afterDwellApproaches.screeningId, screeningId))
    .orderBy(asc(afterDwellApproaches.at), asc(afterDwellApproaches.id));
}

/** How many protected objects there are. */
export async function countProtected(q: Queryable): Promise<number> {
  const [row] = await q.select({ count: sql<number>`count(*)::int` }).from(protectedObjects);
  return row?.count ?? 0;
}

/** The next protected objects by identifier, each with its newest element set or null. */
export async function nextProtected(q: Queryable, afterId: string | null, limit: number) {
  const objects = await q
    .select()
    .from(protectedObjects)
    .where(afterId === null ? undefined : gt(protectedObjects.id, afterId))
    .orderBy(asc(protectedObjects.id))
    .limit(limit);
  const ids = objects.map(({ id }) => id);
  const sets = await q
    .selectDistinctOn([elementSets.protectedObjectId])
    .from(elementSets)
    .where(and(isNotNull(elementSets.protectedObjectId), inArray(elementSets.protectedObjectId, ids)))
    .orderBy(
      elementSets.protectedObjectId,
      sql`${elementSets.epochMs} desc`,
      sql`${elementSets.importedAt} desc`,
      elementSets.id,
    );
  const byObject = new Map(sets.map((set) => [set.protectedObjectId, set]));
  return objects.map((object) => ({ object, set: byObject.get(object.id) ?? null }));
}
