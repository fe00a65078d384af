import { describe, expect, it } from "vitest";
import { meanPerigeeAltitudeKm } from "@/lib/physics/effect/mean-elements";
import { makeTrack } from "@/lib/physics/effect/track";
import { bandsAfter, DEFAULT_KNOWLEDGE } from "@/lib/planning/dwell-band";
import { meltOnset, shortestMeltS } from "@/lib/planning/dwell-heat";
import { nudgeOf } from "@/lib/planning/dwell-nudge";
import { makeShots } from "@/lib/planning/dwell-shots";
import { effectOfDwell } from "@/lib/planning/effect";
import { buildProfile } from "@/lib/planning/profile";
import { BODY, LASER, passOver } from "../../fixtures/pass-over";

const pass = passOver({ eccentricity: 0.01 }, 70, { minElevationDeg: 20, offsetDeg: 4 });
const dwell = { fromMs: pass.fromMs + 40_000, toMs: pass.fromMs + 100_000 };
const laser = { ...LASER, jitterUrad: 0.03 };

function effectFor(change: object = {}) {
  const worked = effectOfDwell({ ...pass, ...dwell, laser, body: BODY, ...change });
  if (!worked.ok) throw new Error(worked.reason);
  return worked.effect;
}

describe("effect of a dwell", () => {
  it("counts pulses and energy", () => {
    const effect = effectFor();
    expect(effect.pulses).toBe(Math.ceil(60 * 11.2));
    expect(effect.energyJ).toBe(effect.pulses * 7300);
  });

  it("has the velocity change that the profile's samples add up to", () => {
    const built = buildProfile({ ...pass, ...dwell, laser, body: BODY, stepS: 1, aim: "decay" });
    if (!built.ok) throw new Error(built.reason);
    const sum = (of: "radial" | "transverse" | "normal") =>
      built.profile.samples.reduce((total, s) => total + s[of], 0);
    const { deltaV } = effectFor();
    // Left-hand samples against middles of seconds, and the nudged place against the untouched one.
    expect(Math.abs(deltaV.radialMPerS / sum("radial") - 1)).toBeLessThan(0.03);
    expect(Math.abs(deltaV.transverseMPerS / sum("transverse") - 1)).toBeLessThan(0.03);
    expect(Math.abs(deltaV.normalMPerS / sum("normal") - 1)).toBeLessThan(0.05);
  });

  it("changes the semi-major axis by 2 a² v Δv / µ to first order", () => {
    // The linear form is a check only: a weak push, 0.1 % of the strong one.
    const effect = effectFor({ body: { ...BODY, massKg: 200 } });
    const a = effect.semiMajorAxisBeforeKm;
    const made = makeTrack(pass.orbit, pass.frame, dwell.fromMs, dwell.toMs);
    if (!made.ok) throw new Error(made.reason);
    const nudge = nudgeOf(made.track, makeShots(laser, { ...BODY, massKg: 200 }), dwell.fromMs, dwell.toMs);
    if (!nudge) throw new Error("no nudge");
    const { rKm, vKmPerS } = made.track.at((dwell.fromMs + dwell.toMs) / 2).state;
    const r = Math.hypot(rKm.x, rKm.y, rKm.z);
    const vr = (rKm.x * vKmPerS.x + rKm.y * vKmPerS.y + rKm.z * vKmPerS.z) / r;
    const vt = Math.sqrt(vKmPerS.x ** 2 + vKmPerS.y ** 2 + vKmPerS.z ** 2 - vr * vr);
    const linear =
      ((2 * a * a) / 398600.8) * (vr * effect.deltaV.radialMPerS + vt * effect.deltaV.transverseMPerS) * 1e-3;
    expect(Math.abs((nudge.after.semiMajorAxisKm - a) / linear - 1)).toBeLessThan(0.02);
  });

  it("lowers the orbit of an approaching fragment, with the bands in order", () => {
    const effect = effectFor();
    for (const band of [effect.semiMajorAxisAfterKm, effect.perigeeAfterKm]) {
      expect(band.p10).toBeLessThan(band.p50);
      expect(band.p50).toBeLessThan(band.p90);
    }
    expect(effect.semiMajorAxisAfterKm.p90).toBeLessThan(effect.semiMajorAxisBeforeKm);
  });

  it("is the same at every call", () => {
    expect(effectFor()).toEqual(effectFor());
  });

  it.each([
    [{ toMs: dwell.fromMs }, "later than from"],
    [{ laser: { ...laser, strehl: 2 } }, "strehl"],
    [{ body: { ...BODY, areaM2: 0 } }, "areaM2"],
    [{ fromMs: pass.fromMs - 600_000 }, "horizon"],
    [{ body: { ...BODY, massKg: 1e-5 } }, "bound orbits"],
  ])("is refused by name: %j", (change, words) => {
    const worked = effectOfDwell({ ...pass, ...dwell, laser, body: BODY, ...change });
    expect(worked.ok ? "" : worked.reason).toContain(words);
  });
});

