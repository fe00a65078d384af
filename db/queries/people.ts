import { and, asc, desc, eq, isNull, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { authorities } from "../schema/authorities";
import { accessTokens, people } from "../schema/people";

export type PersonRow = typeof people.$inferSelect;
export type TokenRow = typeof accessTokens.$inferSelect;

/** One person by identifier, or null. */
export async function personById(q: Queryable, id: string): Promise<PersonRow | null> {
  const [row] = await q.select().from(people).where(eq(people.id, id));
  return row ?? null;
}

/** One person by e-mail address in any case, or null. */
export async function personByEmail(q: Queryable, email: string): Promise<PersonRow | null> {
  const [row] = await q.select().from(people).where(eq(people.email, email.toLowerCase()));
  return row ?? null;
}

/** The person's row, locked until the transaction ends. */
export async function lockPerson(q: Queryable, id: string): Promise<PersonRow | null> {
  const [row] = await q.select().from(people).where(eq(people.id, id)).for("update");
  return row ?? null;
}

/** Locks all active administrators in one order, so that two can't leave each other out at once. */
export async function lockAdministrators(q: Queryable): Promise<PersonRow[]> {
  return q
    .select()
    .from(people)
    .where(and(eq(people.role, "administrator"), eq(people.active, true)))
    .orderBy(people.id)
    .for("update");
}

/** The owner of a token that is not revoked, with the token's row. */
export async function ownerOfToken(
  q: Queryable,
  tokenHash: string,
): Promise<{ person: PersonRow; token: TokenRow } | null> {
  const [row] = await q
    .select({ person: people, token: accessTokens })
    .from(accessTokens)
    .innerJoin(people, eq(people.id, accessTokens.personId))
    .where(and(eq(accessTokens.tokenHash, tokenHash), isNull(accessTokens.revokedAt)));
  return row ?? null;
}

/** Notes a use of the token, at most once a minute so that reads stay reads. */
export async function touchToken(q: Queryable, tokenId: string, at: Date): Promise<void> {
  await q
    .update(accessTokens)
    .set({ lastUsedAt: at })
    .where(
      and(
        eq(accessTokens.id, tokenId),
        sql`(${accessTokens.lastUsedAt} is null or ${accessTokens.lastUsedAt} < ${at}::timestamptz - interval '1 minute')`,
      ),
    );
}

/** A person with the name of their authority and the count of live tokens. */
export interface PersonListRow {
  readonly person: PersonRow;
  readonly authorityName: string | null;
  readonly liveTokens: number;
}

/** Everybody, active ones first, by name; or one person. */
export async function listPeopleRows(q: Queryable, id?: string): Promise<PersonListRow[]> {
  return q
    .select({
      person: people,
      authorityName: authorities.name,
      liveTokens: sql<number>`(select count(*)::int from ${accessTokens} t where t.person_id = ${people.id} and t.revoked_at is null)`,
    })
    .from(people)
    .leftJoin(authorities, eq(authorities.id, people.authorityId))
    .where(id === undefined ? undefined : eq(people.id, id))
    .orderBy(desc(people.active), asc(people.name), asc(people.id));
}

/** Writes a change of a person; the session version rises with it, so that all sessions end. */
export async function updatePerson(
  q: Queryable,
  id: string,
  change: Partial<Pick<PersonRow, "role" | "authorityId" | "isSafetyOfficer" | "active" | "passwordHash">>,
): Promise<PersonRow> {
  const [row] = await q
    .update(people)
    .set({ ...change, sessionVersion: sql`${people.sessionVersion} + 1` })
    .where(eq(people.id, id))
    .returning();
  if (!row) throw new Error("a person vanished while being changed");
  return row;
}

/** A person's tokens that are not revoked, newest first. */
export async function liveTokens(q: Queryable, personId: string): Promise<TokenRow[]> {
  return q
    .select()
    .from(accessTokens)
    .where(and(eq(accessTokens.personId, personId), isNull(accessTokens.revokedAt)))
    .orderBy(desc(accessTokens.createdAt), desc(accessTokens.id));
}

/** Stores the hash of a new token. */
export async function insertToken(
  q: Queryable,
  row: { personId: string; label: string; tokenHash: string },
): Promise<TokenRow> {
  const [made] = await q.insert(accessTokens).values(row).returning();
  if (!made) throw new Error("the token was not stored");
  return made;
}

/** Revokes one token of a person; null when there is no such live token. */
export async function revokeTokenRow(q: Queryable, personId: string, id: string): Promise<TokenRow | null> {
  const [row] = await q
    .update(accessTokens)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(accessTokens.id, id), eq(accessTokens.personId, personId), isNull(accessTokens.revokedAt)))
    .returning();
  return row ?? null;
}

/** Revokes all of a person's tokens; answers how many there were. */
export async function revokeAllTokens(q: Queryable, personId: string): Promise<number> {
  const rows = await q
    .update(accessTokens)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(accessTokens.personId, personId), isNull(accessTokens.revokedAt)))
    .returning({ id: accessTokens.id });
  return rows.length;
}
