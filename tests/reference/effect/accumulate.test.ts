import { describe, expect, it } from "vitest";
import { deviated, lase, noDeviation, type Push } from "@/lib/physics/effect/accumulate";
import { makeTrack } from "@/lib/physics/effect/track";
import { osculatingOrbit, rtnAxes } from "@/lib/physics/effect/two-body";
import { type SiteFrame, siteStateTeme, temeToEcef } from "@/lib/physics/frames/earth";
import type { Orbit, OrbitState } from "@/lib/physics/orbit/propagate";
import { add, dot, norm, scale, subtract, unit, type Vec3 } from "@/lib/physics/vector";
import { ELEMENTS, passOver } from "../../fixtures/pass-over";
import { numericalGravity, rungeKutta } from "./integrate";

const MU = 398600.4418;
const RE = 6378.137;
const T0 = Date.UTC(2031, 3, 6);

/** A circular two-body orbit over the equator, as exact as cosine and sine. */
function circularOrbit(altitudeKm: number): Orbit {
  const r = RE + altitudeKm;
  const n = Math.sqrt(MU / r ** 3);
  const stateAt = (atMs: number) => {
    const u = (n * (atMs - T0)) / 1000;
    const state: OrbitState = {
      rKm: { x: r * Math.cos(u), y: r * Math.sin(u), z: 0 },
      vKmPerS: { x: -r * n * Math.sin(u), y: r * n * Math.cos(u), z: 0 },
    };
    return { ok: true as const, state };
  };
  return { elements: ELEMENTS, periodS: (2 * Math.PI) / n, stateAt };
}

/** A station in free space, `line` away from the fragment at a time, that has the fragment in its zenith. */
function stationAt(fragment: OrbitState, line: Vec3, atMs: number): SiteFrame {
  const fixed = (rKm: Vec3): Vec3 => temeToEcef({ rKm, vKmPerS: { x: 0, y: 0, z: 0 } }, atMs).rKm;
  const up = fixed(unit(scale(line, -1)));
  return {
    site: { latitudeDeg: 0, longitudeDeg: 0, altitudeM: 0 },
    positionKm: fixed(add(fragment.rKm, line)),
    east: up,
    north: up,
    up,
  };
}

describe("one pulse, accumulated", () => {
  // Recomputed independently by exact two-body algebra: circular start, push against the motion.
  it.each([
    [600, 50, 6887.3107, 0.013187, 418.347],
    [600, 150, 6714.2673, 0.0393, 72.261],
    [800, 50, 7083.4001, 0.013374, 610.526],
    [800, 150, 6903.0281, 0.039853, 249.782],
    [1000, 200, 7002.2537, 0.05368, 248.233],
  ])("from %i km with %i m/s ends on the orbit of the closed form", (altitude, deltaV, axis, e, perigee) => {
    const orbit = circularOrbit(altitude);
    const middleMs = T0 + 60_000;
    const at = orbit.stateAt(middleMs);
    if (!at.ok) throw new Error(at.reason);
    const ahead = scale(rtnAxes(at.state).transverse, 100);
    const made = makeTrack(orbit, stationAt(at.state, ahead, middleMs), middleMs - 5, middleMs + 5);
    if (!made.ok) throw new Error(made.reason);
    const push: Push = { repetitionRateHz: 100, deltaVPerPulseMPerS: () => deltaV };
    const deviation = noDeviation();
    const span = { fromMs: middleMs - 5, toMs: middleMs + 5, firstPulseMs: middleMs - 5, whole: true };
    lase(deviation, made.track, push, span);
    expect(deviation.transverse).toBeCloseTo(-deltaV, 6);
    expect(Math.hypot(deviation.radial, deviation.normal)).toBeLessThan(1e-3);
    const after = osculatingOrbit(deviated(made.track.at(middleMs + 5).state, deviation));
    expect(Math.abs(after.semiMajorAxisKm - axis)).toBeLessThan(6e-5);
    expect(Math.abs(after.eccentricity - e)).toBeLessThan(6e-7);
    expect(Math.abs(after.perigeeAltitudeKm - perigee)).toBeLessThan(6e-4);
  });
});

