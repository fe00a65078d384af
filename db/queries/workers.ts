import { sql } from "drizzle-orm";
import type { Queryable } from "../client";

/** What a worker process says of itself. */
export interface WorkerIdentity {
  readonly poolId: string;
  readonly host: string;
  readonly processId: number;
}

/**
 * Writes the sign of life of a worker. The database's clock counts, since workers may run on machines
 * whose clocks differ. One that was taken for dead and beats again is alive again.
 */
export async function upsertHeartbeat(q: Queryable, worker: WorkerIdentity): Promise<void> {
  await q.execute(sql`
    insert into worker_pools (pool_id, host, process_id, started_at, heartbeat_at)
    values (${worker.poolId}, ${worker.host}, ${worker.processId}, now(), now())
    on conflict (pool_id) do update set heartbeat_at = now(), stopped_at = null`);
}

/** Marks workers as stopped and opens every lock they hold in the job queue. */
export async function unlockWorkers(q: Queryable, poolIds: readonly string[]): Promise<void> {
  if (poolIds.length === 0) return;
  const list = sql`${sql.param([...poolIds])}::text[]`;
  await q.execute(sql`select graphile_worker.force_unlock_workers(${list})`);
  await q.execute(sql`
    update worker_pools set stopped_at = now() where pool_id = any(${list}) and stopped_at is null`);
}

/**
 * Workers not heard of for `silentS` seconds: those whose heartbeat is older, and those that hold a job
 * for longer without any live row of theirs (killed before the first heartbeat, or after the last).
 */
export async function findSilentWorkers(q: Queryable, silentS: number): Promise<string[]> {
  const { rows } = await q.execute<{ pool_id: string }>(sql`
    with alive as (
      select pool_id from worker_pools
      where stopped_at is null and heartbeat_at >= now() - make_interval(secs => ${silentS}))
    select pool_id from worker_pools
      where stopped_at is null and heartbeat_at < now() - make_interval(secs => ${silentS})
    union
    select locked_by from graphile_worker.jobs
      where locked_by is not null and locked_at < now() - make_interval(secs => ${silentS})
        and locked_by not in (select pool_id from alive)`);
  return rows.map((row) => row.pool_id);
}

/** One worker at a time looks after the others; false when another does it at this moment. */
export async function tryRoundsLock(q: Queryable): Promise<boolean> {
  const { rows } = await q.execute<{ got: boolean }>(sql`select pg_try_advisory_xact_lock(72830118) as got`);
  return rows[0]?.got ?? false;
}

/** How many workers beat within `silentS` seconds, and the age of the oldest of those heartbeats. */
export async function countAlive(
  q: Queryable,
  silentS: number,
): Promise<{ alive: number; oldestHeartbeatS: number | null }> {
  const { rows } = await q.execute<{ alive: number; oldest: number | null }>(sql`
    select count(*)::int as alive,
      extract(epoch from now() - min(heartbeat_at))::float8 as oldest
    from worker_pools
    where stopped_at is null and heartbeat_at >= now() - make_interval(secs => ${silentS})`);
  const row = rows[0];
  return { alive: row?.alive ?? 0, oldestHeartbeatS: row?.oldest ?? null };
}

/** Removes rows of workers that stopped more than `days` days ago. */
export async function deleteOldWorkers(q: Queryable, days: number): Promise<void> {
  await q.execute(sql`delete from worker_pools where stopped_at < now() - make_interval(days => ${days})`);
}
