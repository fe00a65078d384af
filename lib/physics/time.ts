/** Milliseconds in a UTC day (leap seconds are not counted by Unix time). */
export const DAY_MS = 86_400_000;

/** Unix time of 2000-01-01 12:00 (J2000.0) in milliseconds. */
const J2000_MS = 946_728_000_000;

/** UTC days since 2000-01-01 12:00; keeps microseconds, unlike a whole Julian date. */
export function daysSinceJ2000(atMs: number): number {
  return (atMs - J2000_MS) / DAY_MS;
}

/** Julian centuries since J2000.0 on the same clock as the argument. */
export function centuriesSinceJ2000(atMs: number): number {
  return daysSinceJ2000(atMs) / 36525;
}

/** Unix milliseconds of a Julian date; good to about 0.04 ms, the resolution of such a number. */
export function msFromJulianDate(julianDate: number): number {
  return (julianDate - 2451545) * DAY_MS + J2000_MS;
}

/**
 * ISO form with Z and milliseconds for sentences; a number that is no date gives "an impossible time"
 * instead of throwing, since sentences are built while something already went wrong.
 */
export function isoTime(atMs: number): string {
  return Number.isFinite(atMs) && Math.abs(atMs) <= 8.64e15
    ? new Date(atMs).toISOString()
    : "an impossible time";
}
