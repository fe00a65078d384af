import { database } from "@/db/client";
import { engagementView } from "@/db/queries/engagements";
import { decide } from "@/lib/engagement/decide";
import { plainFacts } from "@/lib/engagement/facts";
import { notFound, Refusal } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import type { Command } from "@/lib/engagement/transitions";
import { factsOfRow } from "./engagement-lock";

/**
 * Throws 404 for an engagement that is not there, and 403 for one that is not the
 * caller's to command, before the body is looked at. Whether the command is possible
 * now is decided later, under the lock.
 */
export async function refuseStranger(
  actor: Actor,
  command: Command,
  id: string,
  nowMs: number,
): Promise<void> {
  const view = await engagementView(database(), id);
  if (view === null) throw notFound("engagement");
  const decision = decide(factsOfRow(view.engagement), command, plainFacts(actor), nowMs);
  const right = decision.ok ? undefined : decision.refusals.find(({ kind }) => kind === "right");
  if (right !== undefined) throw new Refusal(403, "forbidden", right.message);
}
