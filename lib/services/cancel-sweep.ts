import { markSweepCancelled } from "@/db/queries/sweeps";
import { inTransaction } from "@/db/transaction";
import type { SweepBody } from "@/lib/contracts/sweeps";
import { conflict, notAllowed } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { writeLedger } from "./ledger";
import { readSweep } from "./sweep-progress";

/**
 * Ends a running sweep: its waiting chunks do nothing any more, what was worked out stays. 404 for an
 * unknown one, 409 for one that has ended.
 */
export async function cancelSweep(actor: Actor, sweepId: string, nowMs: number): Promise<SweepBody> {
  if (!may(actor, "import elements")) throw notAllowed("cancel a sweep");
  const before = await readSweep(actor, sweepId);
  await inTransaction(async (tx) => {
    const ended = await markSweepCancelled(tx, sweepId, new Date(nowMs));
    if (!ended) throw conflict("The sweep has ended already.");
    await writeLedger(tx, actor, {
      action: "cancelled sweep",
      subjectKind: "sweep",
      subjectId: sweepId,
      subjectLabel: before.reason,
      newValues: { fragmentsDone: before.fragments.done, fragments: before.fragments.total },
    });
  });
  return readSweep(actor, sweepId);
}
