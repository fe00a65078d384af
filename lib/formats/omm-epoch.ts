import { daysInYear } from "./tle-epoch";

const CALENDAR = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2}):(\d{2})(?:\.(\d{1,6}))?Z?$/;
const DAY_OF_YEAR = /^(\d{4})-(\d{3})T(\d{2}):(\d{2}):(\d{2})(?:\.(\d{1,6}))?Z?$/;

const FIRST_YEAR = 1957;
const LAST_YEAR = 2199;

/** What an epoch may look like, as the end of a sentence. */
export const OMM_EPOCH_FORM = "a UTC time such as 2031-04-06T03:12:45.123456, from 1957 to 2199";

/**
 * Unix milliseconds of a CCSDS time in UTC, calendar form or day-of-year form, with
 * up to six decimals of the second, which are kept; "Z" may follow. Null for any
 * other form, for dates that do not exist, for leap seconds and for years outside
 * 1957 to 2199. Source of the two forms: CCSDS 301.0-B-4, section 3.5 (from memory).
 */
export function readOmmEpoch(text: string): number | null {
  const calendar = CALENDAR.exec(text);
  if (calendar) {
    const [year, month, day, hour, minute, second] = calendar.slice(1, 7).map(Number);
    const dayMs = dayOfCalendar(year ?? 0, month ?? 0, day ?? 0);
    return timeInDay(dayMs, hour, minute, second, calendar[7]);
  }
  const counted = DAY_OF_YEAR.exec(text);
  if (!counted) return null;
  const [year, day, hour, minute, second] = counted.slice(1, 6).map(Number);
  return timeInDay(dayOfYear(year ?? 0, day ?? 0), hour, minute, second, counted[6]);
}

function dayOfCalendar(year: number, month: number, day: number): number | null {
  if (year < FIRST_YEAR || year > LAST_YEAR) return null;
  const date = new Date(Date.UTC(year, month - 1, day));
  return date.getUTCMonth() === month - 1 && date.getUTCDate() === day ? date.getTime() : null;
}

function dayOfYear(year: number, day: number): number | null {
  if (year < FIRST_YEAR || year > LAST_YEAR || day < 1 || day > daysInYear(year)) return null;
  return Date.UTC(year, 0, day);
}

function timeInDay(dayMs: number | null, hour = 99, minute = 99, second = 99, decimals = ""): number | null {
  if (dayMs === null || hour > 23 || minute > 59 || second > 59) return null;
  const microseconds = Number(decimals.padEnd(6, "0"));
  return dayMs + ((hour * 60 + minute) * 60 + second) * 1000 + microseconds / 1000;
}

/** A CCSDS calendar time with six decimals and without "Z", as OMM readers expect it. Throws a RangeError outside 1957 to 2199. */
export function writeOmmEpoch(epochMs: number): string {
  // In two parts: a sum of microseconds since 1970 would need more digits than a double has left.
  let wholeMs = Math.floor(epochMs);
  let microseconds = Math.round((epochMs - wholeMs) * 1000);
  if (microseconds === 1000) {
    wholeMs += 1;
    microseconds = 0;
  }
  const year = new Date(wholeMs).getUTCFullYear();
  if (!(year >= FIRST_YEAR && year <= LAST_YEAR))
    throw new RangeError("An OMM epoch lies between 1957 and 2199.");
  return new Date(wholeMs).toISOString().slice(0, 23) + String(microseconds).padStart(3, "0");
}
