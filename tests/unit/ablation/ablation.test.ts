import { describe, expect, it } from "vitest";
import { couplingCurve, OPTIMUM_FLUENCE_FACTOR } from "@/lib/physics/ablation/coupling";
import { heatToMeltJ, residualHeatJ } from "@/lib/physics/ablation/heat";
import { MATERIALS, type Material, materialNamed } from "@/lib/physics/ablation/materials";
import { axialEfficiency, type Shape, shapeNamed } from "@/lib/physics/ablation/shape";

const laser = { wavelengthNm: 1064, pulseWidthNs: 5 };

describe("materials", () => {
  it("carry a source beside every value, and it says when nobody re-read it", () => {
    for (const data of Object.values(MATERIALS)) {
      for (const sourced of Object.values(data)) {
        expect(Number.isFinite(sourced.value)).toBe(true);
        expect(sourced.source.length).toBeGreaterThan(10);
      }
      expect(data.couplingAtOptimumNPerW.source).toContain("from memory");
      expect(data.thresholdShare.source).toContain("from memory");
      expect(data.couplingBand).toMatchObject({ value: 2 });
    }
    expect(OPTIMUM_FLUENCE_FACTOR.source).toContain("from memory");
  });

  it("are found by name and refused by name", () => {
    for (const name of Object.keys(MATERIALS)) expect(materialNamed(name)).toBe(name as Material);
    expect(materialNamed("cheese")).toBeNull();
    expect(materialNamed("toString")).toBeNull();
    expect(shapeNamed("sphere")).toBe("sphere" satisfies Shape);
    expect(shapeNamed("constructor")).toBeNull();
  });
});

describe("coupling curve", () => {
  const curve = couplingCurve(MATERIALS.aluminium, laser, null);

  it("is nothing under the threshold and continuous at threshold and optimum", () => {
    expect(curve.thresholdJPerM2).toBeCloseTo(0.1 * curve.optimumJPerM2, 9);
    expect(curve.at(curve.thresholdJPerM2 * 0.999)).toBe(0);
    expect(curve.at(curve.thresholdJPerM2)).toBe(0);
    const [before, after] = [curve.at(curve.optimumJPerM2 * 0.999999), curve.at(curve.optimumJPerM2)];
    expect(before / after).toBeCloseTo(1, 5);
  });

  it("peaks at the optimum", () => {
    const peak = curve.at(curve.optimumJPerM2);
    for (const share of [0.2, 0.5, 0.9, 1.1, 2, 10]) {
      expect(curve.at(share * curve.optimumJPerM2)).toBeLessThan(peak);
      expect(curve.at(share * curve.optimumJPerM2)).toBeGreaterThan(0);
    }
  });

  it("takes a stated coupling as it is, but not under the threshold", () => {
    const stated = couplingCurve(MATERIALS.aluminium, laser, 60e-6);
    expect(stated.at(0.5 * stated.optimumJPerM2)).toBe(60e-6);
    expect(stated.at(5 * stated.optimumJPerM2)).toBe(60e-6);
    expect(stated.at(0.09 * stated.optimumJPerM2)).toBe(0);
  });
});

describe("heat", () => {
  it("reaches the melting point of 100 g of aluminium after 57 kJ", () => {
    // By hand: 0.1 kg × 900 J/(kg K) × 633.5 K.
    expect(heatToMeltJ(MATERIALS.aluminium, 0.1)).toBeCloseTo(57_015, 6);
    expect(residualHeatJ(MATERIALS.aluminium, 1000)).toBe(250);
  });

  it("comes at the same velocity change whatever the mass", () => {
    // Heat per unit of mass and velocity change per pulse both go with 1/mass.
    const deltaVAtMelt = (massKg: number): number => {
      const pulses = heatToMeltJ(MATERIALS.steel, massKg) / residualHeatJ(MATERIALS.steel, 500);
      return (pulses * axialEfficiency("sphere", null).value * 30e-6 * 500) / massKg;
    };
    expect(deltaVAtMelt(0.05)).toBeCloseTo(deltaVAtMelt(5), 9);
  });
});
