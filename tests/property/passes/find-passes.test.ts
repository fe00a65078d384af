import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { findPasses, type PassStation } from "@/lib/physics/passes/find-passes";
import { densePasses } from "../../fixtures/dense-passes";

const DAY_MS = 86_400_000;
const EPOCH_MS = Date.UTC(2031, 3, 6, 3, 12, 45, 123);

const angle = fc.double({ min: 0, max: 359.999, noNaN: true });

/** Any orbit that keeps above some 200 km: low and round, medium, high, and long ellipses. */
const elements: fc.Arbitrary<Elements> = fc
  .record({
    perigeeKm: fc.double({ min: 6600, max: 9000, noNaN: true }),
    eccentricity: fc.oneof(
      fc.double({ min: 0, max: 0.02, noNaN: true }),
      fc.double({ min: 0.02, max: 0.12, noNaN: true }),
      fc.double({ min: 0.12, max: 0.75, noNaN: true }),
    ),
    // Towards 180 degrees SGP4's long-period terms grow without bound and its positions jump.
    inclinationDeg: fc.double({ min: 0, max: 175, noNaN: true }),
    raanDeg: angle,
    argPericenterDeg: angle,
    meanAnomalyDeg: angle,
    bstar: fc.double({ min: 0, max: 5e-4, noNaN: true }),
  })
  .map(({ perigeeKm, ...rest }) => {
    const semiMajorKm = perigeeKm / (1 - rest.eccentricity);
    const meanMotionRevPerDay = (86400 / (2 * Math.PI)) * Math.sqrt(398600.8 / semiMajorKm ** 3);
    const fixed = { catalogNumber: 990002, objectName: null, objectId: null, epochMs: EPOCH_MS };
    return { ...fixed, ...rest, meanMotionRevPerDay, meanMotionDot: 0, meanMotionDdot: 0 };
  });

const station: fc.Arbitrary<PassStation> = fc
  .record({
    latitudeDeg: fc.double({ min: -90, max: 90, noNaN: true }),
    longitudeDeg: fc.double({ min: -180, max: 180, noNaN: true }),
    altitudeM: fc.double({ min: -50, max: 5000, noNaN: true }),
    limitDeg: fc.double({ min: -1, max: 70, noNaN: true }),
  })
  .map(({ limitDeg, ...site }) => ({ site, minElevationRad: limitDeg * DEG }));

describe("the search for passes, over any orbit and any station", () => {
  it("finds what a dense scan of SGP4 finds within 0.1 s, and nothing else", () => {
    fc.assert(
      fc.property(elements, station, (set, at) => {
        const made = makeOrbit(set);
        fc.pre(made.ok);
        if (!made.ok) return;
        const stepMs = 20_000;
        const wanted = densePasses(made.orbit, at, EPOCH_MS, EPOCH_MS + DAY_MS, stepMs);
        const { passes, failure } = findPasses(made.orbit, [at], EPOCH_MS, EPOCH_MS + DAY_MS);
        expect(failure).toBeNull();
        const mine = passes.map((p) => p.pass);
        // A dip or a pass shorter than the scan's step is seen by the search alone.
        const long = mine.filter((p) => p.setMs - p.riseMs > stepMs);
        for (const want of wanted) {
          expect(mine.some((p) => Math.abs(p.riseMs - want.riseMs) < 100)).toBe(true);
          expect(mine.some((p) => Math.abs(p.setMs - want.setMs) < 100)).toBe(true);
        }
        for (const pass of long) {
          const within = wanted.some((w) => w.riseMs < pass.riseMs + 100 && w.setMs > pass.setMs - 100);
          expect(within).toBe(true);
        }
      }),
      { numRuns: 60, seed: 20310406 },
    );
  });

  it("gives the same passes when the time is cut anywhere", () => {
    fc.assert(
      fc.property(elements, station, fc.integer({ min: 1, max: DAY_MS - 1 }), (set, at, cutMs) => {
        const made = makeOrbit(set);
        fc.pre(made.ok);
        if (!made.ok) return;
        const cut = EPOCH_MS + cutMs;
        const search = (fromMs: number, toMs: number) =>
          findPasses(made.orbit, [at], fromMs, toMs).passes.map((p) => p.pass);
        const whole = search(EPOCH_MS, EPOCH_MS + DAY_MS);
        const [before, after] = [search(EPOCH_MS, cut), search(cut, EPOCH_MS + DAY_MS)];
        const rises = [...before, ...after.filter((p) => !p.underWayAtFrom)].map((p) => p.riseMs);
        const sets = [...before.filter((p) => !p.underWayAtTo), ...after].map((p) => p.setMs);
        expect(rises).toHaveLength(whole.length);
        for (const [i, pass] of whole.entries()) {
          expect(Math.abs((rises[i] ?? Number.NaN) - pass.riseMs)).toBeLessThan(20);
          expect(Math.abs((sets[i] ?? Number.NaN) - pass.setMs)).toBeLessThan(20);
        }
      }),
      { numRuns: 200, seed: 20310406 },
    );
  });

  it("is in order: rise, culmination, set; and its numbers are what they say", () => {
    fc.assert(
      fc.property(elements, station, (set, at) => {
        const made = makeOrbit(set);
        fc.pre(made.ok);
        if (!made.ok) return;
        for (const { pass } of findPasses(made.orbit, [at], EPOCH_MS, EPOCH_MS + DAY_MS).passes) {
          expect(pass.riseMs).toBeLessThan(pass.setMs);
          expect(pass.culminateMs).toBeGreaterThanOrEqual(pass.riseMs);
          expect(pass.culminateMs).toBeLessThanOrEqual(pass.setMs);
          expect(pass.maxElevationRad).toBeGreaterThanOrEqual(at.minElevationRad - 1e-6);
          expect(pass.minRangeKm).toBeGreaterThan(100);
          for (const azimuth of [pass.riseAzimuthRad, pass.culminationAzimuthRad, pass.setAzimuthRad]) {
            expect(azimuth).toBeGreaterThanOrEqual(0);
            expect(azimuth).toBeLessThan(2 * Math.PI);
          }
        }
      }),
      { numRuns: 200, seed: 20310406 },
    );
  });
});
