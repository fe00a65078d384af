import { bigint, integer, pgTable, text } from "drizzle-orm/pg-core";
import { instant } from "../columns";

/** One row for each worker process, refreshed every five seconds; health reads it. */
export const workerPools = pgTable("worker_pools", {
  poolId: text("pool_id").primaryKey(),
  host: text("host").notNull(),
  processId: integer("process_id").notNull(),
  startedAt: instant("started_at").notNull().defaultNow(),
  heartbeatAt: instant("heartbeat_at").notNull().defaultNow(),
  stoppedAt: instant("stopped_at"),
});

/** Counts for the throttled sign-in; shape given by rate-limiter-flexible's PostgreSQL store. */
export const signInThrottle = pgTable("sign_in_throttle", {
  key: text("key").primaryKey(),
  points: integer("points").notNull().default(0),
  expire: bigint("expire", { mode: "number" }),
});
