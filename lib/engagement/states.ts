/** The states of an engagement, in the order of a good day; the last two end it early. */
export const STATES = ["proposed", "cleared", "confirmed", "fired", "scrubbed", "lapsed"] as const;
export type EngagementState = (typeof STATES)[number];

/** States that hold the station and the fragment. */
export const LIVE_STATES = ["proposed", "cleared", "confirmed"] as const;
export type LiveState = (typeof LIVE_STATES)[number];

/** True while the engagement still holds its time. */
export function isLive(state: EngagementState): state is LiveState {
  return (LIVE_STATES as readonly EngagementState[]).includes(state);
}

/** A state from the database as a state; throws for a word that is none. */
export function asState(word: string): EngagementState {
  const state = STATES.find((known) => known === word);
  if (state === undefined) throw new Error(`"${word}" is not a state of an engagement`);
  return state;
}

/** A confirmed engagement without a firing record this long after its dwell is overdue. */
export const OVERDUE_AFTER_MS = 24 * 3_600_000;

/** True when a confirmed engagement should have had its firing record by now. */
export function isOverdue(state: EngagementState, dwellToMs: number, nowMs: number): boolean {
  return state === "confirmed" && nowMs > dwellToMs + OVERDUE_AFTER_MS;
}
