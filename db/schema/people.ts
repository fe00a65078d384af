import { boolean, index, integer, pgTable, text, uniqueIndex, uuid } from "drizzle-orm/pg-core";
import { identifier, instant } from "../columns";
import { authorities } from "./authorities";

/** Everyone who can sign in. Role and session version are read on every request. */
export const people = pgTable(
  "people",
  {
    id: identifier(),
    name: text("name").notNull(),
    /** Kept in lower case: see the check constraint. */
    email: text("email").notNull(),
    passwordHash: text("password_hash").notNull(),
    /** planner, operator, coordinator or administrator */
    role: text("role").notNull(),
    isSafetyOfficer: boolean("is_safety_officer").notNull().default(false),
    /** The authority a coordinator answers for. */
    authorityId: uuid("authority_id").references(() => authorities.id),
    /** Raised to end all of the person's sessions at once. */
    sessionVersion: integer("session_version").notNull().default(1),
    active: boolean("active").notNull().default(true),
    /** Hash of the secret in the person's calendar address; null while there is none. */
    calendarSecretHash: text("calendar_secret_hash"),
    createdAt: instant("created_at").notNull().defaultNow(),
  },
  (t) => [
    uniqueIndex("people_email_key").on(t.email),
    uniqueIndex("people_calendar_secret_key").on(t.calendarSecretHash),
  ],
);

/** Personal access tokens; only the hash is kept. */
export const accessTokens = pgTable(
  "access_tokens",
  {
    id: identifier(),
    personId: uuid("person_id")
      .notNull()
      .references(() => people.id),
    label: text("label").notNull(),
    tokenHash: text("token_hash").notNull(),
    createdAt: instant("created_at").notNull().defaultNow(),
    lastUsedAt: instant("last_used_at"),
    revokedAt: instant("revoked_at"),
  },
  (t) => [
    uniqueIndex("access_tokens_hash_key").on(t.tokenHash),
    index("access_tokens_person").on(t.personId),
  ],
);
