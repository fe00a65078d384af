import { desc, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { elementSets, protectedObjects } from "../schema/objects";

/**
 * Every protected object with the element set that a screening at some moment used: the newest one that
 * had been imported by then; null where there was none. Raw texts are left out.
 */
export async function protectedSetsAsOf(q: Queryable, asOf: Date) {
  const newest = q
    .selectDistinctOn([elementSets.protectedObjectId], {
      setId: elementSets.id,
      protectedObjectId: elementSets.protectedObjectId,
      catalogNumber: elementSets.catalogNumber,
      objectName: elementSets.objectName,
      objectId: elementSets.objectId,
      epochMs: elementSets.epochMs,
      meanMotionRevPerDay: elementSets.meanMotionRevPerDay,
      eccentricity: elementSets.eccentricity,
      inclinationDeg: elementSets.inclinationDeg,
      raanDeg: elementSets.raanDeg,
      argPericenterDeg: elementSets.argPericenterDeg,
      meanAnomalyDeg: elementSets.meanAnomalyDeg,
      bstar: elementSets.bstar,
      meanMotionDot: elementSets.meanMotionDot,
      meanMotionDdot: elementSets.meanMotionDdot,
    })
    .from(elementSets)
    .where(
      // The bound is written out with its zone: a bare Date would be read in the session's.
      sql`${elementSets.protectedObjectId} is not null and ${elementSets.importedAt} <= ${asOf.toISOString()}::timestamptz`,
    )
    .orderBy(
      elementSets.protectedObjectId,
      desc(elementSets.epochMs),
      desc(elementSets.importedAt),
      elementSets.id,
    );
  const sets = new Map((await newest).map((set) => [set.protectedObjectId, set]));
  const objects = await q.select().from(protectedObjects).orderBy(protectedObjects.id);
  return objects.map((object) => ({ object, set: sets.get(object.id) ?? null }));
}
