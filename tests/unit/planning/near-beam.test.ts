import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { lookAngles, makeSiteFrame, temeToEcef } from "@/lib/physics/frames/earth";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { nearBeam } from "@/lib/planning/near-beam";

const EPOCH = Date.UTC(2031, 3, 6);
const TARGET: Elements = {
  catalogNumber: 90_001,
  objectName: null,
  objectId: null,
  epochMs: EPOCH,
  meanMotionRevPerDay: 14.4,
  eccentricity: 0.004,
  inclinationDeg: 74,
  raanDeg: 120,
  argPericenterDeg: 80,
  meanAnomalyDeg: 20,
  bstar: 0,
  meanMotionDot: 0,
  meanMotionDdot: 0,
};
const orbitOf = (elements: Elements): Orbit => {
  const made = makeOrbit(elements);
  if (!made.ok) throw new Error(made.reason);
  return made.orbit;
};
const site = { latitudeDeg: 46.5, longitudeDeg: 8.2, altitudeM: 1400 };
const frame = makeSiteFrame(site);
const target = orbitOf(TARGET);
const [found] = findPasses(
  target,
  [{ site, minElevationRad: 20 * DEG }],
  EPOCH,
  EPOCH + 48 * 3_600_000,
).passes;
if (!found) throw new Error("the orbit must have a pass");
const { riseMs, setMs } = found.pass;

/** Angle between both as the station sees them, by the cosine rule on azimuth and elevation. */
function apartDeg(other: Orbit, atMs: number): number {
  const [a, b] = [target, other].map((orbit) => {
    const at = orbit.stateAt(atMs);
    if (!at.ok) throw new Error(at.reason);
    return lookAngles(frame, temeToEcef(at.state, atMs));
  });
  if (!a || !b) throw new Error("both have a direction");
  const cosine =
    Math.sin(a.elevationRad) * Math.sin(b.elevationRad) +
    Math.cos(a.elevationRad) * Math.cos(b.elevationRad) * Math.cos(a.azimuthRad - b.azimuthRad);
  return Math.acos(cosine) / DEG;
}

describe("nearBeam", () => {
  // A follower 2.5° behind, near while it is far from the station only; one on the far side of the Earth.
  const others = [
    orbitOf({ ...TARGET, meanAnomalyDeg: TARGET.meanAnomalyDeg - 2.5 }),
    orbitOf({ ...TARGET, meanAnomalyDeg: TARGET.meanAnomalyDeg + 180 }),
  ];
  const within = 10;
  const { near, failed } = nearBeam({
    frame,
    target,
    others: others.map((orbit) => ({ orbit, withinRad: within * DEG })),
    fromMs: riseMs,
    toMs: setMs,
  });

  it("finds just what a scan of the whole pass finds within the angle", () => {
    expect(failed).toEqual([]);
    expect(new Set(near.map(({ index }) => index))).toEqual(new Set([0]));
    const follower = others[0] as Orbit;
    expect(near[0]?.toMs ?? 0).toBeLessThan(setMs - 30_000);
    for (let atMs = riseMs + 1; atMs < setMs; atMs += 500) {
      const apart = apartDeg(follower, atMs);
      // At the very edge both are right.
      if (Math.abs(apart - within) < 0.05) continue;
      expect(near.some(({ fromMs, toMs }) => fromMs <= atMs && atMs < toMs)).toBe(apart < within);
    }
  });

  it("samples the separation that the directions of both give, the nearest moment among them", () => {
    for (const { samples, minSeparationDeg, minSeparationAtMs } of near) {
      expect(samples.length).toBeGreaterThan(30);
      for (const sample of samples) {
        expect(sample.separationDeg).toBeCloseTo(apartDeg(others[0] as Orbit, sample.atMs), 5);
        expect(sample.separationDeg).toBeGreaterThan(minSeparationDeg - 1e-6);
      }
      const nearest = samples.find((sample) => sample.atMs === minSeparationAtMs);
      expect(nearest?.separationDeg).toBeCloseTo(minSeparationDeg, 5);
    }
  });

  it("names an object that has no state in the pass, and never takes it as far away", () => {
    const decayed = orbitOf({
      ...TARGET,
      meanMotionRevPerDay: 16.4,
      bstar: 0.1,
      epochMs: riseMs - 12 * 86_400_000,
    });
    const seen = nearBeam({
      frame,
      target,
      others: [{ orbit: decayed, withinRad: 0.1 }],
      fromMs: riseMs,
      toMs: setMs,
    });
    expect(seen).toEqual({ near: [], failed: [0] });
  });
});
