import { and, asc, count, desc, eq, gt, isNull, max, min, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { authorities } from "../schema/authorities";
import { engagements, firingRecords } from "../schema/engagements";
import { elementSets, fragments, protectedObjects } from "../schema/objects";
import { passes } from "../schema/passes";
import { stations } from "../schema/stations";

/** Every fragment, by catalogue number and name. */
export async function fragmentRows(q: Queryable) {
  return await q.select().from(fragments).orderBy(asc(fragments.catalogNumber), asc(fragments.name));
}

/** One fragment. */
export async function fragmentRow(q: Queryable, id: string) {
  const [row] = await q.select().from(fragments).where(eq(fragments.id, id));
  return row ?? null;
}

const NEWEST = {
  id: elementSets.id,
  epochAt: elementSets.epochAt,
  source: elementSets.source,
  importedAt: elementSets.importedAt,
};

/** The newest element set of every fragment. */
export async function newestSetsOfFragments(q: Queryable) {
  return await q
    .selectDistinctOn([elementSets.fragmentId], { ownerId: elementSets.fragmentId, ...NEWEST })
    .from(elementSets)
    .where(sql`${elementSets.fragmentId} is not null`)
    .orderBy(elementSets.fragmentId, desc(elementSets.epochAt), desc(elementSets.importedAt));
}

/** The newest element set of every protected object. */
export async function newestSetsOfProtected(q: Queryable) {
  return await q
    .selectDistinctOn([elementSets.protectedObjectId], { ownerId: elementSets.protectedObjectId, ...NEWEST })
    .from(elementSets)
    .where(sql`${elementSets.protectedObjectId} is not null`)
    .orderBy(elementSets.protectedObjectId, desc(elementSets.epochAt), desc(elementSets.importedAt));
}

/** How many element sets each fragment has. */
export async function setCountByFragment(q: Queryable) {
  return await q
    .select({ fragmentId: elementSets.fragmentId, count: count() })
    .from(elementSets)
    .where(sql`${elementSets.fragmentId} is not null`)
    .groupBy(elementSets.fragmentId);
}

/** Passes of each fragment that rise from now on: how many, and the first. */
export async function passesAheadByFragment(q: Queryable, now: Date) {
  return await q
    .select({ fragmentId: passes.fragmentId, count: count(), nextAt: min(passes.riseAt) })
    .from(passes)
    .where(and(gt(passes.riseAt, now), isNull(passes.vanishedAt)))
    .groupBy(passes.fragmentId);
}

/** Engagements of each fragment, whatever their state. */
export async function engagementCountByFragment(q: Queryable) {
  return await q
    .select({ fragmentId: engagements.fragmentId, count: count() })
    .from(engagements)
    .groupBy(engagements.fragmentId);
}

/** The last end of lasing of each fragment. */
export async function lastFiredByFragment(q: Queryable) {
  return await q
    .select({ fragmentId: firingRecords.fragmentId, closedAt: max(firingRecords.closedAt) })
    .from(firingRecords)
    .groupBy(firingRecords.fragmentId);
}

/** The element sets of one fragment, newest epoch first. */
export async function setsOfFragment(q: Queryable, fragmentId: string) {
  return await q
    .select()
    .from(elementSets)
    .where(eq(elementSets.fragmentId, fragmentId))
    .orderBy(desc(elementSets.epochAt), desc(elementSets.importedAt));
}

/** The engagements of one fragment with what was fired, newest first. */
export async function engagementsOfFragment(q: Queryable, fragmentId: string) {
  return await q
    .select({
      id: engagements.id,
      number: engagements.number,
      state: engagements.state,
      stationName: stations.name,
      dwellFrom: engagements.dwellFrom,
      dwellTo: engagements.dwellTo,
      outcome: firingRecords.outcome,
    })
    .from(engagements)
    .innerJoin(stations, eq(stations.id, engagements.stationId))
    .leftJoin(firingRecords, eq(firingRecords.engagementId, engagements.id))
    .where(and(eq(engagements.fragmentId, fragmentId)))
    .orderBy(desc(engagements.dwellFrom));
}

/** Every protected object with its owner's name, by class and name. */
export async function protectedRows(q: Queryable) {
  return await q
    .select({ object: protectedObjects, ownerName: authorities.name })
    .from(protectedObjects)
    .leftJoin(authorities, eq(authorities.id, protectedObjects.ownerAuthorityId))
    .orderBy(asc(protectedObjects.class), asc(protectedObjects.name));
}
