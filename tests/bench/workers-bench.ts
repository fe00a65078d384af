import { type ChildProcess, execFileSync, spawn } from "node:child_process";
import { randomBytes } from "node:crypto";
import { Client, escapeIdentifier } from "pg";
import { type Row, seconds } from "./clock";

/** A database of the benchmark's own on the developers' cluster, with the demo's stations and objects. */
interface Ground {
  readonly url: string;
  drop(): Promise<void>;
}

/**
 * The rate of a sweep with two worker processes over its rate with one: the same fragments, stations and
 * protected objects from an empty list of passes. A rate counts chunks from the first one done to the last,
 * so that the start of the processes is no part of it.
 */
export async function benchWorkers(fragmentCount: number): Promise<Row> {
  const ground = await layGround();
  process.env.DATABASE_URL = ground.url;
  const bench = await import("./workers-ground");
  try {
    await bench.fill(fragmentCount);
    const one = await ratePerS(ground, 1, bench);
    const two = await ratePerS(ground, 2, bench);
    const agree = one.passes === two.passes;
    return {
      name: "workers",
      ours: `${two.perS.toFixed(2)} chunks/s`,
      theirs: `${one.perS.toFixed(2)} chunks/s`,
      ratio: agree ? two.perS / one.perS : null,
      goal: 1.8,
      note: agree
        ? `a sweep of ${fragmentCount} fragments over 4 stations and 7 days with screening, ${one.passes} passes both times, ${seconds(one.wallS)} with one worker process and ${seconds(two.wallS)} with two, by the clock on the wall`
        : `the two sweeps disagree: ${one.passes} and ${two.passes} passes`,
    };
  } finally {
    await bench.close();
    await ground.drop();
  }
}

async function layGround(): Promise<Ground> {
  const lines = execFileSync(process.execPath, ["lib/run/dev-db.mjs"], { encoding: "utf8" });
  const env = Object.fromEntries(
    [...lines.matchAll(/^export (\w+)='(.*)'$/gm)].map((m) => [m[1] ?? "", m[2] ?? ""]),
  );
  const name = `dwellbook_bench_${randomBytes(4).toString("hex")}`;
  const owner = new URL(env.DATABASE_OWNER_URL ?? "").username;
  const app = new URL(env.DATABASE_URL ?? "").username;
  await asAdmin(env, `CREATE DATABASE ${name} OWNER ${escapeIdentifier(owner)}`);
  await asAdmin(env, `GRANT ALL ON DATABASE ${name} TO ${escapeIdentifier(app)}`);
  const onIt = (url: string | undefined): string =>
    Object.assign(new URL(url ?? ""), { pathname: `/${name}` }).href;
  const url = onIt(env.DATABASE_URL);
  execFileSync(process.execPath, ["--import", "tsx", "db/migrate.ts"], {
    env: { ...process.env, DATABASE_URL: url, DATABASE_OWNER_URL: onIt(env.DATABASE_OWNER_URL) },
    stdio: "ignore",
  });
  return { url, drop: () => asAdmin(env, `DROP DATABASE ${name} WITH (FORCE)`) };
}

async function asAdmin(env: Record<string, string>, statement: string): Promise<void> {
  const client = new Client({ connectionString: env.TEST_DATABASE_ADMIN_URL });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

async function ratePerS(ground: Ground, count: number, bench: typeof import("./workers-ground")) {
  await bench.startAfresh();
  const workers = Array.from({ length: count }, () => startWorker(ground.url));
  try {
    let firstMs: number | null = null;
    for (;;) {
      const { done, all } = await bench.progress();
      const nowMs = performance.now();
      // The first of each worker is its warm-up: compiled code and caches.
      if (firstMs === null && done >= count) firstMs = nowMs;
      if (done === all && firstMs !== null) {
        const wallS = (nowMs - firstMs) / 1000;
        return { perS: (all - count) / wallS, wallS, passes: await bench.passCount() };
      }
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  } finally {
    await Promise.all(workers.map(endWorker));
  }
}

function startWorker(url: string): ChildProcess {
  return spawn(process.execPath, ["--import", "tsx", "lib/jobs/worker-main.ts"], {
    env: { ...process.env, DATABASE_URL: url, DWELLBOOK_WORKER_POLL_MS: "100" },
    stdio: "ignore",
  });
}

function endWorker(worker: ChildProcess): Promise<void> {
  return new Promise((resolve) => {
    worker.once("exit", () => resolve());
    worker.kill("SIGTERM");
  });
}
