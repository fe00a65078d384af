import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit } from "@/lib/physics/orbit/propagate";

const any = fc.double();

/** Numbers of any kind, NaN and infinities among them. */
const wild: fc.Arbitrary<Elements> = fc.record({
  catalogNumber: fc.integer({ min: 1, max: 999_999_999 }),
  objectName: fc.constant(null),
  objectId: fc.constant(null),
  epochMs: fc.oneof(any, fc.double({ min: 0, max: 4e12, noNaN: true })),
  meanMotionRevPerDay: fc.oneof(any, fc.double({ min: 0, max: 20 })),
  eccentricity: fc.oneof(any, fc.double({ min: 0, max: 1 })),
  inclinationDeg: fc.oneof(any, fc.double({ min: 0, max: 180 })),
  raanDeg: fc.oneof(any, fc.double({ min: 0, max: 360 })),
  argPericenterDeg: fc.oneof(any, fc.double({ min: 0, max: 360 })),
  meanAnomalyDeg: fc.oneof(any, fc.double({ min: 0, max: 360 })),
  bstar: fc.oneof(any, fc.double({ min: -0.1, max: 0.1 })),
  meanMotionDot: fc.constant(0),
  meanMotionDdot: fc.constant(0),
});

describe("orbits of any numbers", () => {
  it("are refused with a sentence or give finite states; nothing is thrown", () => {
    fc.assert(
      fc.property(wild, fc.double({ min: -1e11, max: 1e11 }), (elements, afterMs) => {
        const made = makeOrbit(elements);
        if (!made.ok) {
          expect(made.reason).toMatch(/^[A-Z].+\.$/);
          return;
        }
        const got = made.orbit.stateAt(elements.epochMs + afterMs);
        if (!got.ok) {
          expect(got.reason).toMatch(/^Propagation fails at .+\.$/);
          return;
        }
        const { rKm, vKmPerS } = got.state;
        for (const value of [rKm.x, rKm.y, rKm.z, vKmPerS.x, vKmPerS.y, vKmPerS.z]) {
          expect(Number.isFinite(value)).toBe(true);
        }
        expect(Math.hypot(rKm.x, rKm.y, rKm.z)).toBeGreaterThan(6379);
      }),
      { numRuns: 2000, seed: 20310406 },
    );
  });
});
