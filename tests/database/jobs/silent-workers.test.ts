import { sql } from "drizzle-orm";
import { beforeEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { countAlive, tryRoundsLock } from "@/db/queries/workers";
import { inTransaction } from "@/db/transaction";
import { beat, pruneWorkers, releaseSilentWorkers, signOff } from "@/lib/services/heartbeat";
import { addJob } from "@/lib/services/queue";
import { ownDatabase } from "../support";

ownDatabase();

const worker = (poolId: string) => ({ poolId, host: "a-host", processId: 17 });

/** Locks the only job as the given pool did so long ago; the library itself writes just these two columns. */
async function lockJob(poolId: string, agoS: number): Promise<void> {
  await database().execute(sql`
    update graphile_worker._private_jobs
    set locked_by = ${poolId}, locked_at = now() - make_interval(secs => ${agoS})`);
}

async function holders(): Promise<(string | null)[]> {
  const { rows } = await database().execute<{ locked_by: string | null }>(
    sql`select locked_by from graphile_worker.jobs`,
  );
  return rows.map((row) => row.locked_by);
}

async function ageHeartbeat(poolId: string, agoS: number): Promise<void> {
  await database().execute(sql`
    update worker_pools set heartbeat_at = now() - make_interval(secs => ${agoS}) where pool_id = ${poolId}`);
}

beforeEach(async () => {
  await database().execute(sql`delete from worker_pools`);
  await database().execute(sql`delete from graphile_worker._private_jobs`);
  await addJob(database(), "a-task", {});
});

describe("releaseSilentWorkers", () => {
  it("opens the lock of a worker whose heartbeat stopped 31 s ago", async () => {
    await beat(worker("pool-dead"));
    await ageHeartbeat("pool-dead", 31);
    await lockJob("pool-dead", 40);
    expect(await releaseSilentWorkers()).toEqual(["pool-dead"]);
    expect(await holders()).toEqual([null]);
    expect(await releaseSilentWorkers()).toEqual([]);
  });

  it("leaves a worker alone whose heartbeat is fresh, however long its job runs", async () => {
    await beat(worker("pool-busy"));
    await lockJob("pool-busy", 3600);
    expect(await releaseSilentWorkers()).toEqual([]);
    expect(await holders()).toEqual(["pool-busy"]);
  });

  it("opens the lock of a worker that died before its first heartbeat, not sooner than after 30 s", async () => {
    await lockJob("pool-unknown", 20);
    expect(await releaseSilentWorkers()).toEqual([]);
    await lockJob("pool-unknown", 31);
    expect(await releaseSilentWorkers()).toEqual(["pool-unknown"]);
    expect(await holders()).toEqual([null]);
  });

  it("is done by one worker at a time", async () => {
    await beat(worker("pool-dead"));
    await ageHeartbeat("pool-dead", 31);
    await inTransaction(async (tx) => {
      expect(await tryRoundsLock(tx)).toBe(true);
      expect(await releaseSilentWorkers()).toEqual([]);
    });
    expect(await releaseSilentWorkers()).toEqual(["pool-dead"]);
  });
});

describe("a worker's row", () => {
  it("counts as alive until its last words, and again when it beats again", async () => {
    await beat(worker("pool-a"));
    await beat(worker("pool-b"));
    await ageHeartbeat("pool-b", 12);
    const both = await countAlive(database(), 30);
    expect(both.alive).toBe(2);
    expect(both.oldestHeartbeatS).toBeGreaterThanOrEqual(12);
    expect(both.oldestHeartbeatS).toBeLessThan(20);
    await lockJob("pool-a", 1);
    await signOff("pool-a");
    expect(await holders()).toEqual([null]);
    expect((await countAlive(database(), 30)).alive).toBe(1);
    await beat(worker("pool-a"));
    expect((await countAlive(database(), 30)).alive).toBe(2);
    expect(await countAlive(database(), 0)).toEqual({ alive: 0, oldestHeartbeatS: null });
  });

  it("is forgotten a week after the worker stopped", async () => {
    await beat(worker("pool-old"));
    await signOff("pool-old");
    await beat(worker("pool-live"));
    await pruneWorkers();
    const { rows } = await database().execute(sql`select pool_id from worker_pools order by 1`);
    expect(rows).toEqual([{ pool_id: "pool-live" }, { pool_id: "pool-old" }]);
    await database().execute(
      sql`update worker_pools set stopped_at = now() - interval '8 days' where pool_id = 'pool-old'`,
    );
    await pruneWorkers();
    const { rows: left } = await database().execute(sql`select pool_id from worker_pools`);
    expect(left).toEqual([{ pool_id: "pool-live" }]);
  });
});
