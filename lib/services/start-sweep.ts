import { database, type Transaction } from "@/db/client";
import {
  allFragmentIds,
  deleteOldSweeps,
  failExhaustedChunks,
  finishSweepIfComplete,
  fragmentsNotSweptUntil,
  insertChunks,
  insertSweep,
  lockSweep,
} from "@/db/queries/sweeps";
import { inTransaction } from "@/db/transaction";
import { addJobs } from "./queue";

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;

/** How far ahead passes are worked out: what planners see. */
export const SWEEP_SPAN_MS = 7 * DAY_MS;

/** How far the end of the last sweep may fall behind that span before it is swept again. */
const HORIZON_SLACK_MS = 6 * HOUR_MS;

/**
 * Fragments in one chunk, which is to hold its process for at most 2 s: one over four stations has some 75
 * passes in a week, which take about a second of one core with screening and planning (measured).
 */
const FRAGMENTS_PER_CHUNK = 1;

/** Attempts of a chunk, over some five minutes by the library's backoff. */
const CHUNK_ATTEMPTS = 6;

/** Behind everything that people wait for. */
const CHUNK_PRIORITY = 10;

/** The job of a chunk is found again by this key. */
const CHUNK_KEY_PREFIX = "sweep-chunk:";

/**
 * Starts a sweep of the given fragments over all stations for seven days, in chunks that are jobs of
 * this transaction. A sweep of nothing is done at once.
 */
export async function startSweep(
  tx: Transaction,
  args: { fragmentIds: string[] | "all"; reason: string; requestedBy: string | null; nowMs: number },
): Promise<{ sweepId: string }> {
  const ids = args.fragmentIds === "all" ? await allFragmentIds(tx) : [...new Set(args.fragmentIds)];
  const sweepId = await insertSweep(tx, {
    fromAt: new Date(args.nowMs),
    toAt: new Date(args.nowMs + SWEEP_SPAN_MS),
    reason: args.reason,
    requestedBy: args.requestedBy,
  });
  const chunkIds = await insertChunks(tx, sweepId, inChunks(ids, FRAGMENTS_PER_CHUNK));
  await addJobs(
    tx,
    "sweep-chunk",
    chunkIds.map((chunkId) => ({ payload: { chunkId }, jobKey: `${CHUNK_KEY_PREFIX}${chunkId}` })),
    { priority: CHUNK_PRIORITY, maxAttempts: CHUNK_ATTEMPTS },
  );
  if (chunkIds.length === 0) await finishSweepIfComplete(tx, sweepId, new Date(args.nowMs));
  return { sweepId };
}

/**
 * Sweeps the fragments whose passes no longer reach seven days ahead, once they lag by six hours; also
 * closes chunks that failed for good and forgets sweeps of a month ago. Gives the new sweep, or null.
 */
export async function keepWeekFilled(nowMs: number): Promise<{ sweepId: string } | null> {
  await closeFailedChunks(nowMs);
  await deleteOldSweeps(database(), new Date(nowMs - 30 * DAY_MS));
  return inTransaction(async (tx) => {
    const horizon = new Date(nowMs + SWEEP_SPAN_MS - HORIZON_SLACK_MS);
    const fragmentIds = await fragmentsNotSweptUntil(tx, horizon);
    if (fragmentIds.length === 0) return null;
    return startSweep(tx, { fragmentIds, reason: "the week moved on", requestedBy: null, nowMs });
  });
}

/** A chunk whose job ran out of attempts is failed, with its last error; its sweep goes on without it. */
async function closeFailedChunks(nowMs: number): Promise<void> {
  await inTransaction(async (tx) => {
    for (const sweepId of await failExhaustedChunks(tx, CHUNK_KEY_PREFIX)) {
      await lockSweep(tx, sweepId);
      await finishSweepIfComplete(tx, sweepId, new Date(nowMs));
    }
  });
}

function inChunks<T>(items: readonly T[], size: number): T[][] {
  const chunks: T[][] = [];
  for (let i = 0; i < items.length; i += size) chunks.push(items.slice(i, i + size));
  return chunks;
}
