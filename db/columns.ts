import { timestamp, uuid } from "drizzle-orm/pg-core";

/** Primary key made by the database. */
export function identifier() {
  return uuid("id").primaryKey().defaultRandom();
}

/** An instant in UTC to the millisecond: a JavaScript Date survives the round trip exactly. */
export function instant(name: string) {
  return timestamp(name, { withTimezone: true, precision: 3, mode: "date" });
}
