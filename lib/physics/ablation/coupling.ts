import type { MaterialData } from "./materials";
import type { Sourced } from "./sourced";

/** B of the optimum fluence B·√τ, J m⁻² s^(-1/2). */
export const OPTIMUM_FLUENCE_FACTOR: Sourced = {
  value: 8.5e8,
  source:
    "Phipps et al. 2010 and 2012, metals and most opaque solids, pulses over 100 ps, scatter ±50 %, from memory",
};

/** Wavelength that the material table holds for, nm. */
const TABLE_WAVELENGTH_NM = 1060;

/** Shortest and longest pulse that the optimum law is stated for, ns. The upper end is our own caution. */
export const PULSE_WIDTH_RANGE_NS = { min: 0.1, max: 1000 } as const;

/** Fluence in J/m² at which the coupling peaks (onset of plasma): B·√τ, pulse width in ns. */
export function optimumFluenceJPerM2(pulseWidthNs: number): number {
  return OPTIMUM_FLUENCE_FACTOR.value * Math.sqrt(pulseWidthNs * 1e-9);
}

/**
 * Coupling in N/W at the optimum fluence: the table's value times (1.06 µm / λ)^(1/4), the wavelength
 * part of the plasma law at the optimum (Phipps et al., from memory).
 */
export function couplingAtOptimumNPerW(material: MaterialData, wavelengthNm: number): number {
  return material.couplingAtOptimumNPerW.value * (TABLE_WAVELENGTH_NM / wavelengthNm) ** 0.25;
}

/** A coupling curve over fluence, made once for a laser and a material. */
export interface CouplingCurve {
  readonly thresholdJPerM2: number;
  readonly optimumJPerM2: number;
  /** Coupling in N/W at a fluence in J/m². */
  at(fluenceJPerM2: number): number;
}

/**
 * Coupling over fluence: nothing under the threshold, a straight rise to the optimum, above it the
 * plasma law ~ (Φ λ √τ)^(-1/4) at fixed λ and τ (Phipps 1996; the rise is our simplification, Sinko and
 * Phipps 2009 give a smooth form). A coupling that the user states holds at every fluence from the
 * threshold up: a measured value already belongs to its fluence.
 */
export function couplingCurve(
  material: MaterialData,
  laser: { readonly wavelengthNm: number; readonly pulseWidthNs: number },
  statedNPerW: number | null,
): CouplingCurve {
  const optimum = optimumFluenceJPerM2(laser.pulseWidthNs);
  const threshold = optimum * material.thresholdShare.value;
  const peak = couplingAtOptimumNPerW(material, laser.wavelengthNm);
  const law = (fluence: number): number =>
    fluence < optimum
      ? (peak * (fluence - threshold)) / (optimum - threshold)
      : peak * Math.sqrt(Math.sqrt(optimum / fluence));
  return {
    thresholdJPerM2: threshold,
    optimumJPerM2: optimum,
    at: (fluence) => (fluence < threshold ? 0 : (statedNPerW ?? law(fluence))),
  };
}

/** Velocity change in m/s of one pulse: η·C_m·Φ/µ with µ the mass per projected area in kg/m² (Phipps et al. 2012). */
export function deltaVPerPulseMPerS(
  efficiency: number,
  couplingNPerW: number,
  fluenceJPerM2: number,
  arealMassKgPerM2: number,
): number {
  return (efficiency * couplingNPerW * fluenceJPerM2) / arealMassKgPerM2;
}
