import type { DecisionFacts, EngagementFacts } from "./facts";
import type { Reason } from "./refusal";
import type { Need } from "./transitions";

type Check = (engagement: EngagementFacts, facts: DecisionFacts, nowMs: number) => readonly Reason[];

const MINUTE_MS = 60_000;

/** One reason under a path, when the condition holds. */
function when(refused: boolean, path: string, message: string): readonly Reason[] {
  return refused ? [{ path, message }] : [];
}

/** Reasons that a need is not met; none when it is. A table, so that no need can be forgotten. */
export const NEEDS: Readonly<Record<Need, Check>> = {
  "before the dwell": (e, _facts, nowMs) =>
    when(nowMs >= e.dwellFromMs, "from", "The dwell has begun or is over."),
  "after the dwell's start": (e, _facts, nowMs) =>
    when(nowMs < e.dwellFromMs, "from", "The dwell has not begun: there is nothing to record yet."),
  "outside every change deadline": changeDeadlines,
  "nothing closed": (_e, facts) => facts.closed.map((message) => ({ path: "closed", message })),
  "nothing pending": (_e, facts) => facts.pending.map((message) => ({ path: "pending", message })),
  "every answer in": (_e, facts) =>
    facts.unanswered.map((name) => ({ path: "answers", message: `${name} has not answered.` })),
  "attested where not checked": attestations,
  "an operator's name first": (_e, facts) =>
    when(
      facts.actor.role !== "operator",
      "confirmations",
      "An operator confirms first; the second name may be another operator's or a safety officer's.",
    ),
  "a second person's name": secondName,
  "a reason": (_e, facts) =>
    when(facts.reason !== null && facts.reason.trim() === "", "reason", "Say why: everybody is told."),
  "time has run out": (e, facts, nowMs) =>
    when(!timeHasRunOut(e, facts, nowMs), "from", "No deadline has passed and the dwell has not begun."),
};

/** Inside an authority's deadline, of the old start or of the new one, only a scrub is left. */
function changeDeadlines(e: EngagementFacts, facts: DecisionFacts, nowMs: number): readonly Reason[] {
  const startMs = Math.min(e.dwellFromMs, facts.newFromMs ?? e.dwellFromMs);
  return facts.changeDeadlines
    .filter(({ minutes }) => nowMs > startMs - minutes * MINUTE_MS)
    .map(({ authority, minutes }) => ({
      path: "from",
      message: `${authority} takes no change later than ${minutes} min before the dwell: scrub it instead.`,
    }));
}

function attestations(_e: EngagementFacts, facts: DecisionFacts): readonly Reason[] {
  return facts.notChecked
    .filter(({ rule, attestable }) => !attestable || !facts.attested.includes(rule))
    .map(({ rule, cause, attestable }) => ({
      path: "attestations",
      message: attestable
        ? `Not checked, ${rule}: ${cause} A person must give their word for it.`
        : `Not checked, ${rule}: ${cause} No person's word can stand in for this.`,
    }));
}

function secondName(_e: EngagementFacts, facts: DecisionFacts): readonly Reason[] {
  const same = facts.actor.id === null || facts.confirmedBy.includes(facts.actor.id);
  return when(same, "confirmations", "Two different people confirm: you have given your name already.");
}

/** A proposal waits for its earliest missing answer at most; nothing unconfirmed outlives its dwell's start. */
function timeHasRunOut(e: EngagementFacts, facts: DecisionFacts, nowMs: number): boolean {
  if (nowMs >= e.dwellFromMs) return true;
  return e.state === "proposed" && facts.earliestAnswerByMs !== null && nowMs >= facts.earliestAnswerByMs;
}
