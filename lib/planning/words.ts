import { isoTime } from "@/lib/physics/time";

/** "2031-04-06 03:12:45Z": a time as sentences show it, to the whole second. */
export function timeWords(atMs: number): string {
  const iso = isoTime(atMs);
  return iso.endsWith("Z") ? `${iso.slice(0, 10)} ${iso.slice(11, 19)}Z` : iso;
}

/** "2 d" from two days up, "9 h" from two hours up, else "35 min"; the sign is dropped. */
export function spanWords(spanMs: number): string {
  const minutes = Math.round(Math.abs(spanMs) / 60_000);
  if (minutes >= 2880) return `${trimmed(minutes / 1440, 1)} d`;
  if (minutes >= 120) return `${trimmed(minutes / 60, 0)} h`;
  return `${minutes} min`;
}

/** "1.9°"; small angles keep a second digit. */
export function degreeWords(deg: number): string {
  return `${trimmed(deg, Math.abs(deg) < 0.95 ? 2 : 1)}°`;
}

/** "06:00" from minutes of the day; 1440 is "24:00". */
export function clockWords(minuteOfDay: number): string {
  const hours = Math.floor(minuteOfDay / 60);
  return `${String(hours).padStart(2, "0")}:${String(minuteOfDay % 60).padStart(2, "0")}`;
}

/** A number with at most so many decimals, without trailing zeros. */
export function trimmed(value: number, decimals: number): string {
  return String(Number(value.toFixed(decimals)));
}
