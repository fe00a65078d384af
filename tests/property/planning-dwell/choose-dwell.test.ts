import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { pulsesBetween } from "@/lib/physics/effect/accumulate";
import { chooseDwell } from "@/lib/planning/choose-dwell";
import { bodyFault, laserFault } from "@/lib/planning/laser";
import { buildProfile } from "@/lib/planning/profile";
import { BODY, LASER, passOver } from "../../fixtures/pass-over";

const pass = passOver({ eccentricity: 0.002 }, 60, { minElevationDeg: 40, offsetDeg: 3 });
const built = buildProfile({ ...pass, laser: LASER, body: BODY, stepS: 4, aim: "perigee" });
if (!built.ok) throw new Error(built.reason);
const { profile } = built;
const lengthS = (pass.toMs - pass.fromMs) / 1000;

/** Milliseconds, spread evenly: fast-check's floating numbers crowd at their ends. */
const ms = (fromS: number, toS: number) =>
  fc.integer({ min: Math.round(fromS * 1000), max: Math.round(toS * 1000) });

const opening = fc.tuple(ms(-50, lengthS), ms(0, 250)).map(([from, length]) => ({
  fromMs: pass.fromMs + from,
  toMs: pass.fromMs + from + length,
}));

const limits = fc.record({
  acquisitionS: ms(0, 60).map((x) => x / 1000),
  guardS: ms(0, 5).map((x) => x / 1000),
  minDwellS: fc.integer({ min: 0, max: 20 }),
  maxDwellS: fc.integer({ min: 5, max: 300 }),
  maxPulses: fc.option(fc.integer({ min: 0, max: 3000 })),
  maxEnergyJ: fc.option(ms(0, 20_000)),
  maxHeatingS: fc.option(ms(0, 100).map((x) => x / 1000)),
});

describe("any dwell that is chosen", () => {
  it("lies in one opening, after acquisition, with its guard, under every limit, and gains", () => {
    let chosenOnes = 0;
    fc.assert(
      fc.property(fc.array(opening, { minLength: 1, maxLength: 4 }), limits, (openings, bounds) => {
        const chosen = chooseDwell({ profile, riseMs: pass.fromMs, openings, limits: bounds });
        if (!chosen) return;
        chosenOnes += 1;
        const { fromMs, toMs, gain } = chosen;
        const seconds = (toMs - fromMs) / 1000;
        expect([fromMs % 1000, toMs % 1000]).toEqual([0, 0]);
        expect(gain).toBeGreaterThan(0);
        expect(fromMs).toBeGreaterThanOrEqual(pass.fromMs + bounds.acquisitionS * 1000);
        const guardMs = bounds.guardS * 1000;
        const inside = openings.filter((o) => o.fromMs + guardMs <= fromMs && toMs <= o.toMs - guardMs);
        expect(inside.length).toBeGreaterThan(0);
        expect(seconds).toBeGreaterThanOrEqual(Math.max(1, bounds.minDwellS));
        expect(seconds).toBeLessThanOrEqual(bounds.maxDwellS);
        expect(seconds).toBeLessThanOrEqual(bounds.maxHeatingS ?? seconds);
        const pulses = pulsesBetween(LASER.repetitionRateHz, 0, seconds);
        expect(pulses).toBeLessThanOrEqual(bounds.maxPulses ?? pulses);
        expect(pulses * LASER.pulseEnergyJ).toBeLessThanOrEqual(
          (bounds.maxEnergyJ ?? Number.POSITIVE_INFINITY) + 1e-3,
        );
      }),
      { numRuns: 150, seed: 20310406 },
    );
    expect(chosenOnes).toBeGreaterThan(10);
  });

  it("never gains less when an opening is added", () => {
    fc.assert(
      fc.property(fc.array(opening, { minLength: 2, maxLength: 4 }), limits, (openings, bounds) => {
        const gain = (of: typeof openings): number =>
          chooseDwell({ profile, riseMs: pass.fromMs, openings: of, limits: bounds })?.gain ?? 0;
        expect(gain(openings)).toBeGreaterThanOrEqual(gain(openings.slice(1)));
      }),
      { numRuns: 30 },
    );
  });
});

describe("faults", () => {
  it("are found in every value that is no finite number, and name the field", () => {
    const numeric = Object.entries(LASER).filter(([, value]) => typeof value === "number");
    expect(numeric.length).toBe(10);
    for (const [field] of numeric) {
      for (const value of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, -1]) {
        expect(laserFault({ ...LASER, [field]: value })?.path).toBe(field);
      }
    }
    fc.assert(
      fc.property(fc.constantFrom("massKg", "areaM2"), fc.double({ max: 0 }), (field, value) => {
        expect(bodyFault({ ...BODY, [field]: value }, 5)?.path).toBe(field);
      }),
    );
  });
});
