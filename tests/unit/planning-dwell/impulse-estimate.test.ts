import { describe, expect, it } from "vitest";
import { chooseDwell } from "@/lib/planning/choose-dwell";
import { effectOfDwell } from "@/lib/planning/effect";
import { type ImpulseQuestion, impulseEstimate } from "@/lib/planning/impulse-estimate";
import { buildProfile } from "@/lib/planning/profile";
import { BODY, LASER, passOver } from "../../fixtures/pass-over";

const pass = passOver({ eccentricity: 0.002 }, 45, { minElevationDeg: 20, offsetDeg: 4 });
const QUESTION: ImpulseQuestion = {
  station: pass.frame.site,
  laser: LASER,
  fragment: BODY,
  elements: pass.orbit.elements,
  fromMs: pass.fromMs,
  toMs: pass.toMs,
  aim: "decay",
};

describe("impulse estimate", () => {
  it("answers with samples, effect and the best stretch, as the parts give them", () => {
    const asked = impulseEstimate(QUESTION);
    if (!asked.ok) throw new Error(asked.reason);
    const { estimate } = asked;
    const worked = effectOfDwell({ ...pass, laser: LASER, body: BODY });
    const built = buildProfile({ ...pass, laser: LASER, body: BODY, stepS: 1, aim: "decay" });
    if (!worked.ok || !built.ok) throw new Error("no effect");
    expect(estimate).toMatchObject(worked.effect);
    expect(estimate.samples).toEqual(built.profile.samples);
    expect(estimate.measure).toBe("semi-major axis");
    const free = {
      acquisitionS: 0,
      guardS: 0,
      minDwellS: 1,
      maxDwellS: 1e6,
      maxPulses: null,
      maxEnergyJ: null,
    };
    const best = chooseDwell({
      profile: built.profile,
      riseMs: pass.fromMs,
      openings: [pass],
      limits: { ...free, maxHeatingS: null },
    });
    expect(estimate.best).toEqual({ fromMs: best?.fromMs, toMs: best?.toMs });
  });

  it("has no best stretch when none serves the aim", () => {
    const asked = impulseEstimate({ ...QUESTION, laser: { ...LASER, pulseEnergyJ: 5 } });
    if (!asked.ok) throw new Error(asked.reason);
    expect(asked.estimate.best).toBeNull();
    expect(asked.estimate.deltaV).toEqual({ radialMPerS: 0, transverseMPerS: 0, normalMPerS: 0 });
    const { semiMajorAxisAfterKm, semiMajorAxisBeforeKm } = asked.estimate;
    expect(semiMajorAxisAfterKm.p50).toBeCloseTo(semiMajorAxisBeforeKm, 6);
  });

  it.each([
    [{ laser: { mode: "continuous" as const } }, "laser.mode", "Continuous lasers are not modelled yet"],
    [{ laser: { ...LASER, beamQuality: 0 } }, "laser.beamQuality", "beamQuality"],
    [{ fragment: { ...BODY, massKg: -1 } }, "fragment.massKg", "massKg"],
    [{ fragment: { ...BODY, massKg: 1e-5 } }, "fragment", "bound orbit"],
    [{ station: { ...pass.frame.site, latitudeDeg: 91 } }, "station.latitudeDeg", "latitudeDeg"],
    [{ station: { ...pass.frame.site, longitudeDeg: Number.NaN } }, "station.longitudeDeg", "longitudeDeg"],
    [{ station: { ...pass.frame.site, altitudeM: 1e6 } }, "station.altitudeM", "altitudeM"],
    [{ elements: { ...pass.orbit.elements, eccentricity: 1.2 } }, "elementSet", "eccentricity"],
    [{ toMs: pass.fromMs }, "to", "later than from"],
    [{ toMs: pass.fromMs + 2 * 86_400_000 }, "to", "24 hours"],
    [{ fromMs: pass.fromMs - 900_000 }, "from", "horizon"],
  ])("is refused with the path of the value: %j", (change, path, words) => {
    const asked = impulseEstimate({ ...QUESTION, ...change });
    expect(asked.ok ? null : [asked.path, asked.reason]).toEqual([path, expect.stringContaining(words)]);
  });

  it("answers long intervals with at most 1,200 samples", () => {
    // A fragment some 10,000 km up stands over the station for hours.
    const high = passOver({ meanMotionRevPerDay: 4.5 }, 45, { minElevationDeg: 40, offsetDeg: 4 });
    const asked = impulseEstimate({
      ...QUESTION,
      station: high.frame.site,
      elements: high.orbit.elements,
      fromMs: high.fromMs,
      toMs: high.toMs,
    });
    if (!asked.ok) throw new Error(asked.reason);
    expect(high.toMs - high.fromMs).toBeGreaterThan(1_200_000);
    expect(asked.estimate.samples.length).toBeLessThanOrEqual(1200);
  });
});
