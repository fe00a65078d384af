import { sql } from "drizzle-orm";
import {
  bigint,
  doublePrecision,
  index,
  integer,
  jsonb,
  pgTable,
  text,
  uniqueIndex,
  uuid,
} from "drizzle-orm/pg-core";
import { identifier, instant } from "../columns";
import { authorities } from "./authorities";

/** An object to be nudged. Body figures are estimates: the band goes with them. */
export const fragments = pgTable(
  "fragments",
  {
    id: identifier(),
    name: text("name").notNull(),
    /** Up to nine digits, or null for a fragment that only we number. */
    catalogNumber: bigint("catalog_number", { mode: "number" }),
    localNumber: text("local_number"),
    massKg: doublePrecision("mass_kg").notNull(),
    areaM2: doublePrecision("area_m2").notNull(),
    material: text("material").notNull(),
    shape: text("shape").notNull(),
    couplingNPerW: doublePrecision("coupling_n_per_w"),
    spinRateHz: doublePrecision("spin_rate_hz"),
    /** Where mass, area, material and shape come from; "assumed at import" until somebody enters better. */
    bodySource: text("body_source").notNull(),
    createdAt: instant("created_at").notNull().defaultNow(),
    version: integer("version").notNull().default(1),
  },
  (t) => [uniqueIndex("fragments_catalog_number_key").on(t.catalogNumber)],
);

/** An object that no beam may come near. */
export const protectedObjects = pgTable(
  "protected_objects",
  {
    id: identifier(),
    name: text("name").notNull(),
    catalogNumber: bigint("catalog_number", { mode: "number" }).notNull(),
    /** crewed, payload, optical payload, own */
    class: text("class").notNull(),
    /** Keep-out half-angle; null takes the class's. */
    halfAngleDeg: doublePrecision("half_angle_deg"),
    ownerAuthorityId: uuid("owner_authority_id").references(() => authorities.id),
    createdAt: instant("created_at").notNull().defaultNow(),
    version: integer("version").notNull().default(1),
  },
  (t) => [uniqueIndex("protected_objects_catalog_number_key").on(t.catalogNumber)],
);

/** One uploaded or pasted text, kept whole in its sets; the report names what was refused. */
export const elementImports = pgTable("element_imports", {
  id: identifier(),
  source: text("source").notNull(),
  importedBy: uuid("imported_by"),
  importedAt: instant("imported_at").notNull().defaultNow(),
  acceptedCount: integer("accepted_count").notNull(),
  rejected: jsonb("rejected").$type<{ line: number; column: number; message: string }[]>().notNull(),
  duplicateCount: integer("duplicate_count").notNull(),
  olderCount: integer("older_count").notNull(),
});

/** One element set of one object, kept for ever with its raw text. */
export const elementSets = pgTable(
  "element_sets",
  {
    id: identifier(),
    fragmentId: uuid("fragment_id").references(() => fragments.id),
    protectedObjectId: uuid("protected_object_id").references(() => protectedObjects.id),
    importId: uuid("import_id").references(() => elementImports.id),
    catalogNumber: bigint("catalog_number", { mode: "number" }).notNull(),
    objectName: text("object_name"),
    objectId: text("object_id"),
    /** Epoch for ordering; the exact value with microseconds is epochMs. */
    epochAt: instant("epoch_at").notNull(),
    epochMs: doublePrecision("epoch_ms").notNull(),
    meanMotionRevPerDay: doublePrecision("mean_motion_rev_per_day").notNull(),
    eccentricity: doublePrecision("eccentricity").notNull(),
    inclinationDeg: doublePrecision("inclination_deg").notNull(),
    raanDeg: doublePrecision("raan_deg").notNull(),
    argPericenterDeg: doublePrecision("arg_pericenter_deg").notNull(),
    meanAnomalyDeg: doublePrecision("mean_anomaly_deg").notNull(),
    bstar: doublePrecision("bstar").notNull(),
    meanMotionDot: doublePrecision("mean_motion_dot").notNull(),
    meanMotionDdot: doublePrecision("mean_motion_ddot").notNull(),
    format: text("format").notNull(),
    raw: text("raw").notNull(),
    source: text("source").notNull(),
    importedAt: instant("imported_at").notNull().defaultNow(),
  },
  (t) => [
    index("element_sets_fragment_epoch").on(t.fragmentId, t.epochAt.desc()),
    index("element_sets_protected_epoch").on(t.protectedObjectId, t.epochAt.desc()),
    // The same set of the same object is stored once.
    uniqueIndex("element_sets_fragment_once")
      .on(t.fragmentId, t.epochMs, t.meanMotionRevPerDay, t.meanAnomalyDeg)
      .where(sql`fragment_id is not null`),
    uniqueIndex("element_sets_protected_once")
      .on(t.protectedObjectId, t.epochMs, t.meanMotionRevPerDay, t.meanAnomalyDeg)
      .where(sql`protected_object_id is not null`),
  ],
);
