import { and, eq, isNull } from "drizzle-orm";
import type { Transaction } from "../client";
import { answers } from "../schema/authorities";

export type AnswerRow = typeof answers.$inferSelect;

/** Ends the force of the answer to a notice, if there is one, and gives it. */
export async function voidAnswerOfNotice(
  tx: Transaction,
  noticeId: string,
  because: string,
  nowMs: number,
): Promise<AnswerRow | null> {
  const [row] = await tx
    .update(answers)
    .set({ voidedAt: new Date(nowMs), voidedBecause: because })
    .where(and(eq(answers.noticeId, noticeId), isNull(answers.voidedAt)))
    .returning();
  return row ?? null;
}

/** Ends the force of every answer about an engagement; gives them. */
export async function voidAnswersOfEngagement(
  tx: Transaction,
  engagementId: string,
  because: string,
  nowMs: number,
): Promise<AnswerRow[]> {
  return tx
    .update(answers)
    .set({ voidedAt: new Date(nowMs), voidedBecause: because })
    .where(and(eq(answers.engagementId, engagementId), isNull(answers.voidedAt)))
    .returning();
}

export async function insertAnswer(tx: Transaction, row: typeof answers.$inferInsert): Promise<AnswerRow> {
  const [made] = await tx.insert(answers).values(row).returning();
  if (made === undefined) throw new Error("the insert of an answer gave no row");
  return made;
}
