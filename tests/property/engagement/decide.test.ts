import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { decide } from "@/lib/engagement/decide";
import { type DecisionFacts, plainFacts } from "@/lib/engagement/facts";
import type { Actor } from "@/lib/engagement/roles";
import { type EngagementState, isLive } from "@/lib/engagement/states";
import { type Command, TRANSITIONS } from "@/lib/engagement/transitions";

const FROM = Date.UTC(2031, 3, 6, 3);
const COMMANDS = [...new Set(TRANSITIONS.map((row) => row.command))];

const actor: fc.Arbitrary<Actor> = fc.record({
  id: fc.constantFrom("a", "b", "c", "d"),
  name: fc.constant("somebody"),
  role: fc.constantFrom("planner", "operator", "coordinator", "administrator", "system"),
  authorityId: fc.constant(null),
  isSafetyOfficer: fc.boolean(),
  via: fc.constant("screen"),
});

const step = fc.record({
  command: fc.constantFrom(...COMMANDS),
  actor,
  closed: fc.boolean(),
  unanswered: fc.boolean(),
  aheadMs: fc.integer({ min: -3_600_000, max: 86_400_000 }),
});

/** A book with one engagement, kept as the service keeps it: names are void once it is proposed again. */
function play(steps: readonly { command: Command; facts: DecisionFacts; nowMs: number }[]) {
  let state: EngagementState = "proposed";
  let names: { id: string; role: Actor["role"] }[] = [];
  const history: { state: EngagementState; names: typeof names }[] = [{ state, names }];
  for (const { command, facts, nowMs } of steps) {
    const engagement = { state, plannerId: "a", dwellFromMs: FROM, dwellToMs: FROM + 60_000 };
    const decision = decide(engagement, command, { ...facts, confirmedBy: names.map(({ id }) => id) }, nowMs);
    if (!decision.ok) continue;
    state = decision.next;
    if (command === "confirm") names = [...names, { id: facts.actor.id ?? "", role: facts.actor.role }];
    if (state === "proposed") names = [];
    history.push({ state, names });
  }
  return history;
}

const games = fc.array(step, { maxLength: 60 }).map((steps) =>
  steps.map(({ command, actor: who, closed, unanswered, aheadMs }) => ({
    command,
    nowMs: FROM - aheadMs,
    facts: { ...plainFacts(who), closed: closed ? ["closed"] : [], unanswered: unanswered ? ["X"] : [] },
  })),
);

describe("any sequence of commands", () => {
  it("confirms only with two different people, an operator first", () => {
    fc.assert(
      fc.property(games, (steps) => {
        for (const { state, names } of play(steps)) {
          if (state !== "confirmed") continue;
          expect(new Set(names.map(({ id }) => id)).size).toBe(2);
          expect(names[0]?.role).toBe("operator");
        }
      }),
      { numRuns: 500 },
    );
  });

  it("never leaves an ended state, and fires only what was confirmed", () => {
    fc.assert(
      fc.property(games, (steps) => {
        const history = play(steps);
        history.forEach(({ state }, index) => {
          const before = history[index - 1]?.state;
          if (before !== undefined) expect(isLive(before)).toBe(true);
          if (state === "fired") expect(before).toBe("confirmed");
        });
      }),
      { numRuns: 500 },
    );
  });

  it("reaches confirmed and fired in some of them, so that the two above are not empty", () => {
    const who = (role: Actor["role"], id: string): Actor => ({
      id,
      name: id,
      role,
      authorityId: null,
      isSafetyOfficer: true,
      via: "screen",
    });
    const at = (command: Command, by: Actor, nowMs: number) => ({ command, facts: plainFacts(by), nowMs });
    const history = play([
      at("clear", who("system", "s"), FROM - 5),
      at("confirm", who("operator", "b"), FROM - 4),
      at("confirm", who("administrator", "c"), FROM - 3),
      at("fire", who("operator", "d"), FROM + 1),
    ]);
    expect(history.map(({ state }) => state)).toEqual([
      "proposed",
      "cleared",
      "cleared",
      "confirmed",
      "fired",
    ]);
  });
});
