import { and, asc, eq, exists, gt, inArray, lt, ne, or, type SQL, sql } from "drizzle-orm";
import { LIVE_STATES } from "@/lib/engagement/states";
import type { Queryable, Transaction } from "../client";
import { engagements } from "../schema/engagements";
import { notices } from "../schema/notices";
import { fragments } from "../schema/objects";
import { passes } from "../schema/passes";
import { people } from "../schema/people";
import { laserSettings, stations } from "../schema/stations";

export type EngagementRow = typeof engagements.$inferSelect;
export type NewEngagementRow = typeof engagements.$inferInsert;

/**
 * Takes the station's lock, held to the end of the transaction: the first step of
 * every writer of engagements. NO KEY UPDATE shuts out the others and leaves
 * foreign keys to the station free, so that a sweep and a booking don't wait for each other.
 */
export async function lockStation(tx: Transaction, stationId: string) {
  const [row] = await tx.select().from(stations).where(eq(stations.id, stationId)).for("no key update");
  return row ?? null;
}

/** Keeps a pass from being deleted while it is booked; null when it is not there (any more). */
export async function holdPass(tx: Transaction, passId: string): Promise<{ stationId: string } | null> {
  const [row] = await tx
    .select({ stationId: passes.stationId })
    .from(passes)
    .where(eq(passes.id, passId))
    .for("key share");
  return row ?? null;
}

/** The row itself, locked; call it after {@link lockStation}. */
export async function engagementForUpdate(tx: Transaction, id: string): Promise<EngagementRow | null> {
  const [row] = await tx.select().from(engagements).where(eq(engagements.id, id)).for("update");
  return row ?? null;
}

/** Which station an engagement belongs to; it never changes. */
export async function stationOfEngagement(q: Queryable, id: string): Promise<string | null> {
  const [row] = await q
    .select({ stationId: engagements.stationId })
    .from(engagements)
    .where(eq(engagements.id, id));
  return row?.stationId ?? null;
}

/** What stands in a dwell's way. */
export interface HeldBy {
  readonly number: number;
  readonly plannerName: string;
  readonly stationId: string;
  readonly dwellFrom: Date;
  readonly dwellTo: Date;
}

/**
 * Live engagements whose hold meets the hold that a dwell would get here, or that
 * lase the same fragment elsewhere at that time. Cheap: two indexed ranges.
 */
export async function holdersOf(
  q: Queryable,
  wanted: {
    stationId: string;
    fragmentId: string;
    from: Date;
    to: Date;
    slewS: number;
    coolDownS: number;
    exceptId: string | null;
  },
): Promise<HeldBy[]> {
  const holdFrom = new Date(wanted.from.getTime() - wanted.slewS * 1000);
  const holdUntil = new Date(wanted.to.getTime() + wanted.coolDownS * 1000);
  const e = engagements;
  const here = and(eq(e.stationId, wanted.stationId), lt(e.holdFrom, holdUntil), gt(e.holdUntil, holdFrom));
  const lased = and(
    eq(e.fragmentId, wanted.fragmentId),
    lt(e.dwellFrom, wanted.to),
    gt(e.dwellTo, wanted.from),
  );
  const { number, stationId, dwellFrom, dwellTo } = e;
  return q
    .select({ number, plannerName: people.name, stationId, dwellFrom, dwellTo })
    .from(e)
    .innerJoin(people, eq(people.id, e.plannerId))
    .where(
      and(
        inArray(e.state, [...LIVE_STATES]),
        or(here, lased),
        wanted.exceptId === null ? undefined : ne(e.id, wanted.exceptId),
      ),
    )
    .orderBy(asc(e.dwellFrom));
}

/** Inserts a proposal; the hold is written by the database's trigger. */
export async function insertEngagement(
  tx: Transaction,
  row: Omit<NewEngagementRow, "state" | "holdFrom" | "holdUntil">,
): Promise<EngagementRow> {
  const values = { ...row, state: "proposed", holdFrom: row.dwellFrom, holdUntil: row.dwellTo };
  const [made] = await tx.insert(engagements).values(values).returning();
  if (made === undefined) throw new Error("the insert of an engagement gave no row");
  return made;
}

