import { describe, expect, it } from "vitest";
import { closuresOf } from "@/lib/planning/closures/list";
import { otherEngagements } from "@/lib/planning/closures/other-engagements";
import type { EngagementFacts } from "@/lib/planning/pass-facts";
import { brief, OPEN, PASS, span } from "./facts";

/** Dwell from 200 to 260 s; the hold adds 60 s slew and 120 s cool-down. */
const OTHER: EngagementFacts = {
  id: "e-2",
  number: 1042,
  state: "cleared",
  version: 4,
  plannerName: "Ines Calder",
  stationId: "station-1",
  stationName: "Hollin Fell",
  fragmentId: "fragment-9",
  dwell: span(200, 260),
  hold: span(140, 380),
};

describe("other engagements", () => {
  it("leaves the pass open when nobody holds it", () => {
    expect(otherEngagements(PASS, OPEN)).toEqual([]);
  });

  it("closes the other's hold widened by our own cool-down and slew", () => {
    const closures = otherEngagements(PASS, { ...OPEN, engagements: [OTHER] });
    // Cool-down of a dwell before it: 140 − 120 = 20 s; slew of a dwell after it: 380 + 60 = 440 s.
    expect(brief(closures)).toEqual([["closed", 20, 440]]);
    expect(closures[0]?.cause).toContain("E-1042 of Ines Calder holds Hollin Fell");
  });

  it("closes the bare dwell of the same fragment at another station", () => {
    const elsewhere = { ...OTHER, stationId: "station-2", stationName: "Cape Ash", fragmentId: "fragment-1" };
    expect(brief(otherEngagements(PASS, { ...OPEN, engagements: [elsewhere] }))).toEqual([
      ["closed", 200, 260],
    ]);
  });

  it("leaves another fragment at another station alone", () => {
    const elsewhere = { ...OTHER, stationId: "station-2" };
    expect(otherEngagements(PASS, { ...OPEN, engagements: [elsewhere] })).toEqual([]);
  });

  it("does not stand in its own way", () => {
    const own = { engagementId: "e-2", dwell: OTHER.dwell, requestedOf: new Set<string>(), answers: [] };
    expect(closuresOf(PASS, { ...OPEN, engagements: [OTHER], own })).toEqual([]);
  });
});
