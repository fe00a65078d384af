import { and, asc, eq, exists, gt, inArray, isNull, lt, or, type SQL, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { engagements } from "../schema/engagements";
import { notices } from "../schema/notices";
import { elementSets, fragments } from "../schema/objects";
import { passes } from "../schema/passes";

/** States in which an engagement holds its time. */
export const LIVE_STATES = ["proposed", "cleared", "confirmed"];

export interface PassFilter {
  readonly stationId?: string | undefined;
  readonly fragmentId?: string | undefined;
  /** Only passes that have a notice to this authority. */
  readonly noticedAuthorityId?: string | undefined;
  /** Passes that share time with [from, to). */
  readonly from: Date;
  readonly to: Date;
}

const PASS_COLUMNS = {
  id: passes.id,
  stationId: passes.stationId,
  fragmentId: passes.fragmentId,
  elementSetId: passes.elementSetId,
  laserSettingId: passes.laserSettingId,
  riseAt: passes.riseAt,
  culminateAt: passes.culminateAt,
  setAt: passes.setAt,
  maxElevationDeg: passes.maxElevationDeg,
  riseAzimuthDeg: passes.riseAzimuthDeg,
  culminationAzimuthDeg: passes.culminationAzimuthDeg,
  setAzimuthDeg: passes.setAzimuthDeg,
  minRangeKm: passes.minRangeKm,
  underWayAtFrom: passes.underWayAtFrom,
  underWayAtTo: passes.underWayAtTo,
  vanishedAt: passes.vanishedAt,
  plan: passes.plan,
  screenedAt: passes.screenedAt,
  screeningGaps: passes.screeningGaps,
  fragmentName: fragments.name,
  catalogNumber: fragments.catalogNumber,
  massKg: fragments.massKg,
  areaM2: fragments.areaM2,
  material: fragments.material,
  shape: fragments.shape,
  couplingNPerW: fragments.couplingNPerW,
  spinRateHz: fragments.spinRateHz,
  bodySource: fragments.bodySource,
  epochMs: elementSets.epochMs,
  elementSource: elementSets.source,
};

function selectPasses(q: Queryable) {
  return q
    .select(PASS_COLUMNS)
    .from(passes)
    .innerJoin(fragments, eq(fragments.id, passes.fragmentId))
    .innerJoin(elementSets, eq(elementSets.id, passes.elementSetId));
}

/** A pass with its fragment's name and the epoch of the element set it was worked out from. */
export type PassRow = Awaited<ReturnType<typeof selectPasses>>[number];

/** Passes that match, by rise; a vanished pass only while a live engagement holds it. */
export async function findPassRows(q: Queryable, filter: PassFilter): Promise<PassRow[]> {
  const conditions: (SQL | undefined)[] = [lt(passes.riseAt, filter.to), gt(passes.setAt, filter.from)];
  if (filter.stationId) conditions.push(eq(passes.stationId, filter.stationId));
  if (filter.fragmentId) conditions.push(eq(passes.fragmentId, filter.fragmentId));
  if (filter.noticedAuthorityId) conditions.push(hasNotice(q, filter.noticedAuthorityId));
  conditions.push(or(isNull(passes.vanishedAt), hasLiveEngagement(q)));
  return await selectPasses(q)
    .where(and(...conditions))
    .orderBy(asc(passes.riseAt), asc(passes.id));
}

/** Passes by identifier, in no particular order. */
export async function passRowsById(q: Queryable, ids: readonly string[]): Promise<PassRow[]> {
  return await selectPasses(q).where(inArray(passes.id, [...ids]));
}

/** True when the authority has a notice about an engagement of the pass. */
export async function passHasNotice(q: Queryable, passId: string, authorityId: string): Promise<boolean> {
  const found = await q
    .select({ id: passes.id })
    .from(passes)
    .where(and(eq(passes.id, passId), hasNotice(q, authorityId)));
  return found.length > 0;
}

function hasNotice(q: Queryable, authorityId: string): SQL {
  return exists(
    q
      .select({ one: sql`1` })
      .from(engagements)
      .innerJoin(notices, eq(notices.engagementId, engagements.id))
      .where(and(eq(engagements.passId, passes.id), eq(notices.authorityId, authorityId))),
  );
}

function hasLiveEngagement(q: Queryable): SQL {
  return exists(
    q
      .select({ one: sql`1` })
      .from(engagements)
      .where(and(eq(engagements.passId, passes.id), inArray(engagements.state, LIVE_STATES))),
  );
}

/** A plan to store, with the laser setting that it was made for. */
export interface PlanUpdate {
  readonly passId: string;
  readonly laserSettingId: string;
  readonly plan: PassRow["plan"];
}

/** Stores plans in one statement. */
export async function storePlans(q: Queryable, updates: readonly PlanUpdate[]): Promise<void> {
  if (updates.length === 0) return;
  const rows = updates.map(({ passId, laserSettingId, plan }) => ({
    id: passId,
    laser: laserSettingId,
    plan,
  }));
  await q.execute(sql`
    update passes set plan = v.plan, laser_setting_id = v.laser
    from jsonb_to_recordset(${JSON.stringify(rows)}::jsonb) as v(id uuid, laser uuid, plan jsonb)
    where passes.id = v.id`);
}
