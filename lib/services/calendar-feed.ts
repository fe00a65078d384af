import { database } from "@/db/client";
import { personOfCalendar } from "@/db/queries/calendar";
import { type EngagementView, findEngagements } from "@/db/queries/engagements";
import { config } from "@/lib/config";
import type { Role } from "@/lib/contracts/common";
import { notFound } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { asState, type EngagementState, isLive } from "@/lib/engagement/states";
import { type CalendarEvent, composeFeed } from "@/lib/formats/icalendar";
import { calendarUid } from "@/lib/notices/calendar-entry";
import { engagementLabel } from "@/lib/notices/letter";
import { readMailbox } from "@/lib/notices/mail-names";
import { placeWords } from "@/lib/notices/words";
import { hashCalendarSecret } from "./calendar-link";
import { scopeOf } from "./list-engagements";

/** How far back the feed reaches: an ended engagement is shown as cancelled for a while, then leaves. */
const BACK_MS = 30 * 86_400_000;

/**
 * The subscription calendar behind a secret address: what its owner may read of the
 * book, by their role and authority of this moment. 404 for any other address.
 */
export async function calendarFeed(secret: string, nowMs: number): Promise<string> {
  const person = await personOfCalendar(database(), hashCalendarSecret(secret));
  if (person === null) throw notFound("calendar");
  const actor: Actor = { ...person, role: person.role as Role, isSafetyOfficer: false, via: "link" };
  const views = await findEngagements(database(), {
    fromMs: nowMs - BACK_MS,
    noticedAuthorityId: scopeOf(actor),
  });
  return composeFeed(`Dwellbook: ${person.name}`, views.map(eventOf));
}

function eventOf({ engagement, station, fragment, plannerName }: EngagementView): CalendarEvent {
  const state = asState(engagement.state);
  const label = engagementLabel(engagement.number);
  const reason = engagement.endReason === null ? [] : [`Reason: ${engagement.endReason}`];
  return {
    uid: calendarUid(engagement.id),
    sequence: engagement.calendarSequence,
    stampMs: engagement.updatedAt.getTime(),
    startMs: engagement.dwellFrom.getTime(),
    endMs: engagement.dwellTo.getTime(),
    status: statusOf(state),
    summary: `${label} ${state}: ${fragment.name} at ${station.name}`,
    description: [`Planner: ${plannerName}`, ...reason].join("\n"),
    location: `${station.name}, ${placeWords(station)}`,
    organizer: readMailbox(config().MAIL_FROM),
    url: new URL(`/engagements/${engagement.id}`, config().DWELLBOOK_BASE_URL).href,
  };
}

function statusOf(state: EngagementState): CalendarEvent["status"] {
  if (state === "confirmed" || state === "fired") return "CONFIRMED";
  return isLive(state) ? "TENTATIVE" : "CANCELLED";
}
