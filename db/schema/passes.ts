import { boolean, doublePrecision, index, integer, jsonb, pgTable, text, uuid } from "drizzle-orm/pg-core";
import type { StoredPlan } from "@/lib/planning/stored-plan";
import { identifier, instant } from "../columns";
import { elementSets, fragments, protectedObjects } from "./objects";
import { laserSettings, stations } from "./stations";

/** One sweep of fragments over all stations for a span of days. */
export const sweeps = pgTable("sweeps", {
  id: identifier(),
  fromAt: instant("from_at").notNull(),
  toAt: instant("to_at").notNull(),
  /** running, done, cancelled */
  state: text("state").notNull(),
  reason: text("reason").notNull(),
  requestedBy: uuid("requested_by"),
  startedAt: instant("started_at").notNull().defaultNow(),
  finishedAt: instant("finished_at"),
});

/** A part of a sweep: a few fragments. Doing it twice gives the same rows. */
export const sweepChunks = pgTable(
  "sweep_chunks",
  {
    id: identifier(),
    sweepId: uuid("sweep_id")
      .notNull()
      .references(() => sweeps.id, { onDelete: "cascade" }),
    fragmentIds: jsonb("fragment_ids").$type<string[]>().notNull(),
    /** waiting, done, failed */
    state: text("state").notNull().default("waiting"),
    passCount: integer("pass_count"),
    /** One sentence per object that could not be propagated. */
    failures: jsonb("failures").$type<{ fragmentId: string; message: string }[]>().notNull().default([]),
    workerPool: text("worker_pool"),
    finishedAt: instant("finished_at"),
  },
  (t) => [index("sweep_chunks_sweep").on(t.sweepId)],
);

/** Rise, culmination and set of one fragment over one station. */
export const passes = pgTable(
  "passes",
  {
    id: identifier(),
    stationId: uuid("station_id")
      .notNull()
      .references(() => stations.id),
    fragmentId: uuid("fragment_id")
      .notNull()
      .references(() => fragments.id),
    elementSetId: uuid("element_set_id")
      .notNull()
      .references(() => elementSets.id),
    laserSettingId: uuid("laser_setting_id")
      .notNull()
      .references(() => laserSettings.id),
    riseAt: instant("rise_at").notNull(),
    culminateAt: instant("culminate_at").notNull(),
    setAt: instant("set_at").notNull(),
    maxElevationDeg: doublePrecision("max_elevation_deg").notNull(),
    riseAzimuthDeg: doublePrecision("rise_azimuth_deg").notNull(),
    culminationAzimuthDeg: doublePrecision("culmination_azimuth_deg").notNull(),
    setAzimuthDeg: doublePrecision("set_azimuth_deg").notNull(),
    minRangeKm: doublePrecision("min_range_km").notNull(),
    underWayAtFrom: boolean("under_way_at_from").notNull(),
    underWayAtTo: boolean("under_way_at_to").notNull(),
    /** A later element set no longer shows this pass; kept for an engagement that holds it. */
    vanishedAt: instant("vanished_at"),
    plan: jsonb("plan").$type<StoredPlan>(),
    /** When the whole protected catalogue was last screened against this pass; null: not checked. */
    screenedAt: instant("screened_at"),
    /** Which protected objects had no usable element set then, by id; they read "not checked". */
    screeningGaps: jsonb("screening_gaps").$type<string[]>().notNull().default([]),
    computedAt: instant("computed_at").notNull().defaultNow(),
  },
  (t) => [
    index("passes_station_rise").on(t.stationId, t.riseAt),
    index("passes_fragment_culmination").on(t.fragmentId, t.stationId, t.culminateAt),
    index("passes_rise").on(t.riseAt),
  ],
);

/** Stretches of a pass in which the beam comes too near a protected object. */
export const beamCrossings = pgTable(
  "beam_crossings",
  {
    id: identifier(),
    passId: uuid("pass_id")
      .notNull()
      .references(() => passes.id, { onDelete: "cascade" }),
    protectedObjectId: uuid("protected_object_id")
      .notNull()
      .references(() => protectedObjects.id),
    elementSetId: uuid("element_set_id")
      .notNull()
      .references(() => elementSets.id),
    fromAt: instant("from_at").notNull(),
    toAt: instant("to_at").notNull(),
    minSeparationDeg: doublePrecision("min_separation_deg").notNull(),
    /** Half-angle of the class, and what the age of both element sets added to it. */
    halfAngleDeg: doublePrecision("half_angle_deg").notNull(),
    addedDeg: doublePrecision("added_deg").notNull(),
    timingGuardS: doublePrecision("timing_guard_s").notNull(),
  },
  (t) => [index("beam_crossings_pass").on(t.passId)],
);
