const DAY_MS = 86_400_000;

/** Days in a year of the Gregorian calendar. */
export function daysInYear(year: number): number {
  return (Date.UTC(year + 1, 0, 1) - Date.UTC(year, 0, 1)) / DAY_MS;
}

/** The full year of a TLE's two digits: 57 to 99 are 1957 to 1999, 00 to 56 are 2000 to 2056. */
export function fullYear(twoDigits: number): number {
  return twoDigits < 57 ? 2000 + twoDigits : 1900 + twoDigits;
}

/**
 * Unix milliseconds of a TLE epoch field "YYDDD.DDDDDDDD" (14 columns), exact to
 * the microsecond: one unit of the eighth decimal is 864 µs. Null when the form is
 * wrong or the day is not in the year (1 to 365, 366 in a leap year).
 */
export function readTleEpoch(field: string): number | null {
  const found = /^(\d{2})(\d{3})\.(\d{8})$/.exec(field);
  if (!found) return null;
  const year = fullYear(Number(found[1]));
  const day = Number(found[2]);
  if (day < 1 || day > daysInYear(year)) return null;
  return Date.UTC(year, 0, day) + (Number(found[3]) * 864) / 1000;
}

/**
 * A TLE epoch field for Unix milliseconds, rounded to its eighth decimal (0.864 ms).
 * Throws a RangeError outside 1957 to 2056, which two digits cannot name.
 */
export function writeTleEpoch(epochMs: number): string {
  const units = Math.round((epochMs * 1000) / 864);
  const dayStartMs = Math.floor(units / 1e8) * DAY_MS;
  const year = new Date(dayStartMs).getUTCFullYear();
  if (!(year >= 1957 && year <= 2056)) throw new RangeError("A TLE epoch lies between 1957 and 2056.");
  const day = (dayStartMs - Date.UTC(year, 0, 1)) / DAY_MS + 1;
  const fraction = units - Math.floor(units / 1e8) * 1e8;
  const two = String(year % 100).padStart(2, "0");
  return `${two}${String(day).padStart(3, "0")}.${String(fraction).padStart(8, "0")}`;
}
