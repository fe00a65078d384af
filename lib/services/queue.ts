import { sql } from "drizzle-orm";
import type { Queryable } from "@/db/client";

/** How a job may be held back, replaced or limited. */
export interface JobOptions {
  /** A waiting job under the same key is replaced instead of added twice. */
  readonly jobKey?: string;
  /** Not before this time, Unix milliseconds. */
  readonly runAtMs?: number;
  /** Attempts in all, with the library's growing wait between them. */
  readonly maxAttempts?: number;
  /** Jobs of one queue name run one after the other. */
  readonly queueName?: string;
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
      job_key => ${options.jobKey ?? null}::text)`);
}
