import { database } from "@/db/client";
import {
  deleteOldWorkers,
  findSilentWorkers,
  tryRoundsLock,
  unlockWorkers,
  upsertHeartbeat,
  type WorkerIdentity,
} from "@/db/queries/workers";
import { inTransaction } from "@/db/transaction";
import { config } from "@/lib/config";

export type { WorkerIdentity };

/** Writes this worker's sign of life. */
export async function beat(worker: WorkerIdentity): Promise<void> {
  await upsertHeartbeat(database(), worker);
}

/**
 * Opens the locks of workers that have gone silent, so that their jobs run again; the library alone
 * would wait four hours. Any worker may call it: one at a time gets through. Gives the released ids.
 */
export async function releaseSilentWorkers(): Promise<string[]> {
  return inTransaction(async (tx) => {
    if (!(await tryRoundsLock(tx))) return [];
    const silent = await findSilentWorkers(tx, config().DWELLBOOK_WORKER_RELEASE_S);
    await unlockWorkers(tx, silent);
    return silent;
  });
}

/** The last words of a worker: it holds nothing any more and is not missed. */
export async function signOff(poolId: string): Promise<void> {
  await inTransaction((tx) => unlockWorkers(tx, [poolId]));
}

/** Forgets workers that stopped more than a week ago. */
export async function pruneWorkers(): Promise<void> {
  await deleteOldWorkers(database(), 7);
}
