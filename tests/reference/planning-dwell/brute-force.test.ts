import { describe, expect, it } from "vitest";
import { deviated, lase, noDeviation } from "@/lib/physics/effect/accumulate";
import { meanFromState, meanNear } from "@/lib/physics/effect/mean-elements";
import { chooseDwell, type DwellLimits } from "@/lib/planning/choose-dwell";
import type { Aim, FragmentBody } from "@/lib/planning/laser";
import { buildProfile, type Profile } from "@/lib/planning/profile";
import { BODY, LASER, passOver } from "../../fixtures/pass-over";

const NO_LIMITS: DwellLimits = {
  acquisitionS: 0,
  guardS: 0,
  minDwellS: 1,
  maxDwellS: 10_000,
  maxPulses: null,
  maxEnergyJ: null,
  maxHeatingS: null,
};

function profileOf(
  anomalyDeg: number,
  eccentricity: number,
  aim: Aim,
  body: FragmentBody,
  offsetDeg: number,
): Profile {
  const pass = passOver({ eccentricity }, anomalyDeg, { minElevationDeg: 30, offsetDeg });
  const built = buildProfile({ ...pass, laser: LASER, body, stepS: 2, aim });
  if (!built.ok) throw new Error(built.reason);
  return built.profile;
}

/** The largest exact gain over every begin and end in whole seconds, up to a longest dwell. */
function bruteForce(profile: Profile, longestS: number): { gain: number; tried: number } {
  const { track, shots, measure } = profile;
  const [first, last] = [Math.ceil(profile.fromMs / 1000), Math.floor(profile.toMs / 1000)];
  const ends = Array.from({ length: last - first + 1 }, (_, i) => {
    const state = track.at((first + i) * 1000).state;
    const mean = meanFromState(state);
    if (!mean) throw new Error("no mean elements");
    return { state, mean, value: measure.valueOf(mean) };
  });
  let [gain, tried] = [0, 0];
  for (let from = first; from < last; from++) {
    const deviation = noDeviation();
    for (let to = from + 1; to <= Math.min(last, from + longestS); to++) {
      const span = { fromMs: (to - 1) * 1000, toMs: to * 1000, firstPulseMs: from * 1000, whole: true };
      lase(deviation, track, shots, span);
      const end = ends[to - first];
      const after = end && meanNear(deviated(end.state, deviation), end.state, end.mean);
      if (!end || !after) throw new Error("no mean elements");
      gain = Math.max(gain, end.value - measure.valueOf(after));
      tried += 1;
    }
  }
  return { gain, tried };
}

const HEAVY: FragmentBody = { ...BODY, massKg: 4 };

describe("the chosen dwell against every stretch of whole seconds, each with its exact effect", () => {
  const anomalies = [0, 45, 90, 180, 270, 315];
  const eccentricities = [0, 0.002, 0.0045, 0.02];
  const grid = anomalies.flatMap((nu) => eccentricities.map((e) => [nu, e] as const));

  it.each(grid)("mean perigee, ν = %i°, e = %f: at least 0.995 of the best", (anomalyDeg, eccentricity) => {
    const profile = profileOf(anomalyDeg, eccentricity, "perigee", HEAVY, 4);
    const { fromMs, toMs } = profile;
    const chosen = chooseDwell({ profile, riseMs: fromMs, openings: [{ fromMs, toMs }], limits: NO_LIMITS });
    const best = bruteForce(profile, 10_000);
    expect(best.tried).toBeGreaterThan(5_000);
    expect(best.gain).toBeGreaterThan(0);
    expect(chosen?.gain ?? 0).toBeGreaterThanOrEqual(0.995 * best.gain);
    expect(chosen?.gain ?? 0).toBeLessThanOrEqual(best.gain * (1 + 1e-9));
  });

  it.each([
    ["decay", 0, 0.0045, BODY],
    ["decay", 180, 0, HEAVY],
    ["decay", 270, 0.02, HEAVY],
    ["energy", 45, 0.002, HEAVY],
    ["perigee", 90, 0.0045, BODY],
    ["perigee", 315, 0.002, BODY],
    ["perigee", 180, 0.0045, { ...BODY, massKg: 40 }],
  ] as const)("%s, ν = %i°, e = %f, with a longest dwell of 60 s", (aim, anomalyDeg, eccentricity, body) => {
    const profile = profileOf(anomalyDeg, eccentricity, aim, body, 4);
    const { fromMs, toMs } = profile;
    const limits = { ...NO_LIMITS, maxDwellS: 60 };
    const chosen = chooseDwell({ profile, riseMs: fromMs, openings: [{ fromMs, toMs }], limits });
    const best = bruteForce(profile, 60);
    expect(best.gain).toBeGreaterThan(0);
    expect(chosen?.gain ?? 0).toBeGreaterThanOrEqual(0.995 * best.gain);
    expect((chosen?.toMs ?? 0) - (chosen?.fromMs ?? 0)).toBeLessThanOrEqual(60_000);
  });

  it("lifetime, ν = 90°, e = 0.002, on a short stretch", () => {
    const pass = passOver({ eccentricity: 0.002 }, 90, { minElevationDeg: 60, offsetDeg: 2 });
    const built = buildProfile({ ...pass, laser: LASER, body: HEAVY, stepS: 2, aim: "lifetime" });
    if (!built.ok) throw new Error(built.reason);
    const { profile } = built;
    const { fromMs, toMs } = profile;
    const chosen = chooseDwell({ profile, riseMs: fromMs, openings: [{ fromMs, toMs }], limits: NO_LIMITS });
    const best = bruteForce(profile, 10_000);
    expect(chosen?.gain ?? 0).toBeGreaterThanOrEqual(0.995 * best.gain);
  });

  it("is quick: a whole pass is settled in far fewer exact evaluations than there are stretches", () => {
    const profile = profileOf(90, 0.002, "perigee", HEAVY, 4);
    const { fromMs, toMs } = profile;
    let asked = 0;
    const measure = {
      ...profile.measure,
      valueOf: (m: Parameters<typeof profile.measure.valueOf>[0]) => {
        asked += 1;
        return profile.measure.valueOf(m);
      },
    };
    const args = {
      profile: { ...profile, measure },
      riseMs: fromMs,
      openings: [{ fromMs, toMs }],
      limits: NO_LIMITS,
    };
    expect(chooseDwell(args)).not.toBeNull();
    expect(asked / 2).toBeLessThan(120);
  });
});
