import { PULSE_WIDTH_RANGE_NS } from "@/lib/physics/ablation/coupling";
import { type Material, materialNamed } from "@/lib/physics/ablation/materials";
import { rimSmearM, type Shape, shapeNamed } from "@/lib/physics/ablation/shape";
import type { SpotConvention } from "@/lib/physics/beam/spot";

/** One configuration of a pulsed laser with its telescope and its site's air. */
export interface PulsedLaser {
  readonly mode: "pulsed";
  readonly wavelengthNm: number;
  readonly pulseEnergyJ: number;
  readonly pulseWidthNs: number;
  readonly repetitionRateHz: number;
  readonly apertureM: number;
  readonly beamQuality: number;
  readonly zenithTransmission: number;
  readonly strehl: number;
  readonly jitterUrad: number;
  readonly spotConvention: SpotConvention;
}

/** What the ablation model needs to know of a fragment; null where nobody knows. */
export interface FragmentBody {
  readonly massKg: number;
  readonly areaM2: number;
  readonly material: Material;
  readonly couplingNPerW: number | null;
  readonly shape: Shape;
  readonly spinRateHz: number | null;
}

/** What a dwell is to achieve. */
export type Aim = "decay" | "perigee" | "energy" | "lifetime";

/** A value that the model doesn't cover: where it stands and why it is refused. */
export interface Fault {
  readonly path: string;
  readonly reason: string;
}

type Range = readonly [field: string, min: number, max: number, unit: string];

/** From the KrF to the CO2 laser, over which the coupling model's accuracy is published; the rest is sense. */
const LASER_RANGES: readonly Range[] = [
  ["wavelengthNm", 248, 10_600, " nm"],
  ["pulseEnergyJ", 1e-6, 1e7, " J"],
  ["pulseWidthNs", PULSE_WIDTH_RANGE_NS.min, PULSE_WIDTH_RANGE_NS.max, " ns"],
  ["repetitionRateHz", 1e-3, 1e6, " Hz"],
  ["apertureM", 0.01, 100, " m"],
  ["beamQuality", 1, 100, ""],
  ["zenithTransmission", 1e-6, 1, ""],
  ["strehl", 1e-6, 1, ""],
  ["jitterUrad", 0, 1000, " µrad"],
];

const BODY_RANGES: readonly Range[] = [
  ["massKg", 1e-6, 1e6, " kg"],
  ["areaM2", 1e-8, 1e4, " m²"],
];

/** A fragment may turn by this share of its radius in one pulse and still count as standing still. */
const MAX_SMEAR_SHARE = 0.01;

/** The first value of a laser that the model doesn't cover, or null. */
export function laserFault(laser: PulsedLaser): Fault | null {
  if (laser.mode !== "pulsed") {
    return {
      path: "mode",
      reason: `Lasers in the mode ${String(laser.mode)} are not modelled yet: only pulsed ones.`,
    };
  }
  const { spotConvention } = laser;
  if (typeof spotConvention === "number") {
    return (
      rangeFault(LASER_RANGES, laser) ?? rangeFault([["spotConvention", 0.5, 10, ""]], { spotConvention })
    );
  }
  if (spotConvention !== "gaussian" && spotConvention !== "airy") {
    return {
      path: "spotConvention",
      reason: "spotConvention must be gaussian, airy or a number from 0.5 to 10.",
    };
  }
  return rangeFault(LASER_RANGES, laser);
}

/** The first value of a fragment that the model doesn't cover, or null; the pulse width is the laser's. */
export function bodyFault(body: FragmentBody, pulseWidthNs: number): Fault | null {
  const plain = rangeFault(BODY_RANGES, body);
  if (plain) return plain;
  if (materialNamed(body.material) === null) {
    return {
      path: "material",
      reason: `There are no ablation data for the material ${String(body.material)}.`,
    };
  }
  if (shapeNamed(body.shape) === null) {
    return { path: "shape", reason: `The shape ${String(body.shape)} is not modelled.` };
  }
  const stated = body.couplingNPerW;
  if (stated !== null) {
    const fault = rangeFault([["couplingNPerW", 1e-9, 1e-2, " N/W"]], { couplingNPerW: stated });
    if (fault) return fault;
  }
  return spinFault(body, pulseWidthNs);
}

function spinFault(body: FragmentBody, pulseWidthNs: number): Fault | null {
  const { spinRateHz, areaM2 } = body;
  if (spinRateHz === null) return null;
  const fault = rangeFault([["spinRateHz", 0, 1e6, " Hz"]], { spinRateHz });
  if (fault) return fault;
  if (rimSmearM(spinRateHz, areaM2, pulseWidthNs) <= MAX_SMEAR_SHARE * Math.sqrt(areaM2 / Math.PI))
    return null;
  return {
    path: "spinRateHz",
    reason: "spinRateHz is so high that the fragment turns during a pulse: not modelled.",
  };
}

function rangeFault(ranges: readonly Range[], holder: object): Fault | null {
  for (const [field, min, max, unit] of ranges) {
    const value: unknown = Reflect.get(holder, field);
    if (typeof value === "number" && value >= min && value <= max) continue;
    return {
      path: field,
      reason: `${field} must be from ${min} to ${max}${unit}; it is ${typeof value === "number" ? value : "missing"}.`,
    };
  }
  return null;
}
