import type { DecisionFacts, EngagementFacts } from "./facts";
import { NEEDS } from "./needs";
import type { Reason } from "./refusal";
import { may } from "./roles";
import type { EngagementState } from "./states";
import { type Command, TRANSITIONS, type Transition, type Who } from "./transitions";

/** Why not: `right` is about who asks, the others about what is asked. */
export interface Objection extends Reason {
  readonly kind: "right" | "state" | "need";
}

export type Decision =
  | { readonly ok: true; readonly next: EngagementState }
  | { readonly ok: false; readonly refusals: readonly Objection[] };

/**
 * What a command leads to, or every reason against it: rights, state and needs
 * together, never only the first. Pure: the time is an argument (Unix ms).
 */
export function decide(
  engagement: EngagementFacts,
  command: Command,
  facts: DecisionFacts,
  nowMs: number,
): Decision {
  const rights = refuseRights(engagement, command, facts);
  const row = rowFor(engagement, command, facts);
  if (row === undefined) return { ok: false, refusals: [...rights, wrongState(engagement.state, command)] };
  const needs = row.needs.flatMap((need) => NEEDS[need](engagement, facts, nowMs));
  const refusals: Objection[] = [...rights, ...needs.map((reason) => ({ ...reason, kind: "need" as const }))];
  return refusals.length === 0 ? { ok: true, next: row.next } : { ok: false, refusals };
}

/** Confirming has two rows: the first name and the second. */
function rowFor(e: EngagementFacts, command: Command, facts: DecisionFacts): Transition | undefined {
  const rows = TRANSITIONS.filter((row) => row.state === e.state && row.command === command);
  return command === "confirm" && facts.confirmedBy.length > 0 ? rows.at(-1) : rows[0];
}

function refuseRights(e: EngagementFacts, command: Command, facts: DecisionFacts): Objection[] {
  const who = new Set<Who>(TRANSITIONS.filter((row) => row.command === command).flatMap((row) => row.who));
  const { actor } = facts;
  const granted = [...who].filter((right) =>
    right === "the book" ? actor.role === "system" : may(actor, right),
  );
  if (granted.length === 0) return [notYours(`Your role does not allow this: ${command}.`)];
  if (granted.every((right) => right.endsWith(" own")) && actor.id !== e.plannerId) {
    return [notYours("Only the planner who booked it may do this.")];
  }
  if (granted.every((right) => right === "second confirmation") && !actor.isSafetyOfficer) {
    return [notYours("An administrator confirms only as safety officer.")];
  }
  return [];
}

function notYours(message: string): Objection {
  return { kind: "right", path: "", message };
}

const DONE: Readonly<Record<Command, string>> = {
  move: "moved",
  answer: "answered",
  object: "objected to",
  confirm: "confirmed",
  scrub: "scrubbed",
  fire: "recorded as fired",
  clear: "cleared",
  reopen: "sent back",
  lapse: "left to lapse",
};

function wrongState(state: EngagementState, command: Command): Objection {
  const states = [...new Set(TRANSITIONS.filter((row) => row.command === command).map((row) => row.state))];
  return {
    kind: "state",
    path: "state",
    message: `It is ${state}; only what is ${states.join(" or ")} can be ${DONE[command]}.`,
  };
}