/** Changes a row and raises its version; the row must be locked. */
export async function changeEngagement(
  tx: Transaction,
  id: string,
  changes: Partial<Omit<NewEngagementRow, "id" | "version">>,
  nowMs: number,
): Promise<EngagementRow> {
  const [changed] = await tx
    .update(engagements)
    .set({ ...changes, version: sql`${engagements.version} + 1`, updatedAt: new Date(nowMs) })
    .where(eq(engagements.id, id))
    .returning();
  if (changed === undefined) throw new Error("the engagement to change is not there");
  return changed;
}

const VIEW = {
  engagement: engagements,
  station: stations,
  fragment: fragments,
  laser: laserSettings,
  plannerName: people.name,
  plannerEmail: people.email,
};

function views(q: Queryable) {
  return q
    .select(VIEW)
    .from(engagements)
    .innerJoin(stations, eq(stations.id, engagements.stationId))
    .innerJoin(fragments, eq(fragments.id, engagements.fragmentId))
    .innerJoin(laserSettings, eq(laserSettings.id, engagements.laserSettingId))
    .innerJoin(people, eq(people.id, engagements.plannerId));
}

/** An engagement with what its notices and lists need beside it. */
export type EngagementView = Awaited<ReturnType<typeof views>>[number];

/** One engagement with its surroundings, or null. */
export async function engagementView(q: Queryable, id: string): Promise<EngagementView | null> {
  const [row] = await views(q).where(eq(engagements.id, id));
  return row ?? null;
}

export interface EngagementFilter {
  readonly stationId?: string | undefined;
  readonly fragmentId?: string | undefined;
  readonly states?: readonly string[] | undefined;
  /** Engagements whose dwell shares time with [from, to). */
  readonly fromMs?: number | undefined;
  readonly toMs?: number | undefined;
  /** Only those about which this authority has a notice. */
  readonly noticedAuthorityId?: string | undefined;
}

/** Engagements that match, by dwell. */
export async function findEngagements(q: Queryable, filter: EngagementFilter): Promise<EngagementView[]> {
  const e = engagements;
  const conditions: (SQL | undefined)[] = [
    filter.stationId === undefined ? undefined : eq(e.stationId, filter.stationId),
    filter.fragmentId === undefined ? undefined : eq(e.fragmentId, filter.fragmentId),
    filter.states === undefined ? undefined : inArray(e.state, [...filter.states]),
    filter.fromMs === undefined ? undefined : gt(e.dwellTo, new Date(filter.fromMs)),
    filter.toMs === undefined ? undefined : lt(e.dwellFrom, new Date(filter.toMs)),
    filter.noticedAuthorityId === undefined ? undefined : noticed(q, filter.noticedAuthorityId),
  ];
  return views(q)
    .where(and(...conditions))
    .orderBy(asc(e.dwellFrom), asc(e.number));
}

function noticed(q: Queryable, authorityId: string): SQL {
  const match = and(eq(notices.engagementId, engagements.id), eq(notices.authorityId, authorityId));
  return exists(q.select({ id: notices.id }).from(notices).where(match));
}

/** Identifiers of unconfirmed engagements whose dwell has begun or whose answer is overdue. */
export async function engagementsOutOfTime(q: Queryable, nowMs: number): Promise<string[]> {
  const now = new Date(nowMs).toISOString();
  const result = await q.execute<{ id: string }>(sql`
    select e.id from engagements e
    where e.state in ('proposed', 'cleared') and (e.dwell_from <= ${now}::timestamptz or (e.state = 'proposed' and exists (
      select 1 from notices n where n.engagement_id = e.id and n.superseded_at is null and n.answer_by <= ${now}::timestamptz
        and not exists (select 1 from answers a where a.notice_id = n.id and a.voided_at is null))))
    order by e.dwell_from`);
  return result.rows.map((row) => row.id);
}

/** Identifiers of live engagements of a fragment, other than one. */
export async function liveEngagementsOfFragment(
  q: Queryable,
  fragmentId: string,
  exceptId: string,
): Promise<string[]> {
  const rows = await q
    .select({ id: engagements.id })
    .from(engagements)
    .where(
      and(
        eq(engagements.fragmentId, fragmentId),
        inArray(engagements.state, [...LIVE_STATES]),
        ne(engagements.id, exceptId),
      ),
    );
  return rows.map((row) => row.id);
}
