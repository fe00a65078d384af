import { bigserial, index, jsonb, pgTable, text, uuid } from "drizzle-orm/pg-core";
import { instant } from "../columns";

/** Append-only: who did what, when, why, with old and new values. */
export const ledger = pgTable(
  "ledger",
  {
    id: bigserial("id", { mode: "number" }).primaryKey(),
    at: instant("at").notNull().defaultNow(),
    actorId: uuid("actor_id"),
    actorName: text("actor_name").notNull(),
    /** screen, token, link, system */
    via: text("via").notNull(),
    /** A verb in the past tense: "proposed engagement" */
    action: text("action").notNull(),
    /** engagement, notice, person, element import, … */
    subjectKind: text("subject_kind").notNull(),
    subjectId: text("subject_id"),
    subjectLabel: text("subject_label").notNull(),
    reason: text("reason"),
    oldValues: jsonb("old_values").$type<Record<string, unknown>>(),
    newValues: jsonb("new_values").$type<Record<string, unknown>>(),
  },
  (t) => [index("ledger_subject").on(t.subjectKind, t.subjectId), index("ledger_at").on(t.at)],
);
