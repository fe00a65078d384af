import { describe, expect, it } from "vitest";
import { meanFromState } from "@/lib/physics/effect/mean-elements";
import { nudgeOf } from "@/lib/planning/dwell-nudge";
import type { Aim } from "@/lib/planning/laser";
import { buildProfile } from "@/lib/planning/profile";
import { measureOf } from "@/lib/planning/worth-aim";
import { BODY, ELEMENTS, LASER, orbitOf, passOver } from "../../fixtures/pass-over";

const pass = passOver({ eccentricity: 0.003 }, 120, { minElevationDeg: 15, offsetDeg: 5 });

function profileOf(aim: Aim, stepS = 2) {
  const built = buildProfile({ ...pass, laser: LASER, body: BODY, stepS, aim });
  if (!built.ok) throw new Error(built.reason);
  return built.profile;
}

describe("profile", () => {
  it("samples the pass from its start on, the end not included", () => {
    const { samples, stepS } = profileOf("decay");
    expect(stepS).toBe(2);
    expect(samples[0]?.atMs).toBe(pass.fromMs);
    expect(samples.length).toBe(Math.ceil((pass.toMs - pass.fromMs) / 2000));
    expect(samples.every((s, i) => s.atMs === pass.fromMs + i * 2000)).toBe(true);
    const high = samples.reduce((a, b) => (b.elevationDeg > a.elevationDeg ? b : a));
    expect(high.rangeKm).toBeCloseTo(Math.min(...samples.map((s) => s.rangeKm)), -1);
    expect(high.transmission).toBeCloseTo(Math.max(...samples.map((s) => s.transmission)), 12);
    for (const s of samples) {
      expect(Math.hypot(s.radial, s.transverse, s.normal)).toBeCloseTo(s.deltaVMPerS, 9);
      expect(s.radial).toBeGreaterThanOrEqual(0);
    }
    // The beam runs against the motion before culmination and with it after.
    const middle = samples.indexOf(high);
    expect(samples[Math.floor(middle / 2)]?.transverse).toBeLessThan(0);
    expect(samples[Math.floor((middle + samples.length) / 2)]?.transverse).toBeGreaterThan(0);
  });

  it.each([
    ["decay", "m"],
    ["perigee", "m"],
    ["energy", "J/kg"],
    ["lifetime", "days"],
  ] as const)("adds the worth for %s up to the gain of lasing it all", (aim, unit) => {
    const profile = profileOf(aim, 4);
    expect(profile.aimUnit).toBe(unit);
    const nudge = nudgeOf(profile.track, profile.shots, pass.fromMs, pass.toMs);
    if (!nudge) throw new Error("no nudge");
    const gain = profile.measure.valueOf(nudge.before) - profile.measure.valueOf(nudge.after);
    const lastS = (pass.toMs - (profile.samples.at(-1)?.atMs ?? 0)) / 1000;
    const sum = profile.samples.reduce(
      (total, s, i) => total + s.worthPerS * (i === profile.samples.length - 1 ? lastS : 4),
      0,
    );
    // Whole pulses against evenly spread ones: less than one pulse of some 7,000 apart.
    expect(Math.abs(sum / gain - 1)).toBeLessThan(0.01);
    expect(Math.abs(gain)).toBeGreaterThan(0);
  });

  it("is hardly touched by its own step", () => {
    const fine = profileOf("perigee", 1);
    const coarse = profileOf("perigee", 7);
    const sum = (p: typeof fine) => p.samples.reduce((total, s) => total + s.worthPerS * p.stepS, 0);
    expect(sum(coarse) / sum(fine)).toBeCloseTo(1, 1);
  });

  it.each([
    [{ stepS: 0 }, "stepS"],
    [{ stepS: 1e-6 }, "stepS"],
    [{ toMs: pass.fromMs }, "later than from"],
    [{ fromMs: pass.fromMs - 900_000 }, "horizon"],
    [{ laser: { ...LASER, apertureM: -1 } }, "apertureM"],
    [{ body: { ...BODY, massKg: 0 } }, "massKg"],
    [{ body: { ...BODY, massKg: 1e-5, areaM2: 0.02 } }, "bound orbit"],
  ])("is refused by name: %j", (change, words) => {
    const built = buildProfile({ ...pass, laser: LASER, body: BODY, stepS: 2, aim: "decay", ...change });
    expect(built.ok ? "" : built.reason).toContain(words);
  });
});

describe("the aim decay", () => {
  const measureAt = (eccentricity: number, meanMotionRevPerDay: number): string => {
    const orbit = orbitOf({ eccentricity, meanMotionRevPerDay });
    const at = orbit.stateAt(ELEMENTS.epochMs);
    const mean = at.ok ? meanFromState(at.state) : null;
    if (!mean) throw new Error("no mean elements");
    return measureOf("decay", mean, BODY).measure;
  };

  // Vallado's table 8-4: scale height 88.667 km from 700 km up, 124.64 km from 800 km up; a third of that.
  it.each([
    [0, 14.4, "semi-major axis"],
    [0.003, 14.4, "semi-major axis"],
    [0.006, 14.4, "perigee"],
    [0.02, 14.4, "perigee"],
    [0.0055, 14.1, "semi-major axis"],
    [0.0065, 14.1, "perigee"],
  ])("at e = %f and %f revolutions a day means the %s", (eccentricity, meanMotion, measure) => {
    expect(measureAt(eccentricity, meanMotion)).toBe(measure);
  });
});
