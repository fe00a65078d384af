import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { airmass, transmission } from "@/lib/physics/beam/atmosphere";
import { jitterFactor } from "@/lib/physics/beam/fluence";
import { interceptedShare, spotDiameterM } from "@/lib/physics/beam/spot";

const elevation = fc.double({ min: 0, max: Math.PI / 2, noNaN: true });

describe("beam laws", () => {
  it("lose less light the higher the fragment stands", () => {
    fc.assert(
      fc.property(elevation, elevation, fc.double({ min: 0.05, max: 0.99, noNaN: true }), (a, b, zenith) => {
        const [low, high] = a < b ? [a, b] : [b, a];
        expect(transmission(zenith, high)).toBeGreaterThanOrEqual(transmission(zenith, low) - 1e-12);
      }),
    );
  });

  it("refuse the sky under the horizon by name", () => {
    expect(() => airmass(-1e-9)).toThrow("below 0");
    expect(() => airmass(Number.NaN)).toThrow(RangeError);
  });

  it("keep shares and factors between 0 and 1", () => {
    const positive = fc.double({ min: 1e-3, max: 1e3, noNaN: true });
    fc.assert(
      fc.property(positive, positive, positive, (a, b, c) => {
        for (const value of [interceptedShare(a, b), jitterFactor(a, b, c)]) {
          expect(value).toBeGreaterThanOrEqual(0);
          expect(value).toBeLessThanOrEqual(1);
        }
      }),
    );
  });

  it("average a Gaussian spot over Gaussian jitter, by brute summation", () => {
    // Independent of the closed form: the mean of exp(-2ρ²/w²) over offsets on a fine grid.
    const [w, s] = [0.2, 0.07];
    let sum = 0;
    let weight = 0;
    for (let x = -0.6; x <= 0.6; x += 0.004) {
      for (let y = -0.6; y <= 0.6; y += 0.004) {
        const p = Math.exp(-(x * x + y * y) / (2 * s * s));
        sum += p * Math.exp((-2 * (x * x + y * y)) / (w * w));
        weight += p;
      }
    }
    expect(jitterFactor(0.07, 1000, 2 * w)).toBeCloseTo(sum / weight, 6);
  });

  it("grow the spot in proportion to the range", () => {
    const optics = {
      wavelengthNm: 1064,
      apertureM: 4,
      beamQuality: 1.5,
      spotConvention: "gaussian" as const,
    };
    fc.assert(
      fc.property(fc.double({ min: 200, max: 3000, noNaN: true }), (rangeKm) => {
        expect(spotDiameterM(optics, 2 * rangeKm) / spotDiameterM(optics, rangeKm)).toBeCloseTo(2, 12);
      }),
    );
  });
});
