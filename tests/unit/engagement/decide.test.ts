import { describe, expect, it } from "vitest";
import { decide } from "@/lib/engagement/decide";
import { type DecisionFacts, type EngagementFacts, plainFacts } from "@/lib/engagement/facts";
import type { Actor } from "@/lib/engagement/roles";
import { type EngagementState, STATES } from "@/lib/engagement/states";
import { type Command, TRANSITIONS } from "@/lib/engagement/transitions";

const FROM = Date.UTC(2031, 3, 6, 3, 12, 45);
const TO = FROM + 120_000;
const BEFORE = FROM - 6 * 3_600_000;
const AFTER = TO + 600_000;

function person(role: Actor["role"], id: string, isSafetyOfficer = false): Actor {
  return { id, name: id, role, authorityId: null, isSafetyOfficer, via: "screen" };
}

const ACTORS = {
  "own planner": person("planner", "planner-1"),
  "other planner": person("planner", "planner-2"),
  operator: person("operator", "operator-1"),
  coordinator: person("coordinator", "coordinator-1"),
  administrator: person("administrator", "administrator-1"),
  "safety officer": person("administrator", "administrator-2", true),
  link: { ...person("authority by link", "x"), id: null },
  book: { ...person("system", "x"), id: null },
} as const satisfies Record<string, Actor>;
type Who = keyof typeof ACTORS;

const COMMANDS: readonly Command[] = [
  "move",
  "answer",
  "object",
  "confirm",
  "scrub",
  "fire",
  "clear",
  "reopen",
  "lapse",
];

/**
 * The whole matrix, written by hand from the words of the design: command, then state, then
 * who succeeds and to what it leads. Every cell that is not here must be refused.
 */
const LEGAL: Readonly<
  Record<Command, Partial<Record<EngagementState, readonly [readonly Who[], EngagementState]>>>
> = {
  move: {
    proposed: [["own planner"], "proposed"],
    cleared: [["own planner"], "proposed"],
    confirmed: [["own planner"], "proposed"],
  },
  answer: {
    proposed: [["coordinator", "link"], "proposed"],
    cleared: [["coordinator", "link"], "cleared"],
    confirmed: [["coordinator", "link"], "confirmed"],
  },
  object: {
    proposed: [["coordinator", "link"], "proposed"],
    cleared: [["coordinator", "link"], "proposed"],
    confirmed: [["coordinator", "link"], "proposed"],
  },
  confirm: { cleared: [["operator", "safety officer"], "confirmed"] },
  scrub: {
    proposed: [["own planner", "operator"], "scrubbed"],
    cleared: [["own planner", "operator"], "scrubbed"],
    confirmed: [["own planner", "operator"], "scrubbed"],
  },
  fire: { confirmed: [["operator"], "fired"] },
  clear: { proposed: [["book"], "cleared"] },
  reopen: { cleared: [["book"], "proposed"], confirmed: [["book"], "proposed"] },
  lapse: { proposed: [["book"], "lapsed"], cleared: [["book"], "lapsed"] },
};

function engagement(state: EngagementState): EngagementFacts {
  return { state, plannerId: "planner-1", dwellFromMs: FROM, dwellToMs: TO };
}

/** The time at which nothing about time stands in a command's way. */
function goodTime(command: Command): number {
  return command === "fire" || command === "lapse" ? AFTER : BEFORE;
}

/** For "confirm": another operator has given the first name. */
function goodFacts(actor: Actor, command: Command): DecisionFacts {
  return { ...plainFacts(actor), confirmedBy: command === "confirm" ? ["operator-9"] : [], reason: "cloud" };
}

describe("decide, over every command, state and role", () => {
  for (const command of COMMANDS) {
    for (const state of STATES) {
      for (const who of Object.keys(ACTORS) as Who[]) {
        const legal = LEGAL[command][state];
        const allowed = legal?.[0].includes(who) ?? false;
        const words = allowed ? `leads to ${legal?.[1]}` : "is refused";
        it(`${command} of what is ${state} by ${who} ${words}`, () => {
          const decision = decide(
            engagement(state),
            command,
            goodFacts(ACTORS[who], command),
            goodTime(command),
          );
          if (allowed) expect(decision).toEqual({ ok: true, next: legal?.[1] });
          else expect(decision.ok).toBe(false);
        });
      }
    }
  }

  it("names the right and the state together, not only the first", () => {
    const decision = decide(engagement("fired"), "scrub", plainFacts(ACTORS.coordinator), BEFORE);
    expect(decision.ok ? [] : decision.refusals.map((refusal) => refusal.kind)).toEqual(["right", "state"]);
  });

  it("has no row that leaves an ended state", () => {
    const ended = TRANSITIONS.filter((row) => ["fired", "scrubbed", "lapsed"].includes(row.state));
    expect(ended).toEqual([]);
  });
});

function refusals(state: EngagementState, command: Command, facts: DecisionFacts, nowMs = BEFORE): string[] {
  const decision = decide(engagement(state), command, facts, nowMs);
  return decision.ok ? [] : decision.refusals.map((refusal) => refusal.message);
}

