import { EventEmitter } from "node:events";
import { hostname } from "node:os";
import { Logger, type Runner, run, type TaskList, type WorkerEvents } from "graphile-worker";
import { config } from "@/lib/config";
import { beat, releaseSilentWorkers, signOff, type WorkerIdentity } from "@/lib/services/heartbeat";
import { CRONTAB } from "./crontab";
import type { Task } from "./task";

/** A running worker process. */
export interface RunningWorker {
  readonly poolId: string;
  /** Ends when the worker does, by itself or by {@link stop}. */
  readonly ended: Promise<void>;
  /** Takes no new job, gives running ones `graceMs`, then opens its locks: they are tried again. */
  stop(graceMs: number): Promise<void>;
}

/** Two at once: chunks of a sweep use the processor and mail waits for the network. */
const CONCURRENCY = 2;

/** Starts a worker on the queue with a heartbeat; throws when the database does not answer. */
export async function startWorker(tasks: readonly Task[]): Promise<RunningWorker> {
  const events: WorkerEvents = new EventEmitter();
  let poolId = "";
  events.on("pool:create", ({ workerPool }) => {
    poolId = workerPool.id;
  });
  const runner = await run({
    connectionString: config().DATABASE_URL,
    maxPoolSize: CONCURRENCY + 2,
    concurrency: CONCURRENCY,
    // LISTEN alone can miss a job whose notification got lost with a connection.
    pollInterval: config().DWELLBOOK_WORKER_POLL_MS,
    noHandleSignals: true,
    taskList: taskListOf(tasks),
    crontab: CRONTAB,
    logger: quietLogger(),
    events,
  });
  const stopHeartbeat = startHeartbeat(poolId);
  return {
    poolId,
    ended: runner.promise.finally(stopHeartbeat),
    stop: async (graceMs) => {
      await withinMs(Promise.all([stopHeartbeat(), stopRunner(runner)]), graceMs);
      await signOff(poolId);
    },
  };
}

function taskListOf(tasks: readonly Task[]): TaskList {
  return Object.fromEntries(tasks.map((task) => [task.name, (payload: unknown) => task.run(payload)]));
}

/**
 * Beats and looks after the others at once and then every few seconds. Gives the way to end it, which
 * waits for the round under way: a beat after the sign-off would bring the worker back to life.
 */
function startHeartbeat(poolId: string): () => Promise<void> {
  const identity = { poolId, host: hostname(), processId: process.pid };
  let stopped = false;
  let timer: NodeJS.Timeout | undefined;
  const round = async () => {
    await beatAndLookRound(identity);
    if (!stopped) timer = setTimeout(next, config().DWELLBOOK_WORKER_HEARTBEAT_S * 1000);
  };
  let underWay = round();
  function next() {
    underWay = round();
  }
  return () => {
    stopped = true;
    clearTimeout(timer);
    return underWay;
  };
}

/** One round; the database being away for a while is said and survived. */
async function beatAndLookRound(identity: WorkerIdentity): Promise<void> {
  try {
    await beat(identity);
    for (const silent of await releaseSilentWorkers()) {
      console.warn(`Released the jobs of ${silent}, which has gone silent.`);
    }
  } catch (error) {
    console.error(`Heartbeat failed: ${error instanceof Error ? error.message : String(error)}`);
  }
}

/** A runner that already stopped by itself refuses to stop again: that is no fault here. */
async function stopRunner(runner: Runner): Promise<void> {
  try {
    await runner.stop();
  } catch (error) {
    console.warn(`Worker: ${error instanceof Error ? error.message : String(error)}`);
  }
}

async function withinMs(work: Promise<unknown>, limitMs: number): Promise<void> {
  let timer: NodeJS.Timeout | undefined;
  const limit = new Promise<void>((resolve) => {
    timer = setTimeout(resolve, limitMs);
  });
  await Promise.race([work, limit]);
  clearTimeout(timer);
}

/** Warnings and errors only: the library tells of every finished job. */
function quietLogger(): Logger {
  return new Logger(() => (level, message) => {
    if (level === "error" || level === "warning") console.error(message);
  });
}
