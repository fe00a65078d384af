import { and, eq } from "drizzle-orm";
import type { Queryable } from "../client";
import { people } from "../schema/people";

/** The active person whose calendar address has this secret's hash, or null. */
export async function personOfCalendar(q: Queryable, secretHash: string) {
  const [row] = await q
    .select({ id: people.id, name: people.name, role: people.role, authorityId: people.authorityId })
    .from(people)
    .where(and(eq(people.calendarSecretHash, secretHash), eq(people.active, true)));
  return row ?? null;
}

/** Gives a person another calendar secret, or none; the old address is dead at once. */
export async function setCalendarSecret(
  q: Queryable,
  personId: string,
  secretHash: string | null,
): Promise<void> {
  await q.update(people).set({ calendarSecretHash: secretHash }).where(eq(people.id, personId));
}
