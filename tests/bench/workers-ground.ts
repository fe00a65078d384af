import { sql } from "drizzle-orm";
import { closePool, database } from "@/db/client";
import { inTransaction } from "@/db/transaction";
import type { Actor } from "@/lib/engagement/roles";
import { startSweep } from "@/lib/services/start-sweep";
import { inventBreakUp } from "@/seed/break-up";
import { fillStations } from "@/seed/fill-stations";
import { importFragments, importProtected } from "@/seed/import-orbits";
import { inventProtected } from "@/seed/protected";

const HOUR_MS = 3_600_000;
const IMPORTER: Actor = {
  id: null,
  name: "the benchmark",
  role: "planner",
  authorityId: null,
  isSafetyOfficer: false,
  via: "system",
};
const nowMs = Date.now();

/** The demo's stations and protected objects, and so many of its invented fragments. */
export async function fill(fragmentCount: number): Promise<void> {
  await inTransaction((tx) => fillStations(tx, nowMs));
  await importProtected(IMPORTER, inventProtected(), nowMs - HOUR_MS, nowMs);
  await importFragments(IMPORTER, inventBreakUp().slice(0, fragmentCount), nowMs - HOUR_MS, nowMs);
}

/** Forgets every pass and job, and starts a sweep of everything. */
export async function startAfresh(): Promise<void> {
  await database().execute(sql`delete from passes`);
  await database().execute(sql`delete from sweeps`);
  await database().execute(sql`delete from graphile_worker._private_jobs`);
  await inTransaction((tx) =>
    startSweep(tx, { fragmentIds: "all", reason: "the benchmark", requestedBy: null, nowMs }),
  );
}

/** Chunks done and in all. */
export async function progress(): Promise<{ done: number; all: number }> {
  const { rows } = await database().execute<{ done: number; all: number }>(
    sql`select count(*) filter (where state = 'done')::int as done, count(*)::int as all from sweep_chunks`,
  );
  return rows[0] ?? { done: 0, all: 0 };
}

/** How many passes were found. */
export async function passCount(): Promise<number> {
  const { rows } = await database().execute<{ n: number }>(sql`select count(*)::int as n from passes`);
  return rows[0]?.n ?? 0;
}

export const close = closePool;
