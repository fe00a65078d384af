import { describe, expect, it } from "vitest";
import { makeShots } from "@/lib/planning/dwell-shots";
import { BODY, LASER } from "../../fixtures/pass-over";

describe("one pulse", () => {
  const laser = { ...LASER, strehl: 1, zenithTransmission: 0.55, jitterUrad: 0 };
  const body = {
    ...BODY,
    massKg: 0.75,
    areaM2: 0.075,
    couplingNPerW: 75e-6,
    shape: "tumbling-plate" as const,
  };

  // The 2012 station study (Phipps et al., from memory): 7.3 kJ, 13 m, M² 2, a 1.7, 1000 km, 10 kg/m²; its
  // overall efficiency of 0.3 is our tumbling plate's 1/3. By hand: d 0.27723 m, 66,515 J/m², 0.16629 m/s.
  it("has the fluence and velocity change that the formulas give by hand", () => {
    const shot = makeShots(laser, { ...body, areaM2: 0.05, massKg: 0.5 }).at(1000, Math.PI / 2);
    expect(shot.spotDiameterM).toBeCloseTo(0.27723, 5);
    // KY89 at the zenith gives 0.99971, so T is 0.55 to the power of that.
    expect(shot.fluenceJPerM2 / 66_515).toBeCloseTo(1, 3);
    expect(shot.couplingNPerW).toBe(75e-6);
    expect(shot.deltaVMPerS / 0.16629).toBeCloseTo(1, 3);
  });

  it("pushes a fragment wider than the spot with the energy of the spot only", () => {
    const wide = makeShots(laser, { ...body, areaM2: 7.5, massKg: 75 }).at(1000, 1);
    const wider = makeShots(laser, { ...body, areaM2: 75, massKg: 75 }).at(1000, 1);
    expect(wide.deltaVMPerS).toBeCloseTo(wider.deltaVMPerS, 12);
    const narrow = makeShots(laser, { ...body, areaM2: 0.01, massKg: 0.1 }).at(1000, 1);
    expect(narrow.deltaVMPerS).toBeGreaterThan(wide.deltaVMPerS);
  });

  it("gives the same velocity change to the accumulation as to the screens", () => {
    const shots = makeShots(LASER, BODY);
    for (const [range, elevation] of [
      [700, 1.4],
      [1200, 0.5],
      [2500, 0.1],
    ] as const) {
      expect(shots.deltaVPerPulseMPerS(range, elevation)).toBe(shots.at(range, elevation).deltaVMPerS);
    }
  });

  it("varies with the knowledge of fragment and pointing", () => {
    const at = (varied: { strength: number; area: number; jitter: number }) =>
      makeShots({ ...LASER, jitterUrad: 0.05 }, { ...BODY, couplingNPerW: 40e-6 }, varied).at(900, 1)
        .deltaVMPerS;
    const stated = at({ strength: 1, area: 1, jitter: 1 });
    expect(at({ strength: 2, area: 1, jitter: 1 }) / stated).toBeCloseTo(2, 12);
    expect(at({ strength: 1, area: 1.3, jitter: 1 }) / stated).toBeCloseTo(1.3, 9);
    expect(at({ strength: 1, area: 1, jitter: 2 })).toBeLessThan(stated);
  });

  it("moves nothing under the threshold but still warms", () => {
    const shot = makeShots({ ...LASER, pulseEnergyJ: 10 }, BODY).at(1000, 1);
    expect(shot.couplingNPerW).toBe(0);
    expect(shot.deltaVMPerS).toBe(0);
    expect(shot.heatJ).toBeGreaterThan(0);
  });
});
