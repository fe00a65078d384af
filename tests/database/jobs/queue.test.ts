import { sql } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { inTransaction } from "@/db/transaction";
import { addJob, addJobs } from "@/lib/services/queue";
import { ownDatabase } from "../support";

ownDatabase();

interface JobRow extends Record<string, unknown> {
  task_identifier: string;
  key: string | null;
  priority: number;
  max_attempts: number;
  run_at: string;
}

async function jobsOf(task: string): Promise<JobRow[]> {
  const { rows } = await database().execute<JobRow>(sql`
    select task_identifier, key, priority, max_attempts, to_char(run_at, 'YYYY-MM-DD"T"HH24:MI:SS"Z"') as run_at
    from graphile_worker.jobs where task_identifier = ${task} order by id`);
  return rows;
}

describe("addJob", () => {
  it("adds nothing when the transaction rolls back", async () => {
    const broken = inTransaction(async (tx) => {
      await addJob(tx, "task-rolled-back", { a: 1 });
      throw new Error("changed our mind");
    });
    await expect(broken).rejects.toThrow("changed our mind");
    expect(await jobsOf("task-rolled-back")).toEqual([]);
  });

  it("adds the job with its limits when the transaction commits", async () => {
    await inTransaction((tx) =>
      addJob(
        tx,
        "task-kept",
        { text: "it's a \"quoted\" 'word'" },
        { runAtMs: Date.UTC(2031, 3, 6, 3, 12, 45), maxAttempts: 4, priority: 7, jobKey: "one" },
      ),
    );
    expect(await jobsOf("task-kept")).toEqual([
      {
        task_identifier: "task-kept",
        key: "one",
        priority: 7,
        max_attempts: 4,
        run_at: "2031-04-06T03:12:45Z",
      },
    ]);
  });

  it("replaces a waiting job of the same key", async () => {
    await addJob(database(), "task-keyed", { n: 1 }, { jobKey: "k" });
    await addJob(database(), "task-keyed", { n: 2 }, { jobKey: "k", priority: 3 });
    expect((await jobsOf("task-keyed")).map((job) => job.priority)).toEqual([3]);
  });
});

describe("addJobs", () => {
  it("adds one job for each payload, or none for none", async () => {
    await addJobs(database(), "task-none", []);
    const jobs = Array.from({ length: 50 }, (_, n) => ({ payload: { n }, jobKey: `bulk:${n}` }));
    await addJobs(database(), "task-bulk", jobs, { priority: 10, maxAttempts: 6 });
    expect(await jobsOf("task-none")).toEqual([]);
    const added = await jobsOf("task-bulk");
    expect(added.map((job) => job.key)).toEqual(jobs.map((job) => job.jobKey));
    expect(new Set(added.map((job) => `${job.priority} ${job.max_attempts}`))).toEqual(new Set(["10 6"]));
  });
});
