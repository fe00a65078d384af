import { database, type Transaction } from "@/db/client";
import { engagementsOutOfTime } from "@/db/queries/engagements";
import { askedAuthorities } from "@/db/queries/notices";
import { inTransaction } from "@/db/transaction";
import { decide } from "@/lib/engagement/decide";
import { timeWords } from "@/lib/planning/words";
import { coordinationFacts } from "./decision-facts";
import { endEngagement } from "./end-engagement";
import { factsOfRow, type Locked, lockEngagement } from "./engagement-lock";
import { SYSTEM } from "./ledger";

/**
 * Ends what has run out of time: proposals whose earliest missing answer is overdue,
 * and whatever is not confirmed when its dwell begins. Each in its own transaction,
 * with cancellations. Gives how many lapsed.
 */
export async function lapseEngagements(nowMs: number): Promise<number> {
  let lapsed = 0;
  for (const id of await engagementsOutOfTime(database(), nowMs)) {
    if (await inTransaction((tx) => lapse(tx, id, nowMs))) lapsed += 1;
  }
  return lapsed;
}

/** The facts are read again under the lock: an answer may have come in between. */
async function lapse(tx: Transaction, id: string, nowMs: number): Promise<boolean> {
  const locked = await lockEngagement(tx, id);
  const facts = await coordinationFacts(tx, SYSTEM, id);
  if (!decide(factsOfRow(locked.engagement), "lapse", facts, nowMs).ok) return false;
  const reason = await lapseReason(tx, locked, nowMs);
  const ending = { next: "lapsed", action: "let engagement lapse", reason, fired: null } as const;
  await endEngagement(tx, locked.engagement, SYSTEM, ending, nowMs);
  return true;
}

async function lapseReason(tx: Transaction, { engagement }: Locked, nowMs: number): Promise<string> {
  if (nowMs >= engagement.dwellFrom.getTime()) {
    return `It was still ${engagement.state} when its dwell began at ${timeWords(engagement.dwellFrom.getTime())}.`;
  }
  const asked = await askedAuthorities(tx, engagement.id);
  const late = asked.filter(({ notice, answer }) => !answer && notice.answerBy && +notice.answerBy <= nowMs);
  const words = late.map(
    ({ authority, notice }) => `${authority.name} by ${timeWords(Number(notice.answerBy))}`,
  );
  return `No answer from ${words.join(", ")}.`;
}
