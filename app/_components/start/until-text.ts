/** How far off an instant is, in words: `in 42 min`, `in 3 h 05 min`, `now`, `12 min ago`. */
export function untilText(leftMs: number): string {
  const minutes = Math.round(Math.abs(leftMs) / 60_000);
  if (minutes === 0) return "now";
  const words = minutesText(minutes);
  return leftMs > 0 ? `in ${words}` : `${words} ago`;
}

/** Whole minutes as `42 min`, `3 h 05 min` or `2 d 4 h`. */
export function minutesText(minutes: number): string {
  if (minutes < 60) return `${minutes} min`;
  const hours = Math.floor(minutes / 60);
  if (hours < 48) return `${hours} h ${String(minutes % 60).padStart(2, "0")} min`;
  return `${Math.floor(hours / 24)} d ${hours % 24} h`;
}
