import ical, {
  ICalAttendeeRole,
  ICalAttendeeStatus,
  ICalCalendarMethod,
  type ICalEventData,
  ICalEventStatus,
} from "ical-generator";
import { checkAddress, checkUid, checkUrl, cleanName, cleanText } from "./calendar-text";

/** Somebody with a mail address. */
export interface CalendarPerson {
  readonly name: string;
  readonly email: string;
}

/** One entry of a calendar. Times are Unix milliseconds; the entry covers them in whole seconds. */
export interface CalendarEvent {
  /** The same for the life of the engagement. */
  readonly uid: string;
  /** Rises with every change and with the cancellation (RFC 5546, section 2.1.4). */
  readonly sequence: number;
  /** When this version was written. */
  readonly stampMs: number;
  readonly startMs: number;
  readonly endMs: number;
  readonly status: "TENTATIVE" | "CONFIRMED" | "CANCELLED";
  readonly summary: string;
  readonly description: string;
  readonly location: string;
  readonly organizer: CalendarPerson;
  readonly url: string;
}

/** One entry that is sent to somebody, with the method of RFC 5546. */
export interface CalendarMessage extends CalendarEvent {
  readonly method: "REQUEST" | "CANCEL" | "PUBLISH";
  /** Who is asked; a REQUEST needs one. */
  readonly attendee: CalendarPerson | null;
}

const PRODUCT = { company: "Dwellbook", product: "Engagement book", language: "EN" };

/**
 * One entry as iCalendar text (RFC 5545): UTC times, CR LF, lines of at most 75
 * octets. A REQUEST asks its attendee for an answer; a CANCEL must have the status
 * CANCELLED, the UID of its request and a higher sequence. Line breaks and control
 * characters in texts and names are made harmless. Throws a RangeError when the
 * entry has no duration, a REQUEST no attendee, a CANCEL another status, or when
 * UID, address, link or sequence has a form that iCalendar cannot carry.
 */
export function composeCalendar(message: CalendarMessage): string {
  const { method, attendee, status } = message;
  if (method === "REQUEST" && !attendee) throw new RangeError("A calendar request needs an attendee.");
  if (method === "CANCEL" && status !== "CANCELLED") {
    throw new RangeError("A cancelled calendar entry needs the status CANCELLED.");
  }
  const calendar = ical({ prodId: PRODUCT, method: ICalCalendarMethod[method] });
  const event = calendar.createEvent(eventData(message));
  if (attendee && method !== "PUBLISH") {
    const asked = method === "REQUEST" ? { rsvp: true, status: ICalAttendeeStatus.NEEDSACTION } : {};
    event.createAttendee({ ...person(attendee), role: ICalAttendeeRole.REQ, ...asked });
  }
  return `${calendar.toString()}\r\n`;
}

/**
 * Many entries as one published calendar, for subscription: no attendees, and a hint
 * to fetch it again every 15 minutes. Throws as `composeCalendar` does.
 */
export function composeFeed(name: string, events: readonly CalendarEvent[]): string {
  const calendar = ical({ prodId: PRODUCT, method: ICalCalendarMethod.PUBLISH, ttl: 15 * 60 });
  // The writer escapes no calendar name, so it is kept to characters that need no escape.
  calendar.name(cleanName(name).replace(/[,;]/g, " "));
  for (const event of events) calendar.createEvent(eventData(event));
  return `${calendar.toString()}\r\n`;
}

function eventData(event: CalendarEvent): ICalEventData {
  const { sequence, startMs, endMs } = event;
  if (!Number.isInteger(sequence) || sequence < 0 || sequence > 2_147_483_647) {
    throw new RangeError("The sequence of a calendar entry must be a whole number from 0 up.");
  }
  if (!(startMs < endMs)) throw new RangeError("A calendar entry must end after it begins.");
  return {
    id: checkUid(event.uid),
    sequence,
    stamp: wholeSecond(Math.floor(event.stampMs / 1000)),
    // Outward: an entry must never be shorter than the time that is booked.
    start: wholeSecond(Math.floor(startMs / 1000)),
    end: wholeSecond(Math.ceil(endMs / 1000)),
    status: ICalEventStatus[event.status],
    summary: cleanText(event.summary).replaceAll("\n", " "),
    description: cleanText(event.description),
    location: cleanText(event.location),
    organizer: person(event.organizer),
    url: checkUrl(event.url),
  };
}

function person({ name, email }: CalendarPerson): { name: string; email: string } {
  const address = checkAddress(email);
  return { name: cleanName(name) || address, email: address };
}

function wholeSecond(seconds: number): Date {
  const date = new Date(seconds * 1000);
  const year = date.getUTCFullYear();
  // Four digits of the year are all that RFC 5545 has.
  if (!(year >= 1970 && year <= 9999))
    throw new RangeError("A calendar entry needs times from 1970 to 9999.");
  return date;
}