describe("bands", () => {
  /** The i-th number of the Halton sequence of a base: evenly spread over 0 to 1. */
  function halton(i: number, base: number): number {
    let [value, share] = [0, 1 / base];
    for (let rest = i; rest > 0; rest = Math.floor(rest / base)) {
      value += share * (rest % base);
      share /= base;
    }
    return value;
  }

  /** Two independent normal deviates of an evenly spread pair (Box and Muller). */
  function normals(i: number, bases: readonly [number, number]): [number, number] {
    const size = Math.sqrt(-2 * Math.log(1 - halton(i, bases[0])));
    const angle = 2 * Math.PI * halton(i, bases[1]);
    return [size * Math.cos(angle), size * Math.sin(angle)];
  }

  // Independent of the quadrature: 4,000 fragments spread by Halton's sequence and pointings, each lased by itself.
  it.each([
    ["strong", 0.2, 0.03],
    ["feeble, large jitter", 5, 0.15],
  ])("agree with drawn fragments: %s", (_, massKg, jitterUrad) => {
    const body = { ...BODY, massKg };
    const shaky = { ...LASER, jitterUrad };
    const made = makeTrack(pass.orbit, pass.frame, dwell.fromMs, dwell.toMs);
    if (!made.ok) throw new Error(made.reason);
    const { track } = made;
    const bands = bandsAfter(track, shaky, body, dwell.fromMs, dwell.toMs);
    if (!bands) throw new Error("no bands");
    const factor = (p90: number, sigmas: number): number => p90 ** (sigmas / 1.2815515655446004);
    const { mass, area, pointingResidual } = DEFAULT_KNOWLEDGE;
    const drawn = Array.from({ length: 4000 }, (_unused, i) => {
      const [forMass, forArea] = normals(i + 1, [2, 3]);
      const [forCoupling, forPointing] = normals(i + 1, [5, 7]);
      const one = {
        ...body,
        massKg: massKg * factor(mass.value, forMass),
        areaM2: BODY.areaM2 * factor(area.value, forArea),
      };
      const beam = { ...shaky, jitterUrad: jitterUrad * factor(pointingResidual.value, forPointing) };
      const shots = makeShots(beam, one, { strength: factor(2, forCoupling), area: 1, jitter: 1 });
      const nudge = nudgeOf(track, shots, dwell.fromMs, dwell.toMs);
      if (!nudge) throw new Error("no nudge");
      return { axis: nudge.after.semiMajorAxisKm, perigee: meanPerigeeAltitudeKm(nudge.after) };
    });
    const percentile = (of: "axis" | "perigee", share: number): number =>
      drawn.map((d) => d[of]).sort((a, b) => a - b)[Math.floor(share * drawn.length)] ?? Number.NaN;
    for (const [of, band] of [
      ["axis", bands.axisKm],
      ["perigee", bands.perigeeKm],
    ] as const) {
      const width = band.p90 - band.p10;
      expect(width).toBeGreaterThan(0);
      expect(Math.abs(percentile(of, 0.1) - band.p10) / width).toBeLessThan(0.03);
      expect(Math.abs(percentile(of, 0.5) - band.p50) / width).toBeLessThan(0.03);
      expect(Math.abs(percentile(of, 0.9) - band.p90) / width).toBeLessThan(0.03);
    }
  });

  it("close on the stated value when everything is known but the coupling, by its factor of two", () => {
    const known = { value: 1, source: "measured" };
    const knowledge = { mass: known, area: known, pointingResidual: known };
    const body = { ...BODY, massKg: 50 };
    const effect = effectFor({ body, knowledge });
    const drop = (km: number): number => effect.semiMajorAxisBeforeKm - km;
    const made = makeTrack(pass.orbit, pass.frame, dwell.fromMs, dwell.toMs);
    if (!made.ok) throw new Error(made.reason);
    const nudge = nudgeOf(made.track, makeShots(laser, body), dwell.fromMs, dwell.toMs);
    const stated = drop(nudge?.after.semiMajorAxisKm ?? Number.NaN);
    expect(drop(effect.semiMajorAxisAfterKm.p50) / stated).toBeCloseTo(1, 2);
    // A weak push is linear: P10 and P90 of the drop lie at half and double.
    expect(drop(effect.semiMajorAxisAfterKm.p10) / stated).toBeCloseTo(2, 1);
    expect(drop(effect.semiMajorAxisAfterKm.p90) / stated).toBeCloseTo(0.5, 1);
  });
});

