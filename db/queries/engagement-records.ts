import { and, asc, eq, isNull } from "drizzle-orm";
import type { Queryable, Transaction } from "../client";
import { attestations, confirmations, firingRecords } from "../schema/engagements";
import { people } from "../schema/people";

/** Confirmations in force, in the order in which they were given. */
export async function confirmationsInForce(q: Queryable, engagementId: string) {
  return q
    .select({ confirmation: confirmations, personName: people.name })
    .from(confirmations)
    .innerJoin(people, eq(people.id, confirmations.personId))
    .where(and(eq(confirmations.engagementId, engagementId), isNull(confirmations.voidedAt)))
    .orderBy(asc(confirmations.confirmedAt), asc(confirmations.id));
}

/** People's words in force for what no data showed. */
export async function attestationsInForce(q: Queryable, engagementId: string) {
  return q
    .select({ attestation: attestations, personName: people.name })
    .from(attestations)
    .innerJoin(people, eq(people.id, attestations.personId))
    .where(and(eq(attestations.engagementId, engagementId), isNull(attestations.voidedAt)))
    .orderBy(asc(attestations.attestedAt), asc(attestations.id));
}

export async function insertConfirmation(
  tx: Transaction,
  row: typeof confirmations.$inferInsert,
): Promise<void> {
  await tx.insert(confirmations).values(row);
}

export async function insertAttestations(
  tx: Transaction,
  rows: readonly (typeof attestations.$inferInsert)[],
): Promise<void> {
  if (rows.length > 0) await tx.insert(attestations).values([...rows]);
}

/** Ends the force of all names and words on an engagement; gives how many names there were. */
export async function voidConfirmations(
  tx: Transaction,
  engagementId: string,
  nowMs: number,
): Promise<number> {
  const voidedAt = new Date(nowMs);
  await tx
    .update(attestations)
    .set({ voidedAt })
    .where(and(eq(attestations.engagementId, engagementId), isNull(attestations.voidedAt)));
  const names = await tx
    .update(confirmations)
    .set({ voidedAt })
    .where(and(eq(confirmations.engagementId, engagementId), isNull(confirmations.voidedAt)))
    .returning({ id: confirmations.id });
  return names.length;
}

export async function insertFiring(tx: Transaction, row: typeof firingRecords.$inferInsert): Promise<void> {
  await tx.insert(firingRecords).values(row);
}

/** What was fired, with the name of who recorded it; null while nothing is recorded. */
export async function firingOf(q: Queryable, engagementId: string) {
  const [row] = await q
    .select({ firing: firingRecords, recordedByName: people.name })
    .from(firingRecords)
    .innerJoin(people, eq(people.id, firingRecords.recordedBy))
    .where(eq(firingRecords.engagementId, engagementId));
  return row ?? null;
}
