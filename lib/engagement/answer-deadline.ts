/**
 * When an authority's answer is needed (Unix ms): by its own deadline for
 * changes, so that there is still time to act on it; but the authority always
 * has at least half of the time that is left before the dwell.
 */
export function answerByMs(nowMs: number, dwellFromMs: number, changeDeadlineMin: number): number {
  const byDeadlineMs = dwellFromMs - changeDeadlineMin * 60_000;
  const halfwayMs = nowMs + (dwellFromMs - nowMs) / 2;
  return Math.floor(Math.max(byDeadlineMs, halfwayMs) / 1000) * 1000;
}
