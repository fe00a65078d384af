import { fragmentsById } from "@/db/queries/sweeps";
import { inTransaction } from "@/db/transaction";
import { type SweepBody, sweepInput } from "@/lib/contracts/sweeps";
import { notAllowed, refused } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { writeLedger } from "./ledger";
import { readInput } from "./read-input";
import { startSweep } from "./start-sweep";
import { readSweep } from "./sweep-progress";

/** A sweep that a person asks for, of all fragments or some; 422 names fragments that there are none of. */
export async function requestSweep(
  actor: Actor,
  readBody: () => Promise<unknown>,
  nowMs: number,
): Promise<SweepBody> {
  if (!may(actor, "import elements")) throw notAllowed("start a sweep");
  const { fragmentIds } = readInput(sweepInput, await readBody());
  const sweepId = await inTransaction(async (tx) => {
    if (fragmentIds) {
      const known = new Set(await fragmentsById(tx, fragmentIds));
      const unknown = fragmentIds.flatMap((id, index) =>
        known.has(id.toLowerCase()) ? [] : [{ path: `fragmentIds.${index}`, message: "no such fragment" }],
      );
      if (unknown.length > 0) throw refused("Some fragments are not in the book.", unknown);
    }
    const sweep = await startSweep(tx, {
      fragmentIds: fragmentIds ?? "all",
      reason: `asked for by ${actor.name}`,
      requestedBy: actor.id,
      nowMs,
    });
    await writeLedger(tx, actor, {
      action: "started sweep",
      subjectKind: "sweep",
      subjectId: sweep.sweepId,
      subjectLabel: fragmentIds ? `${fragmentIds.length} fragments` : "all fragments",
    });
    return sweep.sweepId;
  });
  return readSweep(actor, sweepId);
}
