import { type ChildProcess, spawn } from "node:child_process";
import { eq, sql } from "drizzle-orm";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { passes, sweepChunks, sweeps } from "@/db/schema/passes";
import { inTransaction } from "@/db/transaction";
import { startSweep } from "@/lib/services/start-sweep";
import { sweepChunk } from "@/lib/services/sweep-chunk";
import { ownDatabase } from "../support";
import { addStation, HOUR } from "../world";
import { addFragments, addGuarded, epoch, passSnapshot } from "./ground";

const testDatabase = ownDatabase();
const now = Math.floor(Date.now() / 1000) * 1000;
/** Passes that rise before the workers get to them may be left as they are. */
const LATER_MS = now + HOUR;
const RELEASE_S = 2;

const workers: ChildProcess[] = [];
let fragmentIds: string[] = [];

beforeAll(async () => {
  await addStation(database(), "Alder Point");
  fragmentIds = await addFragments(5, now);
  await addGuarded(99_001, "crewed", { ...epoch(now - 3 * HOUR), meanMotionRevPerDay: 15.5 });
  await addGuarded(99_002, "payload", { ...epoch(now - 6 * HOUR), meanAnomalyDeg: 0.3, raanDeg: 120 });
});
afterAll(() => {
  for (const worker of workers) worker.kill("SIGKILL");
});

function startWorker(): ChildProcess {
  const env = {
    ...process.env,
    DATABASE_URL: testDatabase().url,
    DWELLBOOK_WORKER_RELEASE_S: String(RELEASE_S),
    DWELLBOOK_WORKER_HEARTBEAT_S: "0.5",
    DWELLBOOK_WORKER_POLL_MS: "250",
  };
  const args = ["--import", "tsx", "lib/jobs/worker-main.ts"];
  const worker = spawn(process.execPath, args, { env, stdio: ["ignore", "ignore", "inherit"] });
  workers.push(worker);
  return worker;
}

async function startTheSweep(): Promise<string> {
  const { sweepId } = await inTransaction((tx) =>
    startSweep(tx, { fragmentIds, reason: "a test", requestedBy: null, nowMs: now }),
  );
  return sweepId;
}

async function until<T>(what: string, ask: () => Promise<T | null>, limitMs: number): Promise<T> {
  const deadline = Date.now() + limitMs;
  for (;;) {
    const answer = await ask();
    if (answer !== null) return answer;
    if (Date.now() > deadline) throw new Error(`${what} did not come within ${limitMs / 1000} s`);
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
}

/** The keys of the chunks that this process holds at the moment; null when none. */
async function heldBy(worker: ChildProcess): Promise<string[] | null> {
  const { rows } = await database().execute<{ key: string }>(sql`
    select j.key from graphile_worker.jobs j join worker_pools w on w.pool_id = j.locked_by
    where w.process_id = ${worker.pid} and j.task_identifier = 'sweep-chunk'`);
  return rows.length > 0 ? rows.map(({ key }) => key) : null;
}

/** Freezes the worker while it surely holds a chunk, then kills it; gives the chunks that it takes along. */
async function killMidChunk(worker: ChildProcess): Promise<string[]> {
  for (;;) {
    await until("a chunk in work", () => heldBy(worker), 30_000);
    worker.kill("SIGSTOP");
    await new Promise((resolve) => setTimeout(resolve, 100));
    const held = await heldBy(worker);
    if (held) {
      worker.kill("SIGKILL");
      return held;
    }
    worker.kill("SIGCONT");
  }
}

describe("a worker that is killed in the middle of a chunk", () => {
  it("does not stop the sweep, and the rows are those of an undisturbed one", async () => {
    const undisturbed = await startTheSweep();
    const chunks = await database().select().from(sweepChunks).where(eq(sweepChunks.sweepId, undisturbed));
    for (const { id } of chunks) await sweepChunk(id, now);
    const expected = await passSnapshot(LATER_MS);
    expect(expected.length).toBeGreaterThan(30);
    await database().delete(passes);
    await database().execute(sql`delete from graphile_worker._private_jobs`);

    const sweepId = await startTheSweep();
    const victim = startWorker();
    const held = await killMidChunk(victim);
    expect(held.length).toBeGreaterThan(0);
    const heir = startWorker();
    await until(
      "the end of the sweep",
      async () => {
        const [sweep] = await database().select().from(sweeps).where(eq(sweeps.id, sweepId));
        return sweep?.state === "done" ? sweep : null;
      },
      60_000,
    );

    const after = await database().select().from(sweepChunks).where(eq(sweepChunks.sweepId, sweepId));
    expect(after.map(({ state }) => state)).toEqual(fragmentIds.map(() => "done"));
    expect(await passSnapshot(LATER_MS)).toEqual(expected);
    const { rows } = await database().execute<{ stopped: boolean }>(sql`
      select stopped_at is not null as stopped from worker_pools where process_id = ${victim.pid}`);
    expect(rows).toEqual([{ stopped: true }]);

    const ended = new Promise<number | null>((resolve) => heir.once("exit", resolve));
    const askedMs = Date.now();
    heir.kill("SIGTERM");
    expect(await ended).toBe(0);
    expect(Date.now() - askedMs).toBeLessThan(3000);
  }, 120_000);
});
