/** A half-open stretch of time [fromMs, toMs) in Unix milliseconds. */
export interface Interval {
  readonly fromMs: number;
  readonly toMs: number;
}

/** True when the two half-open intervals share any time. */
export function overlaps(a: Interval, b: Interval): boolean {
  return a.fromMs < b.toMs && b.fromMs < a.toMs;
}

/** True when `inner` lies wholly within `outer`. */
export function contains(outer: Interval, inner: Interval): boolean {
  return outer.fromMs <= inner.fromMs && inner.toMs <= outer.toMs;
}

/** The shared part of two intervals, or null when they do not overlap. */
export function intersect(a: Interval, b: Interval): Interval | null {
  const fromMs = Math.max(a.fromMs, b.fromMs);
  const toMs = Math.min(a.toMs, b.toMs);
  return fromMs < toMs ? { fromMs, toMs } : null;
}

/** Union of any intervals as a sorted list without overlaps; touching ones are joined. */
export function merge(intervals: readonly Interval[]): Interval[] {
  const sorted = intervals.filter((i) => i.toMs > i.fromMs).sort((a, b) => a.fromMs - b.fromMs);
  const merged: Interval[] = [];
  for (const next of sorted) {
    const last = merged.at(-1);
    if (last && next.fromMs <= last.toMs) {
      merged[merged.length - 1] = { fromMs: last.fromMs, toMs: Math.max(last.toMs, next.toMs) };
    } else {
      merged.push({ fromMs: next.fromMs, toMs: next.toMs });
    }
  }
  return merged;
}

/** What is left of `whole` after all `cuts`, in time order. */
export function subtract(whole: Interval, cuts: readonly Interval[]): Interval[] {
  const rest: Interval[] = [];
  let cursor = whole.fromMs;
  for (const cut of merge(cuts)) {
    if (cut.toMs <= cursor || cut.fromMs >= whole.toMs) continue;
    if (cut.fromMs > cursor) rest.push({ fromMs: cursor, toMs: cut.fromMs });
    cursor = Math.max(cursor, cut.toMs);
  }
  if (cursor < whole.toMs) rest.push({ fromMs: cursor, toMs: whole.toMs });
  return rest;
}

/** The interval rounded inward to whole seconds, or null when nothing is left. */
export function roundInwardToSeconds(i: Interval): Interval | null {
  const fromMs = Math.ceil(i.fromMs / 1000) * 1000;
  const toMs = Math.floor(i.toMs / 1000) * 1000;
  return fromMs < toMs ? { fromMs, toMs } : null;
}