describe("confirming by two people", () => {
  const operator = ACTORS.operator;

  it("keeps the state with the first name, an operator's", () => {
    expect(decide(engagement("cleared"), "confirm", plainFacts(operator), BEFORE)).toEqual({
      ok: true,
      next: "cleared",
    });
  });

  it("refuses a safety officer as the first name", () => {
    expect(refusals("cleared", "confirm", plainFacts(ACTORS["safety officer"]))).toEqual([
      "An operator confirms first; the second name may be another operator's or a safety officer's.",
    ]);
  });

  it("refuses the same person twice", () => {
    const facts = { ...plainFacts(operator), confirmedBy: ["operator-1"] };
    expect(refusals("cleared", "confirm", facts)).toEqual([
      "Two different people confirm: you have given your name already.",
    ]);
  });

  it("gives every reason: closed, pending, unanswered, not checked, too late", () => {
    const facts: DecisionFacts = {
      ...plainFacts(operator),
      closed: ["a crewed object comes near."],
      pending: ["the element set is 40 h old."],
      unanswered: ["Brume Air Unit"],
      notChecked: [{ rule: "airspace", cause: "no schedule.", attestable: true }],
    };
    expect(refusals("cleared", "confirm", facts, AFTER)).toEqual([
      "The dwell has begun or is over.",
      "a crewed object comes near.",
      "the element set is 40 h old.",
      "Brume Air Unit has not answered.",
      "Not checked, airspace: no schedule. A person must give their word for it.",
    ]);
  });

  it("takes a person's word for what is not checked, but only where that is possible", () => {
    const unchecked = { rule: "airspace", cause: "no schedule.", attestable: true };
    const facts = { ...plainFacts(operator), notChecked: [unchecked], attested: ["airspace"] };
    expect(refusals("cleared", "confirm", facts)).toEqual([]);
    const never = { ...facts, notChecked: [{ ...unchecked, attestable: false }] };
    expect(refusals("cleared", "confirm", never)).toEqual([
      "Not checked, airspace: no schedule. No person's word can stand in for this.",
    ]);
  });

  it("does not let an unanswered or pending engagement clear, but lets an unchecked one", () => {
    const book = plainFacts(ACTORS.book);
    expect(refusals("proposed", "clear", { ...book, unanswered: ["Brume Air Unit"] })).toHaveLength(1);
    expect(refusals("proposed", "clear", { ...book, pending: ["too old."] })).toEqual(["too old."]);
    expect(refusals("proposed", "clear", { ...book, closed: ["closed."] })).toEqual(["closed."]);
    const unchecked = [{ rule: "airspace", cause: "no schedule.", attestable: true }];
    expect(refusals("proposed", "clear", { ...book, notChecked: unchecked })).toEqual([]);
  });
});

describe("time", () => {
  const planner = plainFacts(ACTORS["own planner"]);
  const asked = { ...planner, changeDeadlines: [{ authority: "Brume Air Unit", minutes: 60 }] };
  const words = "Brume Air Unit takes no change later than 60 min before the dwell: scrub it instead.";

  it("refuses a move inside an authority's deadline for changes, to the millisecond", () => {
    expect(refusals("proposed", "move", asked, FROM - 60 * 60_000)).toEqual([]);
    expect(refusals("proposed", "move", asked, FROM - 60 * 60_000 + 1)).toEqual([words]);
  });

  it("holds the deadline against the new start when that is earlier", () => {
    const earlier = { ...asked, newFromMs: FROM - 4 * 3_600_000 };
    expect(refusals("confirmed", "move", earlier, FROM - 5 * 3_600_000)).toEqual([]);
    expect(refusals("confirmed", "move", earlier, FROM - 5 * 3_600_000 + 1)).toEqual([words]);
  });

  it("still lets it be scrubbed then", () => {
    expect(refusals("confirmed", "scrub", { ...asked, reason: "cloud" }, FROM + 1)).toEqual([]);
  });

  it("refuses a scrub with an empty reason", () => {
    expect(refusals("confirmed", "scrub", { ...planner, reason: "  " })).toEqual([
      "Say why: everybody is told.",
    ]);
  });

  it("lets nothing be recorded as fired before the dwell", () => {
    expect(refusals("confirmed", "fire", plainFacts(ACTORS.operator), FROM - 1)).toHaveLength(1);
    expect(refusals("confirmed", "fire", plainFacts(ACTORS.operator), FROM)).toEqual([]);
  });

  it("lapses a proposal at its earliest missing answer, and anything unconfirmed at its dwell's start", () => {
    const book = plainFacts(ACTORS.book);
    const due = { ...book, earliestAnswerByMs: FROM - 3_600_000 };
    expect(refusals("proposed", "lapse", due, FROM - 3_600_001)).toHaveLength(1);
    expect(refusals("proposed", "lapse", due, FROM - 3_600_000)).toEqual([]);
    expect(refusals("cleared", "lapse", due, FROM - 1)).toHaveLength(1);
    expect(refusals("cleared", "lapse", book, FROM)).toEqual([]);
    expect(refusals("proposed", "lapse", book, FROM - 1)).toHaveLength(1);
  });
});
