import { describe, expect, it } from "vitest";
import { densityKgPerM3, scaleHeightKm } from "@/lib/physics/effect/atmosphere";
import { decayRates, roughLifetimeDays } from "@/lib/physics/effect/lifetime";

const RE = 6378.137;
const MU = 398600.4418;

describe("exponential atmosphere", () => {
  // Published: Vallado's example 8-4 (SatelliteToolboxAtmosphericModels.jl at f12f3b129ab1; the assertion's
  // exponent, -14, is the right one).
  it("gives 2.1219854e-14 kg/m³ at 747.2119 km", () => {
    expect(densityKgPerM3(747.2119) / 2.1219854e-14).toBeCloseTo(1, 8);
  });

  it("is nearly continuous where its layers meet, as table 8-4 is", () => {
    for (const altitude of [110, 150, 200, 300, 400, 500, 600, 700, 800, 900, 1000]) {
      const ratio = densityKgPerM3(altitude - 1e-6) / densityKgPerM3(altitude);
      expect(Math.abs(ratio - 1)).toBeLessThan(0.02);
    }
    expect(scaleHeightKm(850)).toBe(124.64);
  });
});

describe("decay of circular orbits, Cd·A/m 0.22 m²/kg", () => {
  // Recomputed independently from -ρ (Cd A/m) √(µ a): m/day, and H/|da/dt| in days.
  it.each([
    [500, -693, 92.0],
    [400, -3680, 15.9],
    [300, -23713, 2.26],
    [200, -271460, 0.137],
  ])("at %i km falls %f m/day", (altitude, metresPerDay, days) => {
    const rate = decayRates(RE + altitude, 0, 0.1).semiMajorAxisKmPerS * 86400e3;
    expect(Math.abs(rate / metresPerDay - 1)).toBeLessThan(1e-3);
    const eFold = (scaleHeightKm(altitude) * 1000) / Math.abs(rate);
    expect(Math.abs(eFold / days - 1)).toBeLessThan(4e-3);
    // The lifetime is of the order of the e-fold time; the lower air's smaller scale height shortens it.
    const ratio = roughLifetimeDays(RE + altitude, 0, 0.1) / eFold;
    expect(ratio).toBeGreaterThan(0.5);
    expect(ratio).toBeLessThan(1.1);
  });
});

describe("decay of eccentric orbits", () => {
  // King-Hele 1987 (from memory): L = (3 e P / 4|dP/dt|) (1 + 7e/6 + H / 2ae) for 0.02 < e < 0.2, itself
  // good to some 10 % in an atmosphere of one scale height.
  it.each([
    [250, 0.03],
    [250, 0.08],
    [400, 0.05],
    [400, 0.15],
  ])("perigee %i km, e %f: near King-Hele's closed form", (perigeeKm, e) => {
    const a = (RE + perigeeKm) / (1 - e);
    const periodDays = (2 * Math.PI * Math.sqrt(a ** 3 / MU)) / 86400;
    const periodRate = (1.5 * periodDays * Math.abs(decayRates(a, e, 0.1).semiMajorAxisKmPerS) * 86400) / a;
    const h = scaleHeightKm(perigeeKm);
    const closed = ((3 * e * periodDays) / (4 * periodRate)) * (1 + (7 * e) / 6 + h / (2 * a * e));
    expect(Math.abs(roughLifetimeDays(a, e, 0.1) / closed - 1)).toBeLessThan(0.06);
  });

  it("is shorter for a lower perigee, a lower apogee and more area", () => {
    const base = roughLifetimeDays(7000, 0.01, 0.1);
    expect(roughLifetimeDays(6990, 0.01, 0.1)).toBeLessThan(base);
    expect(roughLifetimeDays(7000, 0.012, 0.1)).toBeLessThan(base);
    expect(roughLifetimeDays(7000, 0.01, 0.2) / base).toBeCloseTo(0.5, 6);
    expect(roughLifetimeDays(6490, 0.001, 0.1)).toBe(0);
  });
});
