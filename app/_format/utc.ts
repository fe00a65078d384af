const ISO_LENGTH = "2031-04-06T03:12:45.000Z".length;

/** Unix milliseconds of an instant given as a number or as ISO 8601; NaN when it is neither. */
export function instantMs(at: number | string): number {
  return typeof at === "number" ? at : Date.parse(at);
}

/** `2031-04-06 03:12:45Z`. */
export function utcText(at: number | string): string {
  const iso = isoOf(at);
  return iso ? `${iso.slice(0, 10)} ${iso.slice(11, 19)}Z` : "no time";
}

/** `03:12:45Z`. */
export function utcTimeOfDay(at: number | string): string {
  const iso = isoOf(at);
  return iso ? `${iso.slice(11, 19)}Z` : "no time";
}

/** `06 Apr 03:12:45Z`: for lists, where the year goes without saying. */
export function utcShort(at: number | string): string {
  const iso = isoOf(at);
  if (!iso) return "no time";
  const month = "Jan Feb Mar Apr May Jun Jul Aug Sep Oct Nov Dec".split(" ")[Number(iso.slice(5, 7)) - 1];
  return `${iso.slice(8, 10)} ${month} ${iso.slice(11, 19)}Z`;
}

/** `04:12 in Atlantic/Madeira`'s first part: the wall clock of a zone, or null for an unknown zone. */
export function zoneTime(at: number | string, timeZone: string): string | null {
  try {
    return new Intl.DateTimeFormat("en-GB", {
      timeZone,
      weekday: "short",
      hour: "2-digit",
      minute: "2-digit",
      hourCycle: "h23",
    }).format(instantMs(at));
  } catch {
    return null; // RangeError: a zone or a time that is none
  }
}

/** Day of the year in UTC, 1 to 366. */
export function dayOfYear(atMs: number): number {
  const at = new Date(atMs);
  return Math.floor((atMs - Date.UTC(at.getUTCFullYear(), 0, 1)) / 86_400_000) + 1;
}

function isoOf(at: number | string): string | null {
  const ms = instantMs(at);
  if (!Number.isFinite(ms) || Math.abs(ms) > 8.64e15) return null;
  const iso = new Date(ms).toISOString();
  return iso.length === ISO_LENGTH ? iso : null; // years beyond 9999 have no place on this desk
}
