export interface Span {
  readonly fromMs: number;
  readonly toMs: number;
}

/** A start of the dwell on whole seconds, inside the pass and at least a second before the dwell's end. */
export function clampStart(ms: number, dwell: Span, pass: Span): number {
  const earliest = Math.ceil(pass.fromMs / 1000) * 1000;
  return Math.min(Math.max(wholeSecond(ms), earliest), dwell.toMs - 1000);
}

/** An end of the dwell on whole seconds, inside the pass and at least a second after the dwell's start. */
export function clampEnd(ms: number, dwell: Span, pass: Span): number {
  const latest = Math.floor(pass.toMs / 1000) * 1000;
  return Math.max(Math.min(wholeSecond(ms), latest), dwell.fromMs + 1000);
}

/** The dwell moved as a whole, its length kept, stopped at the edges of the pass. */
export function shiftDwell(dwell: Span, byMs: number, pass: Span): Span {
  const lengthMs = dwell.toMs - dwell.fromMs;
  const earliest = Math.ceil(pass.fromMs / 1000) * 1000;
  const latest = Math.floor(pass.toMs / 1000) * 1000 - lengthMs;
  const fromMs = Math.max(earliest, Math.min(wholeSecond(dwell.fromMs + byMs), latest));
  return { fromMs, toMs: fromMs + lengthMs };
}

/**
 * How far a key moves a handle, in seconds: arrows 1 s, with Shift or as page
 * keys 10 s; Home and End as far as it goes; null for every other key.
 */
export function keyStepS(key: string, shift: boolean): number | null {
  const step = shift ? 10 : 1;
  if (key === "ArrowRight" || key === "ArrowUp") return step;
  if (key === "ArrowLeft" || key === "ArrowDown") return -step;
  if (key === "PageUp") return 10;
  if (key === "PageDown") return -10;
  if (key === "End") return Number.POSITIVE_INFINITY;
  if (key === "Home") return Number.NEGATIVE_INFINITY;
  return null;
}

/** A typed time of day as an instant inside the pass; a pass over midnight may mean the next day. */
export function readTime(text: string, pass: Span): number | null {
  const match = /^\s*([01]?\d|2[0-3]):?([0-5]\d):?([0-5]\d)\s*Z?\s*$/i.exec(text);
  if (!match) return null;
  const ofDayMs = ((Number(match[1]) * 60 + Number(match[2])) * 60 + Number(match[3])) * 1000;
  const midnightMs = Math.floor(pass.fromMs / 86_400_000) * 86_400_000;
  for (const dayMs of [midnightMs, midnightMs + 86_400_000]) {
    const atMs = dayMs + ofDayMs;
    if (atMs >= pass.fromMs - 1000 && atMs <= pass.toMs + 1000) return atMs;
  }
  return null;
}

const wholeSecond = (ms: number): number => Math.round(ms / 1000) * 1000;
