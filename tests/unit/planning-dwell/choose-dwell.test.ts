import { describe, expect, it } from "vitest";
import { chooseDwell, type DwellLimits } from "@/lib/planning/choose-dwell";
import { dwellLengths, dwellWindows } from "@/lib/planning/dwell-windows";
import { effectOfDwell } from "@/lib/planning/effect";
import type { Aim } from "@/lib/planning/laser";
import { buildProfile } from "@/lib/planning/profile";
import { BODY, LASER, passOver } from "../../fixtures/pass-over";

const pass = passOver({ eccentricity: 0.003 }, 120, { minElevationDeg: 15, offsetDeg: 5 });
const whole = { fromMs: pass.fromMs, toMs: pass.toMs };
const LIMITS: DwellLimits = {
  acquisitionS: 30,
  guardS: 2,
  minDwellS: 5,
  maxDwellS: 240,
  maxPulses: null,
  maxEnergyJ: null,
  maxHeatingS: null,
};

function profileOf(aim: Aim = "decay", laser = LASER, body = BODY) {
  const built = buildProfile({ ...pass, laser, body, stepS: 2, aim });
  if (!built.ok) throw new Error(built.reason);
  return built.profile;
}

const profile = profileOf();

function choose(limits: Partial<DwellLimits> = {}, openings = [whole], of = profile) {
  return chooseDwell({ profile: of, riseMs: pass.fromMs, openings, limits: { ...LIMITS, ...limits } });
}

describe("the chosen dwell", () => {
  it("begins after acquisition, in whole seconds, and gains what the effect says", () => {
    const chosen = choose();
    if (!chosen) throw new Error("no dwell");
    expect(chosen.fromMs % 1000).toBe(0);
    expect(chosen.toMs % 1000).toBe(0);
    expect(chosen.fromMs).toBeGreaterThanOrEqual(pass.fromMs + 30_000);
    const known = { value: 1, source: "measured" };
    const worked = effectOfDwell({
      ...pass,
      laser: { ...LASER, jitterUrad: 0.02 },
      body: BODY,
      fromMs: chosen.fromMs,
      toMs: chosen.toMs,
      knowledge: { mass: known, area: known, pointingResidual: known },
    });
    if (!worked.ok) throw new Error(worked.reason);
    const { semiMajorAxisBeforeKm, semiMajorAxisAfterKm } = worked.effect;
    const dropM = (semiMajorAxisBeforeKm - semiMajorAxisAfterKm.p50) * 1000;
    expect(Math.abs(dropM / chosen.gain - 1)).toBeLessThan(0.01);
  });

  it("moves into what is open, and takes the better of two openings", () => {
    const free = choose();
    if (!free) throw new Error("no dwell");
    const middleMs = (free.fromMs + free.toMs) / 2;
    const early = { fromMs: pass.fromMs, toMs: middleMs - 20_000 };
    const late = { fromMs: middleMs, toMs: pass.toMs };
    const [a, b, both] = [choose({}, [early]), choose({}, [late]), choose({}, [early, late])];
    if (!a || !b || !both) throw new Error("no dwell");
    expect(a.toMs).toBeLessThanOrEqual(early.toMs - 2000);
    expect(b.fromMs).toBeGreaterThanOrEqual(late.fromMs + 2000);
    expect(both).toEqual(a.gain > b.gain ? a : b);
    expect(both.gain).toBeLessThan(free.gain);
  });

  it("keeps every limit", () => {
    const lengthS = (limits: Partial<DwellLimits>): number => {
      const chosen = choose(limits);
      return chosen ? (chosen.toMs - chosen.fromMs) / 1000 : 0;
    };
    expect(lengthS({ maxDwellS: 40 })).toBe(40);
    // 11.2 pulses a second: 25 s make 280 pulses, 26 s would make 292.
    expect(lengthS({ maxPulses: 280 })).toBe(25);
    expect(lengthS({ maxPulses: 279 })).toBe(24);
    expect(lengthS({ maxEnergyJ: 280 * 7300 })).toBe(25);
    expect(lengthS({ maxHeatingS: 17.9 })).toBe(17);
    expect(lengthS({ minDwellS: 50, maxDwellS: 40 })).toBe(0);
    expect(lengthS({ maxPulses: 0 })).toBe(0);
    expect(profile.meltOnsetS).not.toBeNull();
    expect(lengthS({ maxHeatingS: profile.meltOnsetS })).toBe(Math.floor(profile.meltOnsetS ?? 0));
  });

  it("is none when nothing helps", () => {
    expect(choose({}, [])).toBeNull();
    expect(choose({}, [{ fromMs: pass.fromMs, toMs: pass.fromMs + 31_000 }])).toBeNull();
    expect(choose({ acquisitionS: 5_000 })).toBeNull();
    // Under the threshold nothing moves.
    expect(choose({}, [whole], profileOf("decay", { ...LASER, pulseEnergyJ: 10 }))).toBeNull();
    // A receding fragment is pushed along its motion: its semi-major axis can only rise.
    const high = profile.samples.reduce((a, b) => (b.elevationDeg > a.elevationDeg ? b : a));
    expect(choose({}, [{ fromMs: high.atMs + 30_000, toMs: pass.toMs }])).toBeNull();
  });

  it("wastes no second where the coupling is nil", () => {
    const weak = profileOf("decay", { ...LASER, pulseEnergyJ: 1500 });
    const lit = weak.samples.filter((s) => s.deltaVMPerS > 0);
    const chosen = choose({ acquisitionS: 0, guardS: 0, minDwellS: 1 }, [whole], weak);
    expect(lit.length).toBeLessThan(weak.samples.length);
    expect(chosen?.fromMs).toBeGreaterThan((lit[0]?.atMs ?? 0) - 4000);
  });

  it("refuses limits that are no limits, by name", () => {
    expect(() => choose({ guardS: -1 })).toThrow("guardS");
    expect(() => choose({ maxDwellS: Number.NaN })).toThrow("maxDwellS");
  });
});

describe("windows and lengths", () => {
  const span = { fromMs: 10_500, toMs: 99_300 };

  it("shrink by guard at both edges, by acquisition from rise, and inward to whole seconds", () => {
    const limits = { ...LIMITS, guardS: 1.5, acquisitionS: 7 };
    const openings = [
      { fromMs: 0, toMs: 40_000 },
      { fromMs: 50_000, toMs: 52_900 },
      { fromMs: 60_000, toMs: 200_000 },
    ];
    expect(dwellWindows(openings, limits, 10_500, span)).toEqual([
      { fromS: 18, toS: 38 },
      { fromS: 62, toS: 99 },
    ]);
  });

  it("count pulses as the effect counts them", () => {
    const laser = { repetitionRateHz: 0.5, pulseEnergyJ: 10 };
    expect(dwellLengths({ ...LIMITS, maxPulses: 3 }, laser)).toEqual({ shortestS: 5, longestS: 6 });
    expect(dwellLengths({ ...LIMITS, maxEnergyJ: 29.9 }, laser)).toEqual({ shortestS: 5, longestS: 4 });
    expect(dwellLengths({ ...LIMITS, minDwellS: 0 }, laser)).toEqual({ shortestS: 1, longestS: 240 });
  });
});
