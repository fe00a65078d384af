import { index, integer, pgTable, text, uniqueIndex, uuid } from "drizzle-orm/pg-core";
import { identifier, instant } from "../columns";
import { authorities } from "./authorities";
import { engagements } from "./engagements";

/** What an authority is sent. The row is written with the change that made it; a job sends it. */
export const notices = pgTable(
  "notices",
  {
    id: identifier(),
    engagementId: uuid("engagement_id")
      .notNull()
      .references(() => engagements.id),
    authorityId: uuid("authority_id")
      .notNull()
      .references(() => authorities.id),
    /** request, revised request, cancellation, completion */
    kind: text("kind").notNull(),
    /** iCalendar SEQUENCE, rising for each engagement. */
    sequence: integer("sequence").notNull(),
    /** The same on every attempt, so that a repeat is recognised. */
    messageId: text("message_id").notNull(),
    toEmail: text("to_email").notNull(),
    subject: text("subject").notNull(),
    textBody: text("text_body").notNull(),
    htmlBody: text("html_body").notNull(),
    calendarMethod: text("calendar_method").notNull(),
    calendarBody: text("calendar_body").notNull(),
    /** An answer is needed by then; null when nothing is asked. */
    answerBy: instant("answer_by"),
    /** queued, sent, failed */
    delivery: text("delivery").notNull().default("queued"),
    attempts: integer("attempts").notNull().default(0),
    lastError: text("last_error"),
    createdAt: instant("created_at").notNull().defaultNow(),
    sentAt: instant("sent_at"),
    /** First time somebody opened the link. Opened is not answered. */
    openedAt: instant("opened_at"),
    /** Set when a later notice replaces it: its link no longer takes an answer. */
    supersededAt: instant("superseded_at"),
  },
  (t) => [
    uniqueIndex("notices_message_id_key").on(t.messageId),
    index("notices_engagement").on(t.engagementId),
    index("notices_authority").on(t.authorityId, t.createdAt),
  ],
);
