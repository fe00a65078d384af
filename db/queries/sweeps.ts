import { and, desc, eq, inArray, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { fragments } from "../schema/objects";
import { sweepChunks, sweeps } from "../schema/passes";

export type SweepRow = typeof sweeps.$inferSelect;
export type SweepChunkRow = typeof sweepChunks.$inferSelect;
export type ChunkFailure = SweepChunkRow["failures"][number];

/** All fragments, in a steady order. */
export async function allFragmentIds(q: Queryable): Promise<string[]> {
  const rows = await q.select({ id: fragments.id }).from(fragments).orderBy(fragments.name, fragments.id);
  return rows.map((row) => row.id);
}

/** A new sweep that runs. */
export async function insertSweep(
  q: Queryable,
  sweep: { fromAt: Date; toAt: Date; reason: string; requestedBy: string | null },
): Promise<string> {
  const [row] = await q
    .insert(sweeps)
    .values({ ...sweep, state: "running" })
    .returning({ id: sweeps.id });
  if (!row) throw new Error("the sweep was not written");
  return row.id;
}

/** The parts of a sweep, one row each; gives their ids. */
export async function insertChunks(
  q: Queryable,
  sweepId: string,
  chunks: readonly string[][],
): Promise<string[]> {
  if (chunks.length === 0) return [];
  const rows = await q
    .insert(sweepChunks)
    .values(chunks.map((fragmentIds) => ({ sweepId, fragmentIds })))
    .returning({ id: sweepChunks.id });
  return rows.map((row) => row.id);
}

/** A chunk with its sweep, or null. */
export async function readChunk(
  q: Queryable,
  chunkId: string,
): Promise<{ chunk: SweepChunkRow; sweep: SweepRow } | null> {
  const [row] = await q
    .select({ chunk: sweepChunks, sweep: sweeps })
    .from(sweepChunks)
    .innerJoin(sweeps, eq(sweeps.id, sweepChunks.sweepId))
    .where(eq(sweepChunks.id, chunkId));
  return row ?? null;
}

/** Which of these fragments a later sweep takes on as well, at least as far ahead, and has not given up. */
export async function takenOnLater(
  q: Queryable,
  sweep: Pick<SweepRow, "id" | "startedAt" | "toAt">,
  fragmentIds: readonly string[],
): Promise<Set<string>> {
  const { rows } = await q.execute<{ id: string }>(sql`
    select distinct each.id from sweeps s
      join sweep_chunks c on c.sweep_id = s.id and c.state <> 'failed'
      cross join lateral jsonb_array_elements_text(c.fragment_ids) as each(id)
    where s.state <> 'cancelled' and s.to_at >= ${sweep.toAt.toISOString()}::timestamptz
      and (s.started_at, s.id) > (${sweep.startedAt.toISOString()}::timestamptz, ${sweep.id}::uuid)
      and each.id = any(${sql.param([...fragmentIds])}::text[])`);
  return new Set(rows.map((row) => row.id));
}

/** The sweep's row under lock: whoever ends a chunk waits here, so that the last one sees all others. */
export async function lockSweep(q: Queryable, sweepId: string): Promise<SweepRow | null> {
  const [row] = await q.select().from(sweeps).where(eq(sweeps.id, sweepId)).for("update");
  return row ?? null;
}

/** Writes what a chunk gave. */
export async function markChunkDone(
  q: Queryable,
  chunkId: string,
  result: { passCount: number; failures: ChunkFailure[]; finishedAt: Date },
): Promise<void> {
  await q
    .update(sweepChunks)
    .set({ ...result, state: "done" })
    .where(eq(sweepChunks.id, chunkId));
}

/** Ends a running sweep none of whose chunks waits any more. */
export async function finishSweepIfComplete(q: Queryable, sweepId: string, finishedAt: Date): Promise<void> {
  const waiting = sql`exists (select 1 from ${sweepChunks} where ${sweepChunks.sweepId} = ${sweepId} and ${sweepChunks.state} = 'waiting')`;
  await q
    .update(sweeps)
    .set({ state: "done", finishedAt })
    .where(and(eq(sweeps.id, sweepId), eq(sweeps.state, "running"), sql`not ${waiting}`));
}

/** Ends a running sweep early; false when it no longer ran. */
export async function markSweepCancelled(q: Queryable, sweepId: string, finishedAt: Date): Promise<boolean> {
  const rows = await q
    .update(sweeps)
    .set({ state: "cancelled", finishedAt })
    .where(and(eq(sweeps.id, sweepId), eq(sweeps.state, "running")))
    .returning({ id: sweeps.id });
  return rows.length > 0;
}

/** Fragments for which no sweep reaches as far as `untilAt`. */
export async function fragmentsNotSweptUntil(q: Queryable, untilAt: Date): Promise<string[]> {
  const { rows } = await q.execute<{ id: string }>(sql`
    select f.id from fragments f
    where f.id not in (
      select each.id::uuid from sweeps s
        join sweep_chunks c on c.sweep_id = s.id and c.state <> 'failed'
        cross join lateral jsonb_array_elements_text(c.fragment_ids) as each(id)
      where s.state <> 'cancelled' and s.to_at >= ${untilAt.toISOString()}::timestamptz)
    order by f.name, f.id`);
  return rows.map((row) => row.id);
}

/** Waiting chunks whose job has used up its attempts; the sweeps they belong to. */
export async function failExhaustedChunks(q: Queryable, jobKeyPrefix: string): Promise<string[]> {
  const { rows } = await q.execute<{ sweep_id: string }>(sql`
    update sweep_chunks c set state = 'failed', finished_at = now(),
      failures = (
        select coalesce(jsonb_agg(jsonb_build_object('fragmentId', f.id, 'message',
          'The calculation broke off ' || j.attempts || ' times: ' || left(coalesce(j.last_error, 'no reason kept'), 300))), '[]')
        from jsonb_array_elements_text(c.fragment_ids) as f(id))
    from graphile_worker.jobs j
    where c.state = 'waiting' and j.key = ${jobKeyPrefix}::text || c.id::text
      and j.attempts >= j.max_attempts and j.locked_at is null
    returning c.sweep_id`);
  return [...new Set(rows.map((row) => row.sweep_id))];
}

/** Removes sweeps that ended before `beforeAt`, with their chunks; passes stay. */
export async function deleteOldSweeps(q: Queryable, beforeAt: Date): Promise<void> {
  await q.execute(sql`delete from sweeps where finished_at < ${beforeAt.toISOString()}::timestamptz`);
}

/** A sweep with the sums over its chunks. */
export interface SweepProgressRow {
  readonly id: string;
  readonly state: "running" | "done" | "cancelled";
  readonly reason: string;
  readonly fromAt: Date;
  readonly toAt: Date;
  readonly startedAt: Date;
  readonly finishedAt: Date | null;
  readonly fragmentCount: number;
  readonly fragmentsDone: number;
  readonly fragmentsFailed: number;
  readonly passCount: number;
}

/** Sweeps with their progress, newest first. */
export async function sweepProgressRows(q: Queryable, ids: readonly string[]): Promise<SweepProgressRow[]> {
  if (ids.length === 0) return [];
  const fragmentsIn = (state: string) =>
    sql<number>`coalesce(sum(jsonb_array_length(${sweepChunks.fragmentIds})) filter (where ${sweepChunks.state} = ${state}), 0)::int`;
  const rows = await q
    .select({
      id: sweeps.id,
      state: sweeps.state,
      reason: sweeps.reason,
      fromAt: sweeps.fromAt,
      toAt: sweeps.toAt,
      startedAt: sweeps.startedAt,
      finishedAt: sweeps.finishedAt,
      fragmentCount: sql<number>`coalesce(sum(jsonb_array_length(${sweepChunks.fragmentIds})), 0)::int`,
      fragmentsDone: fragmentsIn("done"),
      fragmentsFailed: fragmentsIn("failed"),
      passCount: sql<number>`coalesce(sum(${sweepChunks.passCount}), 0)::int`,
    })
    .from(sweeps)
    .leftJoin(sweepChunks, eq(sweepChunks.sweepId, sweeps.id))
    .where(inArray(sweeps.id, [...ids]))
    .groupBy(sweeps.id)
    .orderBy(desc(sweeps.startedAt), sweeps.id);
  // The table's check constraint admits these states only.
  return rows.map((row) => ({ ...row, state: row.state as SweepProgressRow["state"] }));
}

/** The identifiers of the newest sweeps. */
export async function newestSweeps(q: Queryable, limit: number): Promise<string[]> {
  const rows = await q
    .select({ id: sweeps.id })
    .from(sweeps)
    .orderBy(desc(sweeps.startedAt), sweeps.id)
    .limit(limit);
  return rows.map((row) => row.id);
}

/** What a sweep could not work out, with the fragment's name. */
export async function sweepFailures(
  q: Queryable,
  sweepId: string,
): Promise<{ fragmentId: string; fragmentName: string; message: string }[]> {
  const { rows } = await q.execute<{ id: string; name: string | null; message: string }>(sql`
    select each.failure ->> 'fragmentId' as id, f.name, each.failure ->> 'message' as message
    from sweep_chunks c
      cross join lateral jsonb_array_elements(c.failures) as each(failure)
      left join fragments f on f.id = (each.failure ->> 'fragmentId')::uuid
    where c.sweep_id = ${sweepId} order by f.name, 3`);
  return rows.map(({ id, name, message }) => ({ fragmentId: id, fragmentName: name ?? id, message }));
}

/** Which of these fragments there are. */
export async function fragmentsById(q: Queryable, ids: readonly string[]): Promise<string[]> {
  const rows = await q
    .select({ id: fragments.id })
    .from(fragments)
    .where(inArray(fragments.id, [...ids]));
  return rows.map((row) => row.id);
}
