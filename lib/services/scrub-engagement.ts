import { inTransaction } from "@/db/transaction";
import { type EngagementBody, scrubInput } from "@/lib/contracts/engagements";
import { decide } from "@/lib/engagement/decide";
import { notAllowed } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { refuseStranger } from "./command-right";
import { coordinationFacts } from "./decision-facts";
import { endEngagement } from "./end-engagement";
import { factsOfRow, lockEngagement } from "./engagement-lock";
import { permit } from "./permit";
import { readBody } from "./read-input";
import { currentBody } from "./view-engagement";

/**
 * Gives an engagement up, from any live state and with a reason: its time is free
 * at once, and every authority that was asked gets a cancellation.
 */
export async function scrubEngagement(
  actor: Actor,
  id: string,
  input: unknown,
  nowMs: number,
): Promise<EngagementBody> {
  if (!may(actor, "scrub any") && !may(actor, "scrub own")) throw notAllowed("scrub an engagement");
  await refuseStranger(actor, "scrub", id, nowMs);
  const { reason } = await readBody(scrubInput, input);
  return inTransaction(async (tx) => {
    const { engagement } = await lockEngagement(tx, id);
    const facts = { ...(await coordinationFacts(tx, actor, id)), reason };
    permit(decide(factsOfRow(engagement), "scrub", facts, nowMs), "The scrub");
    const ending = { next: "scrubbed", action: "scrubbed engagement", reason, fired: null } as const;
    await endEngagement(tx, engagement, actor, ending, nowMs);
    return currentBody(tx, id, nowMs);
  });
}
