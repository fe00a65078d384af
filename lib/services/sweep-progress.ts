import { database } from "@/db/client";
import { newestSweeps, type SweepProgressRow, sweepFailures, sweepProgressRows } from "@/db/queries/sweeps";
import type { SweepBody } from "@/lib/contracts/sweeps";
import { notAllowed, notFound } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";

/** One sweep with its progress and everything that could not be worked out. */
export async function readSweep(actor: Actor, sweepId: string): Promise<SweepBody> {
  if (!may(actor, "search passes")) throw notAllowed("see sweeps");
  const [row] = await sweepProgressRows(database(), [sweepId]);
  if (!row) throw notFound("sweep");
  return sweepBody(row, await sweepFailures(database(), sweepId));
}

/** The newest sweeps, without their failures. */
export async function listSweeps(actor: Actor): Promise<{ sweeps: SweepBody[] }> {
  if (!may(actor, "search passes")) throw notAllowed("see sweeps");
  const ids = await newestSweeps(database(), 20);
  const rows = await sweepProgressRows(database(), ids);
  return { sweeps: rows.map((row) => sweepBody(row, [])) };
}

function sweepBody(row: SweepProgressRow, failures: SweepBody["failures"]): SweepBody {
  return {
    id: row.id,
    state: row.state,
    reason: row.reason,
    from: row.fromAt.toISOString(),
    to: row.toAt.toISOString(),
    startedAt: row.startedAt.toISOString(),
    finishedAt: row.finishedAt?.toISOString() ?? null,
    fragments: { total: row.fragmentCount, done: row.fragmentsDone, failed: row.fragmentsFailed },
    passCount: row.passCount,
    failures,
  };
}
