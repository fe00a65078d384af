/** The last time a date can have, ms; beyond it there is no ISO form. */
const MAX_DATE_MS = 8.64e15;

const ISO_FORM = /^(\d{4})-(\d{2})-(\d{2})T(\d{2}):(\d{2}):(\d{2})(?:\.(\d{1,6}))?Z$/;

function dateOf(atMs: number): Date {
  if (!Number.isFinite(atMs) || Math.abs(atMs) > MAX_DATE_MS) throw new RangeError(`${atMs} is no time.`);
  return new Date(Math.floor(atMs));
}

/** A UTC time for people, "2031-04-06 03:12:45Z": whole seconds, cut, not rounded. Throws a RangeError for no time. */
export function formatUtc(atMs: number): string {
  return `${dateOf(atMs).toISOString().slice(0, -5).replace("T", " ")}Z`;
}

/** A UTC time for the wire, "2031-04-06T03:12:45.000Z": milliseconds, cut, not rounded. Throws a RangeError for no time. */
export function formatIso(atMs: number): string {
  return dateOf(atMs).toISOString();
}

/**
 * Unix milliseconds of an ISO 8601 time in UTC with capital T and Z, seconds and up
 * to six decimals of them; decimals past the third come back as a fraction. Null for
 * every other form, other zones, dates that do not exist, hour 24 and leap seconds.
 */
export function parseIso(text: string): number | null {
  const found = ISO_FORM.exec(text);
  if (!found) return null;
  const [year = 0, month = 0, day = 0, hour = 0, minute = 0, second = 0] = found.slice(1, 7).map(Number);
  if (hour > 23 || minute > 59 || second > 59) return null;
  // The setter, because Date.UTC takes the years 0 to 99 for 1900 to 1999.
  const date = new Date(0);
  date.setUTCFullYear(year, month - 1, day);
  if (date.getUTCFullYear() !== year || date.getUTCMonth() !== month - 1 || date.getUTCDate() !== day)
    return null;
  const microseconds = Number((found[7] ?? "").padEnd(6, "0"));
  return date.getTime() + ((hour * 60 + minute) * 60 + second) * 1000 + microseconds / 1000;
}
