import { boolean, index, integer, jsonb, pgTable, primaryKey, text, uuid } from "drizzle-orm/pg-core";
import { identifier, instant } from "../columns";
import { stations } from "./stations";

/** Who must be asked or told: lead times are settings of each, never constants. */
export const authorities = pgTable("authorities", {
  id: identifier(),
  name: text("name").notNull(),
  /** air unit, satellite owner, clearing authority, consenting State */
  kind: text("kind").notNull(),
  email: text("email").notNull(),
  phone: text("phone").notNull(),
  outOfHoursPhone: text("out_of_hours_phone"),
  /** Duty hours in words, in the authority's own zone. */
  dutyHours: text("duty_hours").notNull(),
  timeZone: text("time_zone").notNull(),
  /** The request must go out at least this long before the dwell. */
  leadTimeMin: integer("lead_time_min").notNull(),
  /** A change of an engagement nearer than this to its dwell is refused: it is scrubbed instead. */
  changeDeadlineMin: integer("change_deadline_min").notNull(),
  version: integer("version").notNull().default(1),
});

/** Which authorities are concerned by every engagement of a station. */
export const stationAuthorities = pgTable(
  "station_authorities",
  {
    stationId: uuid("station_id")
      .notNull()
      .references(() => stations.id),
    authorityId: uuid("authority_id")
      .notNull()
      .references(() => authorities.id),
  },
  (t) => [primaryKey({ columns: [t.stationId, t.authorityId] })],
);

/** An airspace volume with times and vertical limits. */
export const airspaceVolumes = pgTable("airspace_volumes", {
  id: identifier(),
  name: text("name").notNull(),
  authorityId: uuid("authority_id").references(() => authorities.id),
  /** Ring of [longitudeDeg, latitudeDeg], closed (first equals last), WGS-84. */
  ring: jsonb("ring").$type<[number, number][]>().notNull(),
  /** Limits as published (FL 245, 3000 ft AMSL, SFC) and in metres above the ellipsoid for the geometry. */
  floorText: text("floor_text").notNull(),
  ceilingText: text("ceiling_text").notNull(),
  floorM: integer("floor_m").notNull(),
  ceilingM: integer("ceiling_m").notNull(),
  /** Spans in which the volume is active; an empty list means that nobody told us: not checked. */
  activeSpans: jsonb("active_spans").$type<{ from: string; to: string }[]>().notNull(),
  /** The schedule is known up to here; later is not checked. */
  scheduleKnownUntil: instant("schedule_known_until").notNull(),
  /** true: the authority may lift it by answering no objection (pending); false: closed. */
  liftable: boolean("liftable").notNull(),
  source: text("source").notNull(),
  version: integer("version").notNull().default(1),
});

/** Answers and conditions of authorities to notices. */
export const answers = pgTable(
  "answers",
  {
    id: identifier(),
    noticeId: uuid("notice_id").notNull(),
    engagementId: uuid("engagement_id").notNull(),
    authorityId: uuid("authority_id")
      .notNull()
      .references(() => authorities.id),
    /** no objection, no objection with conditions, objection */
    outcome: text("outcome").notNull(),
    conditions: text("conditions"),
    reasons: text("reasons"),
    answeredByName: text("answered_by_name").notNull(),
    answeredByPersonId: uuid("answered_by_person_id"),
    /** link (signed, without sign-in), desk (signed in) */
    via: text("via").notNull(),
    answeredAt: instant("answered_at").notNull().defaultNow(),
    /** Set when a later change or a newer answer makes it void. */
    voidedAt: instant("voided_at"),
    voidedBecause: text("voided_because"),
  },
  (t) => [index("answers_engagement").on(t.engagementId), index("answers_notice").on(t.noticeId)],
);
