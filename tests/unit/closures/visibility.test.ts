import { describe, expect, it } from "vitest";
import { closuresOf } from "@/lib/planning/closures/list";
import { visibility } from "@/lib/planning/closures/visibility";
import { brief, OPEN, PASS, RISE, riseAnd, span } from "./facts";

describe("visibility", () => {
  it("leaves a pass between floor and ceiling open", () => {
    expect(visibility(PASS, OPEN)).toEqual([]);
  });

  it("closes what lies above the ceiling and below the floor", () => {
    const pass = { ...PASS, aboveCeiling: [span(290, 310)], belowFloor: [span(0, 4)] };
    const closures = visibility(pass, OPEN);
    expect(brief(closures)).toEqual([
      ["closed", 0, 4],
      ["closed", 290, 310],
    ]);
    expect(closures[1]?.cause).toBe("The fragment stands above 86°, the elevation ceiling of Hollin Fell.");
    expect(closures[1]?.input).toBe("station Hollin Fell, version 3");
  });

  it("closes the part of a dwell that lies outside rise and set", () => {
    const closures = closuresOf(PASS, { ...OPEN, dwell: span(-20, 40) });
    expect(brief(closures)).toEqual([["closed", -20, 0]]);
  });

  it("reads not checked while the pass was measured against another version of the limits", () => {
    const facts = { ...OPEN, station: { ...OPEN.station, version: 4 } };
    expect(brief(visibility(PASS, facts))).toEqual([["not checked", 0, 600]]);
    expect(visibility(PASS, facts)[0]?.overridable).toBe(false);
  });

  it("closes a pass that the newest element set no longer shows, and the dwell on it", () => {
    expect(brief(visibility(PASS, { ...OPEN, vanishedAtMs: RISE - 1000 }))).toEqual([["closed", 0, 600]]);
    const facts = { ...OPEN, vanishedAtMs: RISE - 1000, dwell: { fromMs: riseAnd(-50), toMs: riseAnd(10) } };
    expect(brief(visibility(PASS, facts))).toEqual([["closed", -50, 10]]);
  });
});