describe("a long dwell, accumulated", () => {
  const pass = passOver({ eccentricity: 0.01 }, 60, { minElevationDeg: 20 });
  const { orbit, frame, fromMs, toMs } = pass;
  // Some 0.3 m/s a second near the zenith, with a lean on elevation.
  const push: Push = {
    repetitionRateHz: 20,
    deltaVPerPulseMPerS: (rangeKm, elevationRad) => (9e3 / rangeKm ** 2) * (0.4 + Math.sin(elevationRad)),
  };
  const startMs = fromMs + 30_137;
  const endMs = toMs - 60_419;

  /** Both paths integrated with a numerical gradient for gravity and a thrust without pulses. */
  function independently(): { dr: Vec3; dv: Vec3; parts: Vec3 } {
    const start = orbit.stateAt(startMs);
    if (!start.ok) throw new Error(start.reason);
    let [left, lased, atMs] = [start.state, start.state, startMs];
    let parts: Vec3 = { x: 0, y: 0, z: 0 };
    const steps = Math.round((endMs - startMs) / 500);
    const stepS = (endMs - startMs) / 1000 / steps;
    for (let i = 0; i < steps; i++) {
      const from = atMs;
      const thrust = (seconds: number, r: Vec3): Vec3 => {
        const site = siteStateTeme(frame, from + seconds * 1000).rKm;
        const line = subtract(r, site);
        const range = norm(line);
        // The vertical turns with the station: rebuilt from the Earth-fixed one by its own components.
        const [c, s] = [
          (frame.positionKm.x * site.x + frame.positionKm.y * site.y) / (site.x ** 2 + site.y ** 2),
          (frame.positionKm.x * site.y - frame.positionKm.y * site.x) / (site.x ** 2 + site.y ** 2),
        ];
        const up = {
          x: c * frame.up.x - s * frame.up.y,
          y: s * frame.up.x + c * frame.up.y,
          z: frame.up.z,
        };
        const perSecond = 20 * push.deltaVPerPulseMPerS(range, Math.asin(dot(line, up) / range));
        return scale(line, (perSecond * 1e-3) / range);
      };
      const axes = rtnAxes(lased);
      const kick = scale(
        thrust(stepS / 2, rungeKutta(lased, stepS / 2, (_, r) => numericalGravity(r)).rKm),
        stepS * 1e3,
      );
      parts = add(parts, {
        x: dot(kick, axes.radial),
        y: dot(kick, axes.transverse),
        z: dot(kick, axes.normal),
      });
      left = rungeKutta(left, stepS, (_, r) => numericalGravity(r));
      lased = rungeKutta(lased, stepS, (t, r) => add(numericalGravity(r), thrust(t, r)));
      atMs += stepS * 1000;
    }
    return { dr: subtract(lased.rKm, left.rKm), dv: subtract(lased.vKmPerS, left.vKmPerS), parts };
  }

  it("agrees with two absolute numerical integrations of the nudged and the untouched path", () => {
    const made = makeTrack(orbit, frame, startMs, endMs);
    if (!made.ok) throw new Error(made.reason);
    const d = noDeviation();
    lase(d, made.track, push, { fromMs: startMs, toMs: endMs, firstPulseMs: startMs, whole: false });
    const truth = independently();
    const [dr, dv] = [norm(truth.dr), norm(truth.dv)];
    expect(dv * 1000).toBeGreaterThan(20);
    expect(norm(subtract({ x: d.x, y: d.y, z: d.z }, truth.dr))).toBeLessThan(2e-4 * dr);
    expect(norm(subtract({ x: d.vx, y: d.vy, z: d.vz }, truth.dv))).toBeLessThan(2e-4 * dv);
    const parts = { x: d.radial, y: d.transverse, z: d.normal };
    expect(norm(subtract(parts, truth.parts))).toBeLessThan(1e-3 * norm(truth.parts));
  });

  it("does not depend on where the second begins", () => {
    const run = (cutMs: number): number => {
      const made = makeTrack(orbit, frame, startMs, endMs);
      if (!made.ok) throw new Error(made.reason);
      const d = noDeviation();
      for (const [from, to] of [
        [startMs, cutMs],
        [cutMs, endMs],
      ] as const) {
        lase(d, made.track, push, { fromMs: from, toMs: to, firstPulseMs: startMs, whole: false });
      }
      return norm({ x: d.vx, y: d.vy, z: d.vz });
    };
    expect(run(startMs + 100_000) / run(startMs + 71_321)).toBeCloseTo(1, 6);
  });
});
