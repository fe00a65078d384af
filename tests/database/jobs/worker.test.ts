import { sql } from "drizzle-orm";
import { afterEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { type RunningWorker, startWorker } from "@/lib/jobs/worker";
import { addJob } from "@/lib/services/queue";
import { ownDatabase } from "../support";

ownDatabase();

let worker: RunningWorker | undefined;
afterEach(async () => {
  await worker?.stop(500);
  worker = undefined;
});

interface JobState extends Record<string, unknown> {
  attempts: number;
  locked: boolean;
  waits: boolean;
  last_error: string | null;
}

async function stateOf(task: string): Promise<JobState[]> {
  const { rows } = await database().execute<JobState>(sql`
    select attempts, locked_by is not null as locked, run_at > now() as waits, last_error
    from graphile_worker.jobs where task_identifier = ${task}`);
  return rows;
}

async function until(condition: () => Promise<boolean> | boolean): Promise<void> {
  const deadline = Date.now() + 8000;
  while (!(await condition())) {
    if (Date.now() > deadline) throw new Error("waited 8 s in vain");
    await new Promise((resolve) => setTimeout(resolve, 25));
  }
}

describe("a worker", () => {
  it("runs a job with its payload, once, and writes its heartbeat", async () => {
    const seen: unknown[] = [];
    worker = await startWorker([
      {
        name: "note-it",
        run: async (payload) => {
          seen.push(payload);
        },
      },
    ]);
    await addJob(database(), "note-it", { id: "x" });
    await until(async () => seen.length > 0 && (await stateOf("note-it")).length === 0);
    expect(seen).toEqual([{ id: "x" }]);
    const { rows } = await database().execute(
      sql`select pool_id, process_id, stopped_at from worker_pools where pool_id = ${worker.poolId}`,
    );
    expect(rows).toEqual([{ pool_id: worker.poolId, process_id: process.pid, stopped_at: null }]);
  });

  it("keeps a job that throws, with its error, for a later attempt", async () => {
    worker = await startWorker([
      {
        name: "break",
        run: async () => {
          throw new Error("the mail server is away");
        },
      },
    ]);
    await addJob(database(), "break", {});
    await until(
      async () => (await stateOf("break"))[0]?.attempts === 1 && !(await stateOf("break"))[0]?.locked,
    );
    expect(await stateOf("break")).toEqual([
      { attempts: 1, locked: false, waits: true, last_error: "the mail server is away" },
    ]);
  });

  it("stops within its grace though a job hangs, and leaves that job free for others", async () => {
    let begun = false;
    let letGo: () => void = () => undefined;
    const hanging = new Promise<void>((resolve) => {
      letGo = resolve;
    });
    const own = await startWorker([
      {
        name: "hang",
        run: () => {
          begun = true;
          return hanging;
        },
      },
    ]);
    await addJob(database(), "hang", {});
    await until(() => begun);
    expect((await stateOf("hang"))[0]?.locked).toBe(true);
    const startedMs = Date.now();
    await own.stop(300);
    expect(Date.now() - startedMs).toBeLessThan(1500);
    expect((await stateOf("hang"))[0]?.locked).toBe(false);
    const { rows } = await database().execute<{ stopped: boolean }>(
      sql`select stopped_at is not null as stopped from worker_pools where pool_id = ${own.poolId}`,
    );
    expect(rows).toEqual([{ stopped: true }]);
    letGo();
    await own.ended;
  });
});
