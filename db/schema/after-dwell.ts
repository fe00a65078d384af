import { boolean, doublePrecision, index, integer, jsonb, pgTable, text, uuid } from "drizzle-orm/pg-core";
import { identifier, instant } from "../columns";
import { engagements } from "./engagements";
import { elementSets, protectedObjects } from "./objects";

/** The days after one engagement's dwell, screened against the protected objects; the last run only. */
export const afterDwellScreenings = pgTable("after_dwell_screenings", {
  id: identifier(),
  engagementId: uuid("engagement_id")
    .notNull()
    .unique()
    .references(() => engagements.id),
  /** A new one for each run: chunks of a former run find that they are out of date. */
  run: uuid("run").notNull(),
  /** running, done, refused */
  state: text("state").notNull(),
  /** Why it was refused, in words. */
  reason: text("reason"),
  fromAt: instant("from_at").notNull(),
  toAt: instant("to_at").notNull(),
  thresholdKm: doublePrecision("threshold_km").notNull(),
  elementSetId: uuid("element_set_id")
    .notNull()
    .references(() => elementSets.id),
  checked: integer("checked").notNull().default(0),
  total: integer("total").notNull(),
  /** Names of protected objects that could not be looked at, as "name: why". */
  unseen: jsonb("unseen").$type<string[]>().notNull().default([]),
  updatedAt: instant("updated_at").notNull(),
});

/** A protected object nearer than the threshold after a dwell. */
export const afterDwellApproaches = pgTable(
  "after_dwell_approaches",
  {
    id: identifier(),
    screeningId: uuid("screening_id")
      .notNull()
      .references(() => afterDwellScreenings.id, { onDelete: "cascade" }),
    protectedObjectId: uuid("protected_object_id")
      .notNull()
      .references(() => protectedObjects.id),
    /** nudged, untouched */
    path: text("path").notNull(),
    at: instant("at").notNull(),
    missKm: doublePrecision("miss_km").notNull(),
    relativeSpeedKmPerS: doublePrecision("relative_speed_km_per_s").notNull(),
    /** Under the assumed covariance; null where it can't be said. */
    probability: doublePrecision("probability"),
    atEdge: boolean("at_edge").notNull(),
  },
  (t) => [index("after_dwell_approaches_screening").on(t.screeningId)],
);
