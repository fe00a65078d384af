import { composeCalendar } from "@/lib/formats/icalendar";
import { composeText } from "./compose-text";
import { engagementLabel, type Letter } from "./letter";
import type { NoticeFacts, NoticeKind } from "./notice-facts";
import { placeWords } from "./words";

type Method = "REQUEST" | "CANCEL" | "PUBLISH";

const METHODS: Readonly<Record<NoticeKind, Method>> = {
  request: "REQUEST",
  "revised request": "REQUEST",
  cancellation: "CANCEL",
  // Nothing is asked any more: an entry for information.
  completion: "PUBLISH",
};

/** One identifier for the whole life of an engagement, whatever address the product runs under. */
export function calendarUid(engagementId: string): string {
  return `${engagementId}@dwellbook.invalid`;
}

/** The notice's iCalendar part: the same UID for all notices of an engagement, a rising SEQUENCE. */
export function composeEntry(
  facts: NoticeFacts,
  letter: Letter,
  organizer: { readonly name: string; readonly email: string },
  nowMs: number,
): { method: Method; body: string } {
  const method = METHODS[facts.kind];
  const { name, email } = facts.authority;
  const body = composeCalendar({
    method,
    uid: calendarUid(facts.engagementId),
    sequence: facts.sequence,
    stampMs: nowMs,
    startMs: facts.dwellFromMs,
    endMs: facts.dwellToMs,
    status: method === "CANCEL" ? "CANCELLED" : method === "REQUEST" ? "TENTATIVE" : "CONFIRMED",
    summary: `${engagementLabel(facts.engagementNumber)}: laser dwell at ${facts.station.name}`,
    description: composeText(letter),
    location: `${facts.station.name}, ${placeWords(facts.station)}`,
    organizer,
    attendee: method === "PUBLISH" ? null : { name, email },
    url: facts.link ?? facts.engagementUrl,
  });
  return { method, body };
}
