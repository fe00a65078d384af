import { describe, expect, it } from "vitest";
import type { DwellLimits } from "@/lib/planning/choose-dwell";
import { type Closure, cutClosures, type Verdict } from "@/lib/planning/closure";
import { brokenLimits, fitsOpenings } from "@/lib/planning/dwell-limits";
import { openingsOf } from "@/lib/planning/openings";

const PASS = { riseMs: 0, setMs: 600_000 };
const LIMITS: DwellLimits = {
  acquisitionS: 30,
  guardS: 2,
  minDwellS: 10,
  maxDwellS: 120,
  maxPulses: null,
  maxEnergyJ: null,
  maxHeatingS: null,
};

function closure(verdict: Verdict, fromS: number, toS: number, cause: string): Closure {
  const rest = { label: cause, input: "test", liftedBy: "nothing", overridable: false };
  return { rule: "airspace", verdict, fromMs: fromS * 1000, toMs: toS * 1000, cause, ...rest };
}

describe("openings", () => {
  it("are what is left after everything closed, with what each still waits for", () => {
    const closures = [
      closure("closed", 100, 200, "closed by one"),
      closure("closed", 150, 250, "closed by another"),
      closure("pending", 0, 600, "an answer"),
      closure("pending", 300, 400, "an answer"),
      closure("not checked", 500, 600, "no hours"),
    ];
    expect(openingsOf(PASS, closures)).toEqual([
      { fromMs: 0, toMs: 100_000, pending: ["an answer"] },
      { fromMs: 250_000, toMs: 600_000, pending: ["an answer", "not checked: no hours"] },
    ]);
  });

  it("are the whole pass when nothing closes, and nothing when all is closed", () => {
    expect(openingsOf(PASS, [])).toEqual([{ fromMs: 0, toMs: 600_000, pending: [] }]);
    expect(openingsOf(PASS, [closure("closed", -10, 700, "all")])).toEqual([]);
  });

  it("let closures be cut to a dwell", () => {
    const cut = cutClosures([closure("closed", 100, 200, "x"), closure("closed", 300, 400, "y")], {
      fromMs: 150_000,
      toMs: 300_000,
    });
    expect(cut.map(({ fromMs, toMs }) => [fromMs, toMs])).toEqual([[150_000, 200_000]]);
  });
});

describe("limits of a dwell", () => {
  const openings = [{ fromMs: 0, toMs: 100_000 }];
  const laser = {
    mode: "pulsed" as const,
    wavelengthNm: 1064,
    pulseEnergyJ: 100,
    pulseWidthNs: 5,
    repetitionRateHz: 10,
    apertureM: 8,
    beamQuality: 1.5,
    zenithTransmission: 0.8,
    strehl: 0.6,
    jitterUrad: 0.1,
    spotConvention: "gaussian" as const,
  };

  function broken(fromMs: number, toMs: number, limits = LIMITS, meltOnsetS: number | null = null) {
    const dwell = { fromMs, toMs };
    return brokenLimits({ dwell, riseMs: 0, openings, limits, laser, meltOnsetS }).map((b) => b.message);
  }

  it("take a dwell that keeps them all", () => {
    expect(broken(30_000, 98_000)).toEqual([]);
    const dwell = { fromMs: 30_000, toMs: 98_000 };
    expect(fitsOpenings({ dwell, riseMs: 0, openings, limits: LIMITS })).toBe(true);
  });

  it("name every limit that is broken", () => {
    expect(broken(29_000, 99_500)).toEqual([
      "A dwell ends on a whole second.",
      "The target is acquired and identified 30 s after rise, at 1970-01-01 00:00:30Z, at the earliest.",
      "The opening ends at 1970-01-01 00:01:40Z; 2 s guard time is kept free there.",
    ]);
    expect(broken(30_000, 38_000)).toEqual(["The dwell lasts 8 s; the shortest is 10 s."]);
    expect(broken(40_000, 40_000)).toEqual(["The dwell must end after it begins."]);
    const tight = { ...LIMITS, maxDwellS: 40, maxPulses: 499, maxEnergyJ: 49_999 };
    expect(broken(30_000, 80_000, tight)).toEqual([
      "The dwell lasts 50 s; the longest is 40 s.",
      "The dwell takes 500 pulses; at most 499.",
      "The dwell takes 50000 J; at most 49999 J.",
    ]);
    expect(broken(30_000, 80_000, { ...LIMITS, maxPulses: 500, maxEnergyJ: 50_000 })).toEqual([]);
  });

  it("stop a dwell before the fragment may melt", () => {
    expect(broken(30_000, 80_000, LIMITS, 31.26)).toEqual([
      "The fragment may reach its melting point 31.3 s into the dwell.",
    ]);
  });

  it("leave guard time to the closures where a dwell touches closed time", () => {
    expect(broken(60_000, 120_000)).toEqual([]);
    const dwell = { fromMs: 60_000, toMs: 120_000 };
    expect(fitsOpenings({ dwell, riseMs: 0, openings, limits: LIMITS })).toBe(false);
  });
});
