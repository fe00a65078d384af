import type { Transaction } from "@/db/client";
import { voidConfirmations } from "@/db/queries/engagement-records";
import { changeEngagement } from "@/db/queries/engagements";
import type { Actor } from "@/lib/engagement/roles";
import type { Locked } from "./engagement-lock";
import { writeLedger } from "./ledger";

/**
 * Sends a cleared or confirmed engagement back to `proposed`; its confirmations
 * and attestations are void. One that is proposed stays as it is.
 */
export async function sendBack(
  tx: Transaction,
  locked: Locked,
  actor: Actor,
  reason: string,
  nowMs: number,
): Promise<Locked> {
  const { engagement } = locked;
  if (engagement.state === "proposed") return locked;
  const voided = await voidConfirmations(tx, engagement.id, nowMs);
  const changed = await changeEngagement(tx, engagement.id, { state: "proposed" }, nowMs);
  await writeLedger(tx, actor, {
    action: "sent engagement back",
    subjectKind: "engagement",
    subjectId: engagement.id,
    subjectLabel: `E-${engagement.number}`,
    reason,
    oldValues: { state: engagement.state },
    newValues: { state: changed.state, confirmationsVoided: voided },
  });
  return { ...locked, engagement: changed };
}
