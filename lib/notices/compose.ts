import { composeEntry } from "./calendar-entry";
import { composeHtml } from "./compose-html";
import { composeText } from "./compose-text";
import { composeLetter } from "./letter";
import type { NoticeFacts } from "./notice-facts";

/** All parts of a notice as they will be sent and kept. */
export interface ComposedNotice {
  readonly subject: string;
  readonly textBody: string;
  readonly htmlBody: string;
  readonly calendarMethod: string;
  readonly calendarBody: string;
}

/** Composes text, HTML and calendar entry from one letter, so that they cannot disagree. */
export function composeNotice(
  facts: NoticeFacts,
  organizer: { readonly name: string; readonly email: string },
  nowMs: number,
): ComposedNotice {
  const letter = composeLetter(facts);
  const entry = composeEntry(facts, letter, organizer, nowMs);
  return {
    subject: letter.subject,
    textBody: composeText(letter),
    htmlBody: composeHtml(letter),
    calendarMethod: entry.method,
    calendarBody: entry.body,
  };
}
