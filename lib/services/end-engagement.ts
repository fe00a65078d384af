import type { Transaction } from "@/db/client";
import { changeEngagement, type EngagementRow } from "@/db/queries/engagements";
import { authoritiesToTell } from "@/db/queries/notices";
import type { Actor } from "@/lib/engagement/roles";
import type { EngagementState } from "@/lib/engagement/states";
import type { FiredFacts } from "@/lib/notices/notice-facts";
import { writeLedger } from "./ledger";
import { raiseNotices } from "./raise-notices";

/** How an engagement ends, and what is said of it. */
export interface Ending {
  readonly next: Extract<EngagementState, "scrubbed" | "lapsed" | "fired">;
  readonly action: string;
  readonly reason: string | null;
  readonly fired: FiredFacts | null;
  readonly newValues?: Record<string, unknown>;
}

/** Ends a locked engagement and tells every authority that holds a notice of it. */
export async function endEngagement(
  tx: Transaction,
  engagement: EngagementRow,
  actor: Actor,
  ending: Ending,
  nowMs: number,
): Promise<void> {
  const { next, action, reason, fired } = ending;
  const told = await authoritiesToTell(tx, engagement.id);
  const changed = await changeEngagement(
    tx,
    engagement.id,
    {
      state: next,
      endReason: reason,
      endedAt: new Date(nowMs),
      calendarSequence: engagement.calendarSequence + 1,
    },
    nowMs,
  );
  const kind = next === "fired" ? "completion" : "cancellation";
  const members = told.map((authority) => ({ authority, kind, because: "you had a request" }) as const);
  const notices = await raiseNotices(tx, { engagementId: engagement.id, members, reason, fired, nowMs });
  await writeLedger(tx, actor, {
    action,
    subjectKind: "engagement",
    subjectId: engagement.id,
    subjectLabel: `E-${engagement.number}`,
    reason,
    oldValues: { state: engagement.state },
    newValues: { state: changed.state, notices, ...ending.newValues },
  });
}
