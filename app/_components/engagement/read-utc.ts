const FORM = /^(\d{4}-\d\d-\d\d)[ T](\d\d:\d\d)(?::(\d\d)(\.\d{1,3})?)?\s*Z?$/i;

/**
 * A typed UTC time as ISO 8601 with milliseconds: `2031-04-06 03:12:45.120Z`, seconds and
 * their parts may be left out. Null when it can't be read or is no day of the calendar.
 */
export function readUtc(words: string): string | null {
  const parts = FORM.exec(words.trim());
  if (!parts) return null;
  const [, day = "", minutes = "", seconds = "00", fraction = ".000"] = parts;
  const ms = Date.parse(`${day}T${minutes}:${seconds}${fraction.padEnd(4, "0")}Z`);
  if (!Number.isFinite(ms)) return null;
  const iso = new Date(ms).toISOString();
  // A 31st of February would come back as another day.
  return iso.startsWith(day) ? iso : null;
}

/** An instant as it is typed: `2031-04-06 03:12:45Z`, with milliseconds where they are asked for. */
export function utcWords(atMs: number, milliseconds = false): string {
  const iso = new Date(atMs).toISOString();
  return `${iso.slice(0, 10)} ${iso.slice(11, milliseconds ? 23 : 19)}Z`;
}
