import { describe, expect, it } from "vitest";
import { elementSetAge } from "@/lib/planning/closures/element-set-age";
import type { ElementFacts } from "@/lib/planning/pass-facts";
import { brief, HOUR, OPEN, PASS, RISE, riseAnd } from "./facts";

function judged(usedEpochMs: number, amend: Partial<ElementFacts> = {}) {
  const elements = { ...OPEN.elements, usedEpochMs, newestEpochMs: usedEpochMs, ...amend };
  return elementSetAge(PASS, { ...OPEN, elements });
}

/** The station takes 72 h. */
describe("element-set age", () => {
  it("leaves a fresh set open, before and after its epoch", () => {
    expect(judged(RISE - 71 * HOUR)).toEqual([]);
    expect(judged(RISE + 71 * HOUR)).toEqual([]);
  });

  it("is pending past the limit, from that second on", () => {
    expect(brief(judged(riseAnd(120) - 72 * HOUR))).toEqual([["pending", 120.001, 600]]);
    expect(judged(RISE - 100 * HOUR)[0]?.cause).toBe(
      "The element set is 4.2 d old at this pass (Hollin Fell takes 3 d); some 5.2 km along the track.",
    );
  });

  it("reads not checked past twice the limit, open to a person's word", () => {
    const closures = judged(riseAnd(200) - 144 * HOUR);
    expect(brief(closures)).toEqual([
      ["pending", 0, 200.001],
      ["not checked", 200.001, 600],
    ]);
    expect(closures[1]?.overridable).toBe(true);
  });

  it("counts an epoch long after the pass like one long before", () => {
    expect(brief(judged(RISE + 200 * HOUR))).toEqual([["not checked", 0, 600]]);
  });

  it("is pending while a newer set has come in and the pass rests on the old one", () => {
    const closures = judged(RISE - 20 * HOUR, { newestEpochMs: RISE - 2 * HOUR });
    expect(brief(closures)).toEqual([["pending", 0, 600]]);
    expect(closures[0]?.label).toBe("newer element set");
  });
});
