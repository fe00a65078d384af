/** `T−01:23:45` before an instant, `T+00:00:12` after it; days are counted in hours. */
export function countdownText(leftMs: number): string {
  const s = Math.floor(Math.abs(leftMs) / 1000);
  const part = (value: number): string => String(value).padStart(2, "0");
  const sign = leftMs >= 0 ? "\u2212" : "+";
  return `T${sign}${part(Math.floor(s / 3600))}:${part(Math.floor((s % 3600) / 60))}:${part(s % 60)}`;
}
