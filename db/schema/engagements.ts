import {
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
import { elementSets, fragments } from "./objects";
import { passes } from "./passes";
import { people } from "./people";
import { laserSettings, stations } from "./stations";

/** What was predicted when the dwell was booked; figures of the time, with their versions. */
export interface StoredEffect {
  readonly aim: string;
  readonly pulses: number;
  readonly energyJ: number;
  readonly deltaV: {
    readonly radialMPerS: number;
    readonly transverseMPerS: number;
    readonly normalMPerS: number;
  };
  readonly semiMajorAxisBeforeKm: number;
  readonly semiMajorAxisAfterKm: { readonly p10: number; readonly p50: number; readonly p90: number };
  readonly perigeeBeforeKm: number;
  readonly perigeeAfterKm: { readonly p10: number; readonly p50: number; readonly p90: number };
}

/** A booked dwell. The database holds legal states, legal transitions and no overlap. */
export const engagements = pgTable(
  "engagements",
  {
    id: identifier(),
    /** Short number for people: E-1042. */
    number: integer("number").notNull().generatedByDefaultAsIdentity({ startWith: 1001 }),
    passId: uuid("pass_id")
      .notNull()
      .references(() => passes.id),
    fragmentId: uuid("fragment_id")
      .notNull()
      .references(() => fragments.id),
    stationId: uuid("station_id")
      .notNull()
      .references(() => stations.id),
    laserSettingId: uuid("laser_setting_id")
      .notNull()
      .references(() => laserSettings.id),
    elementSetId: uuid("element_set_id")
      .notNull()
      .references(() => elementSets.id),
    dwellFrom: instant("dwell_from").notNull(),
    dwellTo: instant("dwell_to").notNull(),
    /** Dwell with slew before and cool-down after; written by a trigger from the station. */
    holdFrom: instant("hold_from").notNull(),
    holdUntil: instant("hold_until").notNull(),
    /** proposed, cleared, confirmed, fired, scrubbed, lapsed */
    state: text("state").notNull(),
    plannerId: uuid("planner_id")
      .notNull()
      .references(() => people.id),
    effect: jsonb("effect").$type<StoredEffect>().notNull(),
    /** Raised by every change; writers name the version they saw. */
    version: integer("version").notNull().default(1),
    /** iCalendar SEQUENCE of the last notice round. */
    calendarSequence: integer("calendar_sequence").notNull().default(0),
    endReason: text("end_reason"),
    endedAt: instant("ended_at"),
    createdAt: instant("created_at").notNull().defaultNow(),
    updatedAt: instant("updated_at").notNull().defaultNow(),
  },
  (t) => [
    uniqueIndex("engagements_number_key").on(t.number),
    index("engagements_station_dwell").on(t.stationId, t.dwellFrom),
    index("engagements_fragment_dwell").on(t.fragmentId, t.dwellFrom),
    index("engagements_state_dwell").on(t.state, t.dwellFrom),
    index("engagements_pass").on(t.passId),
  ],
);

/** Values a person captured at confirmation. */
export interface Checklist {
  readonly airUnitCalledAt: string;
  readonly spotterInPlace: true;
  readonly interlockTestedAt: string;
  readonly clockOffsetMs: number;
  readonly weather: string;
  readonly crewedListCheckedAt: string;
}

/** One of the two names that a confirmation needs. */
export const confirmations = pgTable(
  "confirmations",
  {
    id: identifier(),
    engagementId: uuid("engagement_id")
      .notNull()
      .references(() => engagements.id),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    /** operator, safety officer */
    capacity: text("capacity").notNull(),
    checklist: jsonb("checklist").$type<Checklist>().notNull(),
    confirmedAt: instant("confirmed_at").notNull().defaultNow(),
    /** Set when the engagement went back to proposed or cleared afterwards. */
    voidedAt: instant("voided_at"),
  },
  (t) => [index("confirmations_engagement").on(t.engagementId)],
);

/** A person's word for something that no data showed: who, what value, when. */
export const attestations = pgTable(
  "attestations",
  {
    id: identifier(),
    engagementId: uuid("engagement_id")
      .notNull()
      .references(() => engagements.id),
    rule: text("rule").notNull(),
    statement: text("statement").notNull(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    attestedAt: instant("attested_at").notNull().defaultNow(),
    voidedAt: instant("voided_at"),
  },
  (t) => [index("attestations_engagement").on(t.engagementId)],
);

/** An interruption of the beam. */
export interface Interruption {
  readonly at: string;
  readonly cause: string;
  readonly secondsLost: number;
}

/** What was really fired. */
export const firingRecords = pgTable(
  "firing_records",
  {
    id: identifier(),
    engagementId: uuid("engagement_id")
      .notNull()
      .unique()
      .references(() => engagements.id),
    fragmentId: uuid("fragment_id")
      .notNull()
      .references(() => fragments.id),
    /** fired, in part, not fired */
    outcome: text("outcome").notNull(),
    openedAt: instant("opened_at"),
    closedAt: instant("closed_at"),
    pulses: integer("pulses").notNull(),
    deliveredEnergyJ: doublePrecision("delivered_energy_j").notNull(),
    interruptions: jsonb("interruptions").$type<Interruption[]>().notNull(),
    note: text("note"),
    recordedBy: uuid("recorded_by")
      .notNull()
      .references(() => people.id),
    recordedAt: instant("recorded_at").notNull().defaultNow(),
  },
  (t) => [index("firing_records_fragment").on(t.fragmentId, t.closedAt)],
);
