import { and, eq, isNull, sql } from "drizzle-orm";
import type { Queryable } from "../client";
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
