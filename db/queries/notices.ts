import { and, asc, desc, eq, inArray, isNull, lte, ne, type SQL, sql } from "drizzle-orm";
import type { Queryable, Transaction } from "../client";
import { answers, authorities } from "../schema/authorities";
import { engagements } from "../schema/engagements";
import { notices } from "../schema/notices";
import { fragments } from "../schema/objects";
import { stations } from "../schema/stations";

export type NoticeRow = typeof notices.$inferSelect;
export type AuthorityRow = typeof authorities.$inferSelect;

const ASKING = ["request", "revised request"];

/** Keeps a notice, and marks what it replaces for the same authority. */
export async function insertNotice(tx: Transaction, row: typeof notices.$inferInsert): Promise<void> {
  await tx
    .update(notices)
    .set({ supersededAt: row.createdAt ?? new Date() })
    .where(
      and(
        eq(notices.engagementId, row.engagementId),
        eq(notices.authorityId, row.authorityId),
        isNull(notices.supersededAt),
      ),
    );
  await tx.insert(notices).values(row);
}

/** Authorities that hold a request which nothing has replaced, with that request and the answer in force. */
export async function askedAuthorities(q: Queryable, engagementId: string) {
  return q
    .select({ notice: notices, authority: authorities, answer: answers })
    .from(notices)
    .innerJoin(authorities, eq(authorities.id, notices.authorityId))
    .leftJoin(answers, and(eq(answers.noticeId, notices.id), isNull(answers.voidedAt)))
    .where(
      and(
        eq(notices.engagementId, engagementId),
        inArray(notices.kind, ASKING),
        isNull(notices.supersededAt),
      ),
    )
    .orderBy(asc(authorities.name));
}

export async function authoritiesById(q: Queryable, ids: readonly string[]): Promise<AuthorityRow[]> {
  if (ids.length === 0) return [];
  return q
    .select()
    .from(authorities)
    .where(inArray(authorities.id, [...ids]));
}

export async function noticeById(q: Queryable, id: string): Promise<NoticeRow | null> {
  const [row] = await q.select().from(notices).where(eq(notices.id, id));
  return row ?? null;
}

function views(q: Queryable) {
  return q
    .select({
      notice: notices,
      answer: answers,
      authorityName: authorities.name,
      authorityTimeZone: authorities.timeZone,
      engagementNumber: engagements.number,
      engagementState: engagements.state,
      dwellFrom: engagements.dwellFrom,
      dwellTo: engagements.dwellTo,
      stationName: stations.name,
      fragmentName: fragments.name,
    })
    .from(notices)
    .innerJoin(authorities, eq(authorities.id, notices.authorityId))
    .innerJoin(engagements, eq(engagements.id, notices.engagementId))
    .innerJoin(stations, eq(stations.id, engagements.stationId))
    .innerJoin(fragments, eq(fragments.id, engagements.fragmentId))
    .leftJoin(answers, and(eq(answers.noticeId, notices.id), isNull(answers.voidedAt)));
}

/** A notice with the names that a list shows and the answer in force. */
export type NoticeView = Awaited<ReturnType<typeof views>>[number];

/** Notices of an engagement, of an authority, or both; newest first. */
export async function findNotices(
  q: Queryable,
  filter: { engagementId?: string | undefined; authorityId?: string | undefined; id?: string | undefined },
): Promise<NoticeView[]> {
  const conditions: (SQL | undefined)[] = [
    filter.engagementId === undefined ? undefined : eq(notices.engagementId, filter.engagementId),
    filter.authorityId === undefined ? undefined : eq(notices.authorityId, filter.authorityId),
    filter.id === undefined ? undefined : eq(notices.id, filter.id),
  ];
  return views(q)
    .where(and(...conditions))
    .orderBy(desc(notices.createdAt), desc(notices.sequence), asc(authorities.name));
}

/**
 * The oldest notice to the same authority about the same engagement that is still
 * to be sent, up to the given one, locked against other senders; null when all went out.
 */
export async function nextToSend(tx: Transaction, upTo: NoticeRow) {
  const [row] = await tx
    .select({ notice: notices, authorityName: authorities.name, engagementNumber: engagements.number })
    .from(notices)
    .innerJoin(authorities, eq(authorities.id, notices.authorityId))
    .innerJoin(engagements, eq(engagements.id, notices.engagementId))
    .where(
      and(
        eq(notices.engagementId, upTo.engagementId),
        eq(notices.authorityId, upTo.authorityId),
        lte(notices.sequence, upTo.sequence),
        eq(notices.delivery, "queued"),
      ),
    )
    .orderBy(asc(notices.sequence))
    .limit(1)
    .for("no key update", { of: notices });
  return row ?? null;
}

/** What an attempt came to; `sentAt` stays empty unless it went out. */
export async function recordAttempt(
  tx: Transaction,
  id: string,
  outcome: { delivery: "queued" | "sent" | "failed"; lastError: string | null; sentAt: Date | null },
): Promise<void> {
  await tx
    .update(notices)
    .set({ ...outcome, attempts: sql`${notices.attempts} + 1` })
    .where(eq(notices.id, id));
}

/** Notes the first opening of a notice's link; later ones change nothing. */
export async function markOpened(q: Queryable, id: string, at: Date): Promise<void> {
  await q
    .update(notices)
    .set({ openedAt: at })
    .where(and(eq(notices.id, id), isNull(notices.openedAt)));
}

/** True when the authority has any notice about the engagement. */
export async function hasNotice(q: Queryable, engagementId: string, authorityId: string): Promise<boolean> {
  const rows = await q
    .select({ id: notices.id })
    .from(notices)
    .where(and(eq(notices.engagementId, engagementId), eq(notices.authorityId, authorityId)))
    .limit(1);
  return rows.length > 0;
}

/** Authorities with a notice that still stands and is no cancellation: those who are to hear of an end. */
export async function authoritiesToTell(q: Queryable, engagementId: string): Promise<AuthorityRow[]> {
  const rows = await q
    .selectDistinct({ authority: authorities })
    .from(notices)
    .innerJoin(authorities, eq(authorities.id, notices.authorityId))
    .where(
      and(
        eq(notices.engagementId, engagementId),
        isNull(notices.supersededAt),
        ne(notices.kind, "cancellation"),
      ),
    );
  return rows.map((row) => row.authority);
}
