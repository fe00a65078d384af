import { database, type Transaction } from "@/db/client";
import { insertAnswer, voidAnswerOfNotice } from "@/db/queries/answers";
import { type NoticeRow, noticeById } from "@/db/queries/notices";
import { inTransaction } from "@/db/transaction";
import { type AnswerInput, answerInput } from "@/lib/contracts/answers";
import type { NoticeBody } from "@/lib/contracts/engagements";
import { decide } from "@/lib/engagement/decide";
import { notAllowed, notFound, type Reason } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { tryClear } from "./clear-engagement";
import { coordinationFacts } from "./decision-facts";
import { factsOfRow, type Locked, lockEngagement } from "./engagement-lock";
import { SYSTEM, writeLedger } from "./ledger";
import { noticeBodyById } from "./notice-body";
import { forbid, permit } from "./permit";
import { readBody } from "./read-input";
import { sendBack } from "./send-back";

/**
 * Takes a coordinator's answer to a notice of their own authority. An answer may be
 * changed while the engagement lives and before its dwell: the newer voids the older.
 */
export async function answerNotice(
  actor: Actor,
  noticeId: string,
  input: unknown,
  nowMs: number,
): Promise<NoticeBody> {
  if (!may(actor, "answer notices")) throw notAllowed("answer a notice");
  const notice = await noticeById(database(), noticeId);
  if (notice === null) throw notFound("notice");
  if (notice.authorityId !== actor.authorityId) {
    throw forbid("Only the authority it was sent to answers a notice.");
  }
  const answer = await readBody(answerInput, input);
  return inTransaction(async (tx) => {
    await takeAnswer(tx, actor, notice, answer, nowMs);
    return noticeBodyById(tx, noticeId);
  });
}

/**
 * Puts an answer on record and does what follows: an objection sends the engagement
 * back, a last missing answer clears it. The caller has made sure of who answers.
 */
export async function takeAnswer(
  tx: Transaction,
  actor: Actor,
  notice: NoticeRow,
  answer: AnswerInput,
  nowMs: number,
): Promise<void> {
  const locked = await lockEngagement(tx, notice.engagementId);
  const objects = answer.outcome === "objection";
  const facts = await coordinationFacts(tx, actor, notice.engagementId);
  const decision = decide(factsOfRow(locked.engagement), objects ? "object" : "answer", facts, nowMs);
  // The notice is read again: a move may have replaced it before the lock was ours.
  const current = await noticeById(tx, notice.id);
  permit(decision, "The answer", current ? noticeReasons(current) : []);
  const older = await voidAnswerOfNotice(tx, notice.id, "a newer answer", nowMs);
  await insertAnswer(tx, {
    noticeId: notice.id,
    engagementId: notice.engagementId,
    authorityId: notice.authorityId,
    outcome: answer.outcome,
    conditions: answer.outcome === "no objection with conditions" ? (answer.conditions ?? null) : null,
    reasons: objects ? (answer.reasons ?? null) : null,
    answeredByName: actor.name,
    answeredByPersonId: actor.id,
    via: actor.via === "link" ? "link" : "desk",
    answeredAt: new Date(nowMs),
  });
  await writeLedger(tx, actor, {
    action: `answered: ${answer.outcome}`,
    subjectKind: "engagement",
    subjectId: notice.engagementId,
    subjectLabel: `E-${locked.engagement.number}`,
    reason: answer.reasons ?? answer.conditions ?? null,
    oldValues: older
      ? { outcome: older.outcome, conditions: older.conditions, reasons: older.reasons }
      : null,
    newValues: { ...answer, noticeId: notice.id },
  });
  await followUp(tx, locked, { actor, confirmed: facts.confirmedBy.length > 0 }, answer, nowMs);
}

async function followUp(
  tx: Transaction,
  locked: Locked,
  { actor, confirmed }: { actor: Actor; confirmed: boolean },
  answer: AnswerInput,
  nowMs: number,
): Promise<void> {
  if (answer.outcome === "objection") {
    await sendBack(tx, locked, actor, `objection: ${answer.reasons ?? ""}`, nowMs);
    return;
  }
  // Whoever confirmed did not know these conditions: they confirm again, knowing them.
  const reopened =
    confirmed && answer.outcome === "no objection with conditions"
      ? await sendBack(tx, locked, SYSTEM, `conditions: ${answer.conditions ?? ""}`, nowMs)
      : locked;
  await tryClear(tx, reopened, nowMs);
}

/** Why a notice takes no answer, whatever the engagement's state. */
export function noticeReasons(notice: NoticeRow): Reason[] {
  if (notice.kind !== "request" && notice.kind !== "revised request") {
    return [{ path: "notice", message: "This notice asks nothing." }];
  }
  if (notice.supersededAt !== null) {
    return [{ path: "notice", message: "A later notice has replaced this one: please answer that." }];
  }
  return [];
}
