import { describe, expect, it } from "vitest";
import { closureLabel } from "@/lib/planning/closure";
import { protectedObjects } from "@/lib/planning/closures/protected-objects";
import type { ProtectedFacts, ScreeningFacts } from "@/lib/planning/pass-facts";
import { brief, DAY, HOUR, OPEN, PASS, RISE, riseAnd, span } from "./facts";

const PAYLOAD: ProtectedFacts = { id: "p-1", name: "QS-88", class: "payload", version: 2 };
const CREWED: ProtectedFacts = { id: "c-1", name: "Larkspur", class: "crewed", version: 1 };

function judged(amend: Partial<ScreeningFacts>) {
  const elements = { ...OPEN.elements, usedEpochMs: riseAnd(100) - 2 * DAY };
  return protectedObjects(PASS, { ...OPEN, elements, screening: { ...OPEN.screening, ...amend } });
}

function crossing(object: ProtectedFacts) {
  return {
    ...span(100, 130),
    object,
    minSeparationDeg: 1.9,
    halfAngleDeg: 2.5,
    addedDeg: 0.2,
    objectEpochMs: riseAnd(100) - 9 * HOUR,
  };
}

describe("protected objects", () => {
  it("leaves a screened pass without crossings open", () => {
    expect(judged({})).toEqual([]);
  });

  it("closes a crossing and says how near, what is kept and how old the element sets are", () => {
    const closures = judged({ crossings: [crossing(PAYLOAD)] });
    expect(brief(closures)).toEqual([["closed", 100, 130]]);
    expect(closures[0]?.cause).toBe(
      "Payload QS-88 comes within 1.9° of the beam (keeps 2.5° + 0.2° for element sets of 2 d and 9 h).",
    );
    expect(closures.map(closureLabel)).toEqual(["payload QS-88, 1.9°"]);
  });

  it("says of crewed spacecraft that nothing lifts them", () => {
    const closures = judged({ crossings: [crossing(CREWED)] });
    expect(closures[0]).toMatchObject({ verdict: "closed", overridable: false });
    expect(closures[0]?.liftedBy).toContain("never lifted");
  });

  it("reads not checked, and can't be attested, before the screening", () => {
    const closures = judged({ screenedAtMs: null });
    expect(brief(closures)).toEqual([["not checked", 0, 600]]);
    expect(closures[0]?.overridable).toBe(false);
  });

  it("reads not checked when the catalogue changed after the screening", () => {
    const closures = judged({ catalogueChangedAtMs: RISE - HOUR });
    expect(brief(closures)).toEqual([["not checked", 0, 600]]);
    expect(closures[0]?.overridable).toBe(false);
  });

  it("never takes an empty crewed list for none", () => {
    const closures = judged({ crewedCount: 0 });
    expect(brief(closures)).toEqual([["not checked", 0, 600]]);
    expect(closures[0]?.overridable).toBe(false);
  });

  it("closes the whole pass, without override, when a crewed spacecraft has no usable element set", () => {
    const closures = judged({ gaps: [CREWED] });
    expect(brief(closures)).toEqual([["closed", 0, 600]]);
    expect(closures[0]?.overridable).toBe(false);
  });

  it("reads not checked, open to a person's word, when another object has none", () => {
    const closures = judged({ gaps: [PAYLOAD] });
    expect(brief(closures)).toEqual([["not checked", 0, 600]]);
    expect(closures[0]?.overridable).toBe(true);
  });
});
