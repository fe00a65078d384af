import { database } from "@/db/client";
import {
  type ChunkFailure,
  finishSweepIfComplete,
  lockSweep,
  markChunkDone,
  readChunk,
  takenOnLater,
} from "@/db/queries/sweeps";
import { inTransaction } from "@/db/transaction";
import { sweepFragment } from "./sweep-fragment";
import { readGround } from "./sweep-ground";

/**
 * Works out one chunk of a sweep, fragment by fragment, each in its own transaction; then marks the chunk,
 * and the sweep when nothing of it waits any more. A chunk that is done, or whose sweep was cancelled, is
 * left alone. Killed anywhere, it can be run again: what was written is written again the same.
 *
 * A fragment that a later sweep takes on too is left to that one: it reads everything that this one was
 * started for, and imports that follow on each other's heels are worked out once.
 */
export async function sweepChunk(chunkId: string, nowMs: number): Promise<void> {
  const found = await readChunk(database(), chunkId);
  if (found?.sweep.state !== "running" || found.chunk.state !== "waiting") return;
  const { chunk, sweep } = found;
  const span = { fromMs: sweep.fromAt.getTime(), toMs: sweep.toAt.getTime(), nowMs };
  const ground = await readGround();
  const failures: ChunkFailure[] = [];
  let passCount = 0;
  const later = await takenOnLater(database(), sweep, chunk.fragmentIds);
  for (const fragmentId of chunk.fragmentIds) {
    if (later.has(fragmentId)) continue;
    const swept = await sweepFragment(fragmentId, span, ground);
    passCount += swept.passCount;
    failures.push(...swept.failures.map((message) => ({ fragmentId, message })));
  }
  await inTransaction(async (tx) => {
    await lockSweep(tx, sweep.id);
    await markChunkDone(tx, chunkId, { passCount, failures, finishedAt: new Date(nowMs) });
    await finishSweepIfComplete(tx, sweep.id, new Date(nowMs));
  });
}
