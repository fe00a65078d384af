import { constants, setPriority } from "node:os";
import { closePool, database } from "@/db/client";
import { addJob } from "@/lib/services/queue";
import { TASKS } from "./tasks";
import { keepWeekFilledTask } from "./tasks/keep-week-filled";
import { startWorker } from "./worker";

/** Time that running jobs get after a signal; the supervisor allows 4 s for everything. */
const GRACE_MS = 1200;

/** One worker process: runs jobs until a signal, then ends without leaving a locked job behind. */
async function main(): Promise<void> {
  // A sweep may keep every core busy for minutes: the web server goes first.
  setPriority(constants.priority.PRIORITY_BELOW_NORMAL);
  const worker = await startWorker(TASKS);
  console.log(`Worker ${worker.poolId} takes jobs.`);
  // After a longer stop the week has a gap at its end: the clock's next round is up to an hour away.
  await addJob(database(), keepWeekFilledTask.name, {}, { jobKey: keepWeekFilledTask.name });
  const stopOnce = once(async () => {
    await worker.stop(GRACE_MS);
    process.exit(0);
  });
  for (const signal of ["SIGTERM", "SIGINT", "SIGHUP"] as const) process.on(signal, stopOnce);
  await worker.ended;
  await closePool();
}

function once(work: () => Promise<void>): () => void {
  let begun = false;
  return () => {
    if (begun) return;
    begun = true;
    work().catch((error: unknown) => {
      console.error(error instanceof Error ? error.message : error);
      process.exit(1);
    });
  };
}

main().catch((error: unknown) => {
  // A refused connection to several addresses comes as an error without words.
  const words = error instanceof Error && error.message !== "" ? error.message : String(error);
  console.error(`The worker can't run: ${words}`);
  process.exit(1);
});
