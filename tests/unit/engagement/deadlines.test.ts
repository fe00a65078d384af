import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { answerByMs } from "@/lib/engagement/answer-deadline";
import { checkChecklist } from "@/lib/engagement/checklist";
import { isOverdue } from "@/lib/engagement/states";

const HOUR = 3_600_000;
const NOW = Date.UTC(2031, 3, 6);

describe("when an answer is needed", () => {
  it("is the authority's own deadline for changes when that leaves time", () => {
    expect(answerByMs(NOW, NOW + 10 * HOUR, 60)).toBe(NOW + 9 * HOUR);
  });

  it("is halfway to the dwell when the deadline is nearer than that, or past", () => {
    expect(answerByMs(NOW, NOW + HOUR, 50)).toBe(NOW + HOUR / 2);
    expect(answerByMs(NOW, NOW + HOUR, 600)).toBe(NOW + HOUR / 2);
  });

  it("never comes before half of the time, nor after the dwell's start, in whole seconds", () => {
    fc.assert(
      fc.property(fc.integer({ min: 2000, max: 10 * 86_400_000 }), fc.nat(20_000), (aheadMs, minutes) => {
        const dwell = NOW + aheadMs;
        const by = answerByMs(NOW, dwell, minutes);
        expect(by).toBeGreaterThan(NOW + aheadMs / 2 - 1000);
        expect(by).toBeLessThanOrEqual(dwell);
        expect(by % 1000).toBe(0);
      }),
    );
  });
});

describe("a checklist", () => {
  const good = { airUnitCalledAtMs: NOW - HOUR, interlockTestedAtMs: NOW - HOUR, crewedListCheckedAtMs: NOW };

  it("with fresh checks is taken", () => {
    expect(checkChecklist(good, NOW)).toEqual([]);
  });

  it("names each check that is still to come or older than a day", () => {
    const bad = { ...good, airUnitCalledAtMs: NOW + 60_001, interlockTestedAtMs: NOW - 24 * HOUR - 1 };
    expect(checkChecklist(bad, NOW).map(({ path }) => path)).toEqual([
      "checklist.airUnitCalledAt",
      "checklist.interlockTestedAt",
    ]);
  });
});

describe("an engagement without its firing record", () => {
  it("is overdue 24 h after its dwell, when confirmed", () => {
    expect(isOverdue("confirmed", NOW, NOW + 24 * HOUR)).toBe(false);
    expect(isOverdue("confirmed", NOW, NOW + 24 * HOUR + 1)).toBe(true);
    expect(isOverdue("fired", NOW, NOW + 48 * HOUR)).toBe(false);
  });
});