describe("melting", () => {
  it("comes when the heat of the steps reaches the melting heat", () => {
    expect(meltOnset([10, 20, 30], 1, 3, 25)).toBeCloseTo(1.75, 12);
    expect(meltOnset([10, 20, 30], 1, 2.5, 60)).toBeNull();
    expect(meltOnset([10, 20, 30], 1, 3, 60)).toBeCloseTo(3, 12);
    expect(meltOnset([0, 0, 0], 1, 3, 1)).toBeNull();
  });

  it("comes soonest where the fragment is heated most", () => {
    expect(shortestMeltS([1, 1, 10, 10, 1, 1], 2, 30)).toBeCloseTo(3, 12);
    expect(shortestMeltS([0, 0, 5, 0], 1, 5)).toBeCloseTo(1, 12);
    expect(shortestMeltS([1, 1, 1], 1, 3.5)).toBeNull();
  });

  it("spares every dwell of a pass that is shorter than the profile's limit", () => {
    const built = buildProfile({ ...pass, laser, body: BODY, stepS: 2, aim: "decay" });
    if (!built.ok) throw new Error(built.reason);
    const limit = built.profile.meltOnsetS;
    if (limit === null) throw new Error("this laser melts this fragment");
    let melted = 0;
    for (let fromMs = pass.fromMs; fromMs + (limit + 5) * 1000 < pass.toMs; fromMs += 11_000) {
      const at = (seconds: number) => effectFor({ fromMs, toMs: fromMs + seconds * 1000 }).meltOnsetS;
      expect(at(Math.floor(limit * 0.98))).toBeNull();
      if (at(limit + 5) !== null) melted += 1;
    }
    expect(melted).toBeGreaterThan(0);
  });

  it("comes after the same velocity change whatever the mass", () => {
    const deltaVAtMelt = (massKg: number): number => {
      const body = { ...BODY, massKg, couplingNPerW: 40e-6 };
      const onset = effectFor({ body }).meltOnsetS;
      if (onset === null) throw new Error("does not melt");
      const { deltaV } = effectFor({ body, toMs: dwell.fromMs + onset * 1000 });
      return Math.hypot(deltaV.radialMPerS, deltaV.transverseMPerS, deltaV.normalMPerS);
    };
    expect(Math.abs(deltaVAtMelt(0.1) / deltaVAtMelt(0.2) - 1)).toBeLessThan(0.05);
  });
});
