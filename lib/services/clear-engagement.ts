import type { Transaction } from "@/db/client";
import { changeEngagement } from "@/db/queries/engagements";
import { decide } from "@/lib/engagement/decide";
import { judgedFacts } from "./decision-facts";
import { factsOfRow, type Locked } from "./engagement-lock";
import { type Judgement, judgeDwell } from "./judge-dwell";
import { SYSTEM, writeLedger } from "./ledger";

/** Judges an engagement's own dwell, its own hold and answers taken into account. */
export async function judgeOwn(tx: Transaction, { engagement }: Locked, nowMs: number): Promise<Judgement> {
  return judgeDwell(tx, {
    passId: engagement.passId,
    fromMs: engagement.dwellFrom.getTime(),
    toMs: engagement.dwellTo.getTime(),
    nowMs,
    engagementId: engagement.id,
  });
}

/**
 * Clears a proposal when nothing stands against it any more; otherwise leaves it
 * alone. The book does this by itself after every change that may matter.
 */
export async function tryClear(
  tx: Transaction,
  locked: Locked,
  nowMs: number,
  known?: Judgement,
): Promise<Locked> {
  const { engagement } = locked;
  if (engagement.state !== "proposed") return locked;
  const judgement = known ?? (await judgeOwn(tx, locked, nowMs));
  const facts = await judgedFacts(tx, SYSTEM, engagement.id, judgement);
  const decision = decide(factsOfRow(engagement), "clear", facts, nowMs);
  if (!decision.ok) return locked;
  const changed = await changeEngagement(tx, engagement.id, { state: decision.next }, nowMs);
  await writeLedger(tx, SYSTEM, {
    action: "cleared engagement",
    subjectKind: "engagement",
    subjectId: engagement.id,
    subjectLabel: `E-${engagement.number}`,
    reason: "every needed answer is in and every rule passes",
    oldValues: { state: engagement.state },
    newValues: { state: changed.state },
  });
  return { ...locked, engagement: changed };
}
