import type { Actor } from "./roles";
import type { EngagementState } from "./states";

/** What `decide` must know of the engagement itself. */
export interface EngagementFacts {
  readonly state: EngagementState;
  readonly plannerId: string;
  readonly dwellFromMs: number;
  readonly dwellToMs: number;
}

/** A rule whose data is missing over the dwell, in words. */
export interface Unchecked {
  readonly rule: string;
  readonly cause: string;
  /** False where no person's word may stand in for the data. */
  readonly attestable: boolean;
}

/** Everything else that a decision may rest on; gathered by the service, never read from a clock. */
export interface DecisionFacts {
  readonly actor: Actor;
  /** Causes of what is closed over the dwell, and of what is broken of its limits. */
  readonly closed: readonly string[];
  /** Causes of what is still awaited over the dwell. */
  readonly pending: readonly string[];
  readonly notChecked: readonly Unchecked[];
  /** Rules to which a person has given their word. */
  readonly attested: readonly string[];
  /** Names of concerned authorities without an answer in force that lets it pass. */
  readonly unanswered: readonly string[];
  /** People whose confirmation is in force, in order. */
  readonly confirmedBy: readonly string[];
  /** Authorities that have been asked, with their deadline for changes in minutes before the dwell. */
  readonly changeDeadlines: readonly { readonly authority: string; readonly minutes: number }[];
  /** When the earliest answer that is still missing was needed; null when none is missing. */
  readonly earliestAnswerByMs: number | null;
  /** The start that a move would give; null for other commands. */
  readonly newFromMs: number | null;
  /** The reason given; null when it is not asked for yet, as for a button on a page. */
  readonly reason: string | null;
}

/** Facts with nothing in the way, to be spread and amended. */
export function plainFacts(actor: Actor): DecisionFacts {
  return {
    actor,
    closed: [],
    pending: [],
    notChecked: [],
    attested: [],
    unanswered: [],
    confirmedBy: [],
    changeDeadlines: [],
    earliestAnswerByMs: null,
    newFromMs: null,
    reason: null,
  };
}
