import { and, eq, gt, inArray, isNull, lt, or, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { airspaceVolumes, answers, authorities, stationAuthorities } from "../schema/authorities";
import { engagements, firingRecords } from "../schema/engagements";
import { notices } from "../schema/notices";
import { elementSets, protectedObjects } from "../schema/objects";
import { beamCrossings } from "../schema/passes";
import { people } from "../schema/people";
import { laserSettings, stations } from "../schema/stations";
import { LIVE_STATES } from "./passes";

/** Stations with their active laser setting, or null where none is active. */
export async function stationsWithLaser(q: Queryable, ids: readonly string[] | null) {
  return await q
    .select({ station: stations, laser: laserSettings })
    .from(stations)
    .leftJoin(laserSettings, and(eq(laserSettings.stationId, stations.id), eq(laserSettings.active, true)))
    .where(ids === null ? undefined : inArray(stations.id, [...ids]))
    .orderBy(stations.name);
}

/** Every authority, airspace volume and link between stations and authorities: tens of rows. */
export async function coordinationRows(q: Queryable) {
  const authorityRows = await q.select().from(authorities).orderBy(authorities.name);
  const linkRows = await q.select().from(stationAuthorities);
  const volumeRows = await q.select().from(airspaceVolumes).orderBy(airspaceVolumes.name);
  return { authorityRows, linkRows, volumeRows };
}

/** The newest element set of each fragment, by epoch; the raw text is left out. */
export async function newestFragmentSets(
  q: Queryable,
  fragmentIds: readonly string[],
): Promise<{ fragmentId: string; id: string; epochMs: number; source: string }[]> {
  if (fragmentIds.length === 0) return [];
  const result = await q.execute<{ fragment_id: string; id: string; epoch_ms: number; source: string }>(sql`
    select f.id as fragment_id, newest.id, newest.epoch_ms, newest.source
    from unnest(${textArray(fragmentIds)}::uuid[]) as f(id)
    cross join lateral (
      select e.id, e.epoch_ms, e.source from element_sets e where e.fragment_id = f.id
      order by e.epoch_at desc, e.epoch_ms desc, e.imported_at desc limit 1) newest`);
  return result.rows.map((row) => ({
    fragmentId: row.fragment_id,
    id: row.id,
    epochMs: Number(row.epoch_ms),
    source: row.source,
  }));
}

/** Element sets by identifier, whole. */
export async function elementSetsById(q: Queryable, ids: readonly string[]) {
  if (ids.length === 0) return [];
  return await q
    .select()
    .from(elementSets)
    .where(inArray(elementSets.id, [...ids]));
}

/** Stored crossings of passes, with the object and the epoch of its element set. */
export async function crossingRows(q: Queryable, passIds: readonly string[]) {
  if (passIds.length === 0) return [];
  return await q
    .select({
      passId: beamCrossings.passId,
      fromAt: beamCrossings.fromAt,
      toAt: beamCrossings.toAt,
      minSeparationDeg: beamCrossings.minSeparationDeg,
      halfAngleDeg: beamCrossings.halfAngleDeg,
      addedDeg: beamCrossings.addedDeg,
      timingGuardS: beamCrossings.timingGuardS,
      objectId: protectedObjects.id,
      objectName: protectedObjects.name,
      objectClass: protectedObjects.class,
      objectVersion: protectedObjects.version,
      objectEpochMs: elementSets.epochMs,
    })
    .from(beamCrossings)
    .innerJoin(protectedObjects, eq(protectedObjects.id, beamCrossings.protectedObjectId))
    .innerJoin(elementSets, eq(elementSets.id, beamCrossings.elementSetId))
    .where(sql`${beamCrossings.passId} = any(${textArray(passIds)}::uuid[])`)
    .orderBy(beamCrossings.fromAt, protectedObjects.name);
}

/** Protected objects by identifier. */
export async function protectedRowsById(q: Queryable, ids: readonly string[]) {
  if (ids.length === 0) return [];
  const { id, name, version } = protectedObjects;
  return await q
    .select({ id, name, class: protectedObjects.class, version })
    .from(protectedObjects)
    .where(inArray(protectedObjects.id, [...ids]));
}

/** How many crewed spacecraft are on record, and when the protected catalogue last changed. */
export async function protectedState(q: Queryable): Promise<{ crewedCount: number; changedAt: Date | null }> {
  const result = await q.execute<{ crewed: string; changed_ms: string | null }>(sql`
    select (select count(*) from protected_objects where class = 'crewed') as crewed,
      (extract(epoch from greatest(
        (select max(created_at) from protected_objects),
        (select max(imported_at) from element_sets where protected_object_id is not null))) * 1000)::float8 as changed_ms`);
  const row = result.rows[0];
  const changedMs = row?.changed_ms ?? null;
  return {
    crewedCount: Number(row?.crewed ?? 0),
    changedAt: changedMs === null ? null : new Date(Math.round(Number(changedMs))),
  };
}

/** Live engagements whose hold touches the span, at any of the stations or on any of the fragments. */
export async function liveEngagementRows(
  q: Queryable,
  scope: { stationIds: readonly string[]; fragmentIds: readonly string[]; from: Date; to: Date },
) {
  return await q
    .select({
      id: engagements.id,
      number: engagements.number,
      state: engagements.state,
      version: engagements.version,
      plannerName: people.name,
      passId: engagements.passId,
      stationId: engagements.stationId,
      stationName: stations.name,
      fragmentId: engagements.fragmentId,
      dwellFrom: engagements.dwellFrom,
      dwellTo: engagements.dwellTo,
      holdFrom: engagements.holdFrom,
      holdUntil: engagements.holdUntil,
    })
    .from(engagements)
    .innerJoin(people, eq(people.id, engagements.plannerId))
    .innerJoin(stations, eq(stations.id, engagements.stationId))
    .where(
      and(
        inArray(engagements.state, LIVE_STATES),
        lt(engagements.holdFrom, scope.to),
        gt(engagements.holdUntil, scope.from),
        or(
          inArray(engagements.stationId, [...scope.stationIds]),
          sql`${engagements.fragmentId} = any(${textArray(scope.fragmentIds)}::uuid[])`,
        ),
      ),
    );
}

/** The engagement that a pass shows: a live one, else the last that was fired. */
export async function passEngagementRows(q: Queryable, passIds: readonly string[]) {
  if (passIds.length === 0) return [];
  return await q
    .select({
      id: engagements.id,
      number: engagements.number,
      state: engagements.state,
      passId: engagements.passId,
      dwellFrom: engagements.dwellFrom,
      dwellTo: engagements.dwellTo,
      effect: engagements.effect,
    })
    .from(engagements)
    .where(
      and(
        inArray(engagements.state, [...LIVE_STATES, "fired"]),
        sql`${engagements.passId} = any(${textArray(passIds)}::uuid[])`,
      ),
    )
    .orderBy(engagements.createdAt);
}

/** The last firing of each fragment that released any pulse. */
export async function lastFirings(q: Queryable, fragmentIds: readonly string[]) {
  if (fragmentIds.length === 0) return [];
  return await q
    .selectDistinctOn([firingRecords.fragmentId], {
      fragmentId: firingRecords.fragmentId,
      outcome: firingRecords.outcome,
      closedAt: firingRecords.closedAt,
      number: engagements.number,
    })
    .from(firingRecords)
    .innerJoin(engagements, eq(engagements.id, firingRecords.engagementId))
    .where(
      and(
        inArray(firingRecords.outcome, ["fired", "in part"]),
        sql`${firingRecords.fragmentId} = any(${textArray(fragmentIds)}::uuid[])`,
      ),
    )
    .orderBy(firingRecords.fragmentId, sql`${firingRecords.closedAt} desc nulls last`);
}

/** Whom engagements have asked, and the answers in force. */
export async function askedAndAnswered(q: Queryable, engagementIds: readonly string[]) {
  if (engagementIds.length === 0) return { requests: [], answers: [] };
  const requests = await q
    .selectDistinct({ engagementId: notices.engagementId, authorityId: notices.authorityId })
    .from(notices)
    .where(
      and(
        inArray(notices.engagementId, [...engagementIds]),
        inArray(notices.kind, ["request", "revised request"]),
      ),
    );
  const inForce = await q
    .select()
    .from(answers)
    .where(and(inArray(answers.engagementId, [...engagementIds]), isNull(answers.voidedAt)))
    .orderBy(answers.answeredAt);
  return { requests, answers: inForce };
}

/** An array parameter: PostgreSQL's own text form, cast by the caller. Identifiers hold no quotes. */
function textArray(values: readonly string[]): string {
  return `{${values.join(",")}}`;
}
