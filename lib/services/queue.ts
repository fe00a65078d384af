import { sql } from "drizzle-orm";
import type { Queryable } from "@/db/client";

/** How a job may be held back, replaced, ranked or limited. */
export interface JobOptions {
  /** A waiting job under the same key is replaced instead of added twice. */
  readonly jobKey?: string;
  /** Not before this time, Unix milliseconds. */
  readonly runAtMs?: number;
  /** Attempts in all, with the library's growing wait between them. */
  readonly maxAttempts?: number;
  /** Jobs of one queue name run one after the other. */
  readonly queueName?: string;
  /** Smaller runs first; 0 unless told. Bulk work takes more, so that mail never waits behind it. */
  readonly priority?: number;
}

/**
 * Adds a job through the given transaction: it is there when the transaction commits, and was never
 * there when it rolls back. Workers hear of it by the library's own notification on commit.
 */
export async function addJob(
  q: Queryable,
  task: string,
  payload: Record<string, unknown>,
  options: JobOptions = {},
): Promise<void> {
  const runAt = options.runAtMs === undefined ? null : new Date(options.runAtMs).toISOString();
  await q.execute(sql`
    select 1 from graphile_worker.add_job(
      identifier => ${task}::text,
      payload => ${JSON.stringify(payload)}::json,
      queue_name => ${options.queueName ?? null}::text,
      run_at => ${runAt}::timestamptz,
      max_attempts => ${options.maxAttempts ?? null}::int,
      job_key => ${options.jobKey ?? null}::text,
      priority => ${options.priority ?? null}::int)`);
}

/** Adds many jobs of one task in a single statement, all with the same rank; as {@link addJob}. */
export async function addJobs(
  q: Queryable,
  task: string,
  jobs: readonly { payload: Record<string, unknown>; jobKey: string }[],
  options: Pick<JobOptions, "priority" | "maxAttempts"> = {},
): Promise<void> {
  if (jobs.length === 0) return;
  await q.execute(sql`
    select count(added.id) from json_array_elements(${JSON.stringify(jobs)}::json) as each(job),
      lateral graphile_worker.add_job(
        identifier => ${task}::text,
        payload => each.job -> 'payload',
        max_attempts => ${options.maxAttempts ?? null}::int,
        job_key => each.job ->> 'jobKey',
        priority => ${options.priority ?? null}::int) as added`);
}
