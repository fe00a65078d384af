import { type EarthFixedNode, earthFixedNode } from "../orbit/earth-fixed";
import type { Orbit } from "../orbit/propagate";
import { isoTime } from "../time";

/** Where propagation fails, its last good moment is searched to this. */
const FAILURE_RESOLUTION_MS = 1000;

/** The node at a time, or where propagation fails the last good one before, and a time that is bad. */
export function nodeOrLastGood(
  orbit: Orbit,
  node: EarthFixedNode,
  atMs: number,
): { end: EarthFixedNode; badMs: number | null } {
  const found = earthFixedNode(orbit, atMs);
  if (found) return { end: found, badMs: null };
  let end = node;
  let badMs = atMs;
  while (badMs - end.atMs > FAILURE_RESOLUTION_MS) {
    const middle = earthFixedNode(orbit, (end.atMs + badMs) / 2);
    if (middle) end = middle;
    else badMs = (end.atMs + badMs) / 2;
  }
  return { end, badMs };
}

/** SGP4's sentence for a time at which it fails. */
export function failureAt(orbit: Orbit, atMs: number): string {
  const got = orbit.stateAt(atMs);
  return got.ok ? `Propagation fails near ${isoTime(atMs)}.` : got.reason;
}

/** The sentence for a failure somewhere between two times that are good themselves. */
export function failureWithin(orbit: Orbit, fromMs: number, toMs: number): string {
  for (let atMs = fromMs; atMs < toMs; atMs += FAILURE_RESOLUTION_MS) {
    if (!orbit.stateAt(atMs).ok) return failureAt(orbit, atMs);
  }
  return `Propagation fails between ${isoTime(fromMs)} and ${isoTime(toMs)}.`;
}
