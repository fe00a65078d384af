import { describe, expect, it } from "vitest";
import { osculatingOrbit, rtnAxes, withImpulse } from "@/lib/physics/effect/two-body";
import type { OrbitState } from "@/lib/physics/orbit/propagate";
import { dot, norm } from "@/lib/physics/vector";

const MU = 398600.4418;
const RE = 6378.137;

/** A circular orbit's state at an altitude. */
function circular(altitudeKm: number, muKm3PerS2 = MU, earthKm = RE): OrbitState {
  const r = earthKm + altitudeKm;
  return { rKm: { x: r, y: 0, z: 0 }, vKmPerS: { x: 0, y: Math.sqrt(muKm3PerS2 / r), z: 0 } };
}

describe("an impulse against the motion on a circular orbit", () => {
  // Recomputed independently by exact two-body algebra (µ 398600.4418, Re 6378.137), every printed digit.
  it.each([
    [600, 7.557865, 50, 6887.3107, 0.013187, 418.347, -184.66],
    [600, 7.557865, 150, 6714.2673, 0.0393, 72.261, -553.98],
    [800, 7.451831, 50, 7083.4001, 0.013374, 610.526, -192.65],
    [800, 7.451831, 150, 6903.0281, 0.039853, 249.782, -577.96],
    [1000, 7.350139, 200, 7002.2537, 0.05368, 248.233, -803.05],
  ])("%i km, v %f km/s, %i m/s", (altitude, speed, deltaV, axis, eccentricity, perigee, linear) => {
    const start = circular(altitude);
    expect(Math.abs(start.vKmPerS.y - speed)).toBeLessThan(5.1e-7);
    const after = osculatingOrbit(withImpulse(start, { x: 0, y: -deltaV, z: 0 }));
    expect(Math.abs(after.semiMajorAxisKm - axis)).toBeLessThan(5.1e-5);
    expect(Math.abs(after.eccentricity - eccentricity)).toBeLessThan(5.1e-7);
    expect(Math.abs(after.perigeeAltitudeKm - perigee)).toBeLessThan(5.1e-4);
    // The linear form, 4 a Δv / v, is a check only: it overshoots by the second order.
    const linearKm = (-4 * (RE + altitude) * deltaV * 1e-3) / start.vKmPerS.y;
    expect(Math.abs(linearKm - linear)).toBeLessThan(5.1e-3);
    const exactKm = after.perigeeAltitudeKm - altitude;
    expect(Math.abs(exactKm / linearKm - 1)).toBeLessThan(0.08);
    expect(exactKm).toBeGreaterThan(linearKm);
  });

  // Recomputed independently: Δv that brings the perigee to 200 km.
  it.each([
    [600, 112.34],
    [800, 164.32],
    [1000, 213.77],
  ])("brings the perigee from %i to 200 km with %f m/s", (altitude, deltaV) => {
    const after = osculatingOrbit(withImpulse(circular(altitude), { x: 0, y: -deltaV, z: 0 }));
    expect(Math.abs(after.perigeeAltitudeKm - 200)).toBeLessThan(0.03);
  });
});

describe("Hohmann transfer of Vallado's example 6-1", () => {
  // Published: 191.3411 to 35781.34857 km, Δv 2.457038635627854 and 1.478187015430896 km/s, µ 398600.4415,
  // Re 6378.1363 (CelesTrak/fundamentals-of-astrodynamics, test_transfer.py at 9655edb85d42).
  it("reaches the far circle with the first burn and rounds it with the second", () => {
    const [mu, earth, target] = [398600.4415, 6378.1363, 6378.1363 + 35781.34857];
    const start = circular(191.3411, mu, earth);
    const transfer = osculatingOrbit(withImpulse(start, { x: 0, y: 2457.038635627854, z: 0 }), mu);
    expect(transfer.semiMajorAxisKm * (1 + transfer.eccentricity)).toBeCloseTo(target, 5);
    const apogeeSpeed = Math.sqrt(mu * (2 / target - 1 / transfer.semiMajorAxisKm));
    const apogee = { rKm: { x: -target, y: 0, z: 0 }, vKmPerS: { x: 0, y: -apogeeSpeed, z: 0 } };
    const end = osculatingOrbit(withImpulse(apogee, { x: 0, y: -1478.187015430896, z: 0 }), mu);
    expect(end.eccentricity).toBeLessThan(1e-9);
    expect(end.semiMajorAxisKm).toBeCloseTo(target, 5);
    const halfPeriodMin = (Math.PI * Math.sqrt(transfer.semiMajorAxisKm ** 3 / mu)) / 60;
    expect(halfPeriodMin).toBeCloseTo(315.40275699, 6);
  });
});

describe("Gauss's equations", () => {
  // Vallado, equation 9-24 (numbering from memory), written out here as a linear check of small impulses.
  it.each([0, 45, 90, 180, 270, 315])("agree with the exact update at ν = %i°", (degrees) => {
    const [a, e, nu] = [7000, 0.02, (degrees * Math.PI) / 180];
    const p = a * (1 - e * e);
    const r = p / (1 + e * Math.cos(nu));
    const root = Math.sqrt(MU / p);
    const start: OrbitState = {
      rKm: { x: r * Math.cos(nu), y: r * Math.sin(nu), z: 0 },
      vKmPerS: { x: -root * Math.sin(nu), y: root * (e + Math.cos(nu)), z: 0 },
    };
    const n = Math.sqrt(MU / a ** 3);
    for (const [radial, transverse] of [
      [0.01, 0],
      [0, 0.01],
      [-0.006, 0.004],
    ] as const) {
      const { radial: rAxis, transverse: tAxis } = rtnAxes(start);
      const kick = {
        x: radial * rAxis.x + transverse * tAxis.x,
        y: radial * rAxis.y + transverse * tAxis.y,
        z: 0,
      };
      const after = osculatingOrbit(withImpulse(start, kick));
      const [fr, fs] = [radial * 1e-3, transverse * 1e-3];
      const da = (2 / (n * Math.sqrt(1 - e * e))) * (e * Math.sin(nu) * fr + (p / r) * fs);
      const inner = Math.cos(nu) + (e + Math.cos(nu)) / (1 + e * Math.cos(nu));
      const de = (Math.sqrt(1 - e * e) / (n * a)) * (Math.sin(nu) * fr + inner * fs);
      expect(Math.abs(after.semiMajorAxisKm - a - da)).toBeLessThan(2e-6);
      expect(Math.abs(after.eccentricity - e - de)).toBeLessThan(2e-10);
    }
  });
});

describe("radial, transverse and normal axes", () => {
  // Published: |r| 7000, v_RSW (6.746917593, 2.812117686, 0) and |v| 7.309507705 along the velocity
  // (CelesTrak/fundamentals-of-astrodynamics, test_frame_conversions.py, test_rv2rsw).
  it("give back the published components of a velocity, whatever the plane", () => {
    const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
    const tilt = (u: number, w: number) => ({ x: c * u - s * 0.6 * w, y: s * u + c * 0.6 * w, z: 0.8 * w });
    const state = { rKm: tilt(7000, 0), vKmPerS: tilt(6.746917593, 2.812117686) };
    const axes = rtnAxes(state);
    expect(dot(state.vKmPerS, axes.radial)).toBeCloseTo(6.746917593, 9);
    expect(dot(state.vKmPerS, axes.transverse)).toBeCloseTo(2.812117686, 9);
    expect(dot(state.vKmPerS, axes.normal)).toBeCloseTo(0, 9);
    expect(norm(state.vKmPerS)).toBeCloseTo(7.309507705, 9);
  });
});
