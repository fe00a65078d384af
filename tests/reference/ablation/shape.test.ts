import { describe, expect, it } from "vitest";
import { axialEfficiency, rimSmearM } from "@/lib/physics/ablation/shape";

/** Mean of f over [0, 1] by the midpoint rule. */
function mean(f: (x: number) => number, steps = 20_000): number {
  let sum = 0;
  for (let i = 0; i < steps; i++) sum += f((i + 0.5) / steps);
  return sum / steps;
}

// dJ = -C Φ cos θ n dA (Liedahl et al. 2013, arXiv 1305.3659): the axial share, per projected area, by
// numerical integration in the test; independent recomputations, not published figures.
describe("axial efficiency", () => {
  it("of a sphere is the integral of cos² over the lit half", () => {
    // dA = 2πR² d(cos θ), axial part cos θ · cos θ, divided by πR².
    expect(axialEfficiency("sphere", null).value).toBeCloseTo(
      mean((c) => 2 * c * c),
      6,
    );
  });

  it("of a cylinder from the side is the integral over its lit half", () => {
    // dA = R L dφ from -π/2 to π/2, divided by 2 R L.
    const integral = mean((x) => (Math.PI / 2) * Math.cos(Math.PI * (x - 0.5)) ** 2);
    expect(axialEfficiency("cylinder", 5).value).toBeCloseTo(integral, 6);
    expect(axialEfficiency("cylinder", null).value).toBeCloseTo(Math.PI / 4, 12);
  });

  it("of a tumbling plate is the mean cos² over all directions", () => {
    expect(axialEfficiency("tumbling-plate", null).value).toBeCloseTo(
      mean((c) => c * c),
      6,
    );
  });

  it("of a plate is one when held, one half when it spins across the beam", () => {
    expect(axialEfficiency("plate", null).value).toBe(1);
    expect(axialEfficiency("plate", 0).value).toBe(1);
    const turn = mean((x) => Math.cos(2 * Math.PI * x) ** 2);
    expect(axialEfficiency("plate", 2).value).toBeCloseTo(turn, 9);
  });
});

describe("a spinning fragment in one pulse", () => {
  // Recomputed independently: 60 rpm, radius 5 cm, 10 ns: 3.1e-9 m.
  it("moves 3.1 nm", () => {
    expect(rimSmearM(1, Math.PI * 0.05 ** 2, 10) * 1e9).toBeCloseTo(3.14, 2);
  });
});
