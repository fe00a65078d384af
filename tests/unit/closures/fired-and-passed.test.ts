import { describe, expect, it } from "vitest";
import { firedUpon } from "@/lib/planning/closures/fired-upon";
import { closuresOf } from "@/lib/planning/closures/list";
import { timePassed } from "@/lib/planning/closures/time-passed";
import { brief, HOUR, OPEN, PASS, RISE, riseAnd, span } from "./facts";

function firing(closedMs: number) {
  return { engagementNumber: 1003, outcome: "fired" as const, closedMs };
}

describe("fired upon", () => {
  it("leaves a fragment open that was never lased", () => {
    expect(firedUpon(PASS, OPEN)).toEqual([]);
  });

  it("is pending until an element set with a later epoch is the newest", () => {
    const closedMs = OPEN.elements.newestEpochMs + HOUR;
    expect(brief(firedUpon(PASS, { ...OPEN, firings: [firing(closedMs)] }))).toEqual([["pending", 0, 600]]);
    const elements = { ...OPEN.elements, newestEpochMs: closedMs + 1 };
    expect(firedUpon(PASS, { ...OPEN, elements, firings: [firing(closedMs)] })).toEqual([]);
    const same = { ...OPEN.elements, newestEpochMs: closedMs };
    expect(firedUpon(PASS, { ...OPEN, elements: same, firings: [firing(closedMs)] })).toHaveLength(1);
  });

  it("takes the last of several firings, and leaves what was before it alone", () => {
    const firings = [firing(riseAnd(100)), firing(RISE - 20 * HOUR)];
    expect(brief(firedUpon(PASS, { ...OPEN, firings }))).toEqual([["pending", 100, 600]]);
    expect(firedUpon(PASS, { ...OPEN, firings: [firing(riseAnd(700))] })).toEqual([]);
  });
});

describe("time passed", () => {
  it("leaves the future open", () => {
    expect(timePassed(PASS, { ...OPEN, nowMs: RISE })).toEqual([]);
  });

  it("closes what is over", () => {
    expect(brief(timePassed(PASS, { ...OPEN, nowMs: riseAnd(90) }))).toEqual([["closed", 0, 90]]);
    expect(brief(closuresOf(PASS, { ...OPEN, nowMs: riseAnd(9000) }))).toEqual([["closed", 0, 600]]);
  });

  it("closes a dwell from its own beginning", () => {
    const facts = { ...OPEN, nowMs: riseAnd(10), dwell: span(-30, 60) };
    expect(brief(timePassed(PASS, facts))).toEqual([["closed", -30, 10]]);
  });
});
