import { database } from "@/db/client";
import { type JudgementBody, judgementQuery } from "@/lib/contracts/passes";
import { notAllowed } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { reasonsAgainst } from "./accept-dwell";
import { closureBody } from "./closure-body";
import { dwellOf } from "./dwell-input";
import { judgeDwell } from "./judge-dwell";
import { concernedBodies, estimateBody } from "./pass-sheet-parts";
import { readQuery } from "./read-input";

/**
 * What booking a dwell would meet now, and what the dwell would do, without
 * booking it: the same judgement as the booking's own, so that the screen that
 * edits a dwell says beforehand what the booking would say.
 */
export async function previewDwell(
  actor: Actor,
  passId: string,
  query: unknown,
  nowMs: number,
): Promise<JudgementBody> {
  if (!may(actor, "search passes")) throw notAllowed("judge a dwell");
  const wanted = readQuery(judgementQuery, query);
  const dwell = dwellOf(wanted);
  const judged = await judgeDwell(database(), { passId, ...dwell, nowMs, engagementId: null });
  return {
    from: wanted.from,
    to: wanted.to,
    refusals: reasonsAgainst(judged),
    pending: judged.pending.map(closureBody),
    notChecked: judged.notChecked.map(closureBody),
    estimate: judged.effect && estimateBody(dwell, judged.effect),
    concerned: concernedBodies(judged.concerned),
  };
}
