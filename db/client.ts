import { drizzle, type NodePgDatabase } from "drizzle-orm/node-postgres";
import { Pool } from "pg";
import { config } from "@/lib/config";

/** The pool is shared through globalThis: Next loads route handlers in separate module graphs. */
const key = Symbol.for("dwellbook.pool");
const shared = globalThis as unknown as Record<symbol, Pool | undefined>;

/** A drizzle handle on a pool or inside a transaction: queries take either. */
export type Database = NodePgDatabase;
export type Transaction = Parameters<Parameters<Database["transaction"]>[0]>[0];
export type Queryable = Database | Transaction;

/** The connection pool of this process, opened at first use, in UTC. */
export function pool(): Pool {
  const existing = shared[key];
  if (existing) return existing;
  const made = new Pool({
    connectionString: config().DATABASE_URL,
    max: config().DATABASE_POOL_SIZE,
    options: "-c timezone=UTC",
  });
  // An idle client that loses its server must not end the process; the next query reports it.
  made.on("error", () => undefined);
  shared[key] = made;
  return made;
}

/** Drizzle on the shared pool. */
export function database(): Database {
  return drizzle(pool());
}

/** Closes the pool: for scripts and tests. */
export async function closePool(): Promise<void> {
  const existing = shared[key];
  shared[key] = undefined;
  await existing?.end();
}
