import { describe, expect, it } from "vitest";
import { bodyFault, type FragmentBody, laserFault, type PulsedLaser } from "@/lib/planning/laser";
import { BODY, LASER } from "../../fixtures/pass-over";

describe("a laser setting that the model doesn't cover", () => {
  it("is none of ours", () => {
    expect(laserFault(LASER)).toBeNull();
    expect(laserFault({ ...LASER, spotConvention: "airy", jitterUrad: 0 })).toBeNull();
  });

  it.each([
    ["wavelengthNm", 100],
    ["wavelengthNm", Number.NaN],
    ["pulseEnergyJ", 0],
    ["pulseEnergyJ", -1],
    ["pulseWidthNs", 0.05],
    ["pulseWidthNs", 5000],
    ["repetitionRateHz", 0],
    ["apertureM", 0],
    ["beamQuality", 0.9],
    ["zenithTransmission", 0],
    ["zenithTransmission", 1.01],
    ["strehl", 0],
    ["strehl", Number.POSITIVE_INFINITY],
    ["jitterUrad", -0.1],
    ["spotConvention", 0],
  ] as const)("is refused by the name of its field: %s = %f", (field, value) => {
    const fault = laserFault({ ...LASER, [field]: value });
    expect(fault?.path).toBe(field);
    expect(fault?.reason).toContain(field);
    expect(fault?.reason).toContain("must be from");
  });

  it("is refused when a field is missing, the convention unknown or the laser continuous", () => {
    const { apertureM: _, ...withoutAperture } = LASER;
    expect(laserFault(withoutAperture as PulsedLaser)?.reason).toBe(
      "apertureM must be from 0.01 to 100 m; it is missing.",
    );
    const strange: unknown = { ...LASER, spotConvention: "square" };
    expect(laserFault(strange as PulsedLaser)?.path).toBe("spotConvention");
    const steady: unknown = { ...LASER, mode: "continuous" };
    expect(laserFault(steady as PulsedLaser)).toMatchObject({ path: "mode" });
    expect(laserFault(steady as PulsedLaser)?.reason).toContain("continuous");
  });
});

describe("a fragment that the model doesn't cover", () => {
  it("is none of ours", () => {
    expect(bodyFault(BODY, 5)).toBeNull();
    expect(bodyFault({ ...BODY, couplingNPerW: 40e-6, spinRateHz: 3, shape: "sphere" }, 5)).toBeNull();
  });

  it.each([
    ["massKg", 0],
    ["massKg", Number.NaN],
    ["areaM2", 0],
    ["areaM2", -1],
    ["couplingNPerW", 0],
    ["couplingNPerW", 1],
    ["spinRateHz", -1],
  ] as const)("is refused by the name of its field: %s = %f", (field, value) => {
    const fault = bodyFault({ ...BODY, [field]: value }, 5);
    expect(fault?.path).toBe(field);
    expect(fault?.reason).toContain(field);
  });

  it("is refused for a material or shape without data, and for a spin that a pulse doesn't freeze", () => {
    const cheese: unknown = { ...BODY, material: "cheese" };
    expect(bodyFault(cheese as FragmentBody, 5)?.reason).toContain("cheese");
    const knot: unknown = { ...BODY, shape: "knot" };
    expect(bodyFault(knot as FragmentBody, 5)?.reason).toContain("knot");
    expect(bodyFault({ ...BODY, spinRateHz: 5e5 }, 5)?.path).toBe("spinRateHz");
    expect(bodyFault({ ...BODY, spinRateHz: 1000 }, 5)).toBeNull();
  });
});
