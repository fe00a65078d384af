import { WGS72_MU_KM3_PER_S2 } from "@/lib/physics/constants";
import { scaleHeightKm } from "@/lib/physics/effect/atmosphere";
import type { Equinoctial } from "@/lib/physics/effect/equinoctial";
import { roughLifetimeDays } from "@/lib/physics/effect/lifetime";
import { eccentricityOf, meanPerigeeAltitudeKm } from "@/lib/physics/effect/mean-elements";
import type { Aim, FragmentBody } from "./laser";

/** What is really measured: the aim "decay" becomes one of the first two, by the orbit. */
export type Measure = "semi-major axis" | "perigee" | "energy" | "lifetime";

/** An aim made ready for one fragment. */
export interface AimMeasure {
  readonly aim: Aim;
  readonly measure: Measure;
  /** Unit of a gain: m of semi-major axis or perigee, J/kg of energy, days of rough lifetime. */
  readonly unit: "m" | "J/kg" | "days";
  /** The measured value of mean elements: the lower, the nearer to the aim. */
  valueOf(mean: Equinoctial): number;
}

/**
 * The measure of an aim for an orbit. "decay" means the semi-major axis while a·e is under a third of the
 * scale height at perigee: there drag is spread over the whole orbit and energy alone counts. Above that
 * it means the perigee, where the drag of an eccentric orbit happens.
 */
export function measureOf(aim: Aim, mean: Equinoctial, body: FragmentBody): AimMeasure {
  const measure = aim === "decay" ? decayMeasure(mean) : aim;
  if (measure === "semi-major axis") {
    return { aim, measure, unit: "m", valueOf: (m) => m.semiMajorAxisKm * 1000 };
  }
  if (measure === "perigee") {
    return { aim, measure, unit: "m", valueOf: (m) => meanPerigeeAltitudeKm(m) * 1000 };
  }
  if (measure === "energy") return { aim, measure, unit: "J/kg", valueOf: specificEnergyJPerKg };
  const areaPerMass = body.areaM2 / body.massKg;
  return {
    aim,
    measure,
    unit: "days",
    valueOf: (m) => roughLifetimeDays(m.semiMajorAxisKm, eccentricityOf(m), areaPerMass),
  };
}

function decayMeasure(mean: Equinoctial): "semi-major axis" | "perigee" {
  const swingKm = mean.semiMajorAxisKm * eccentricityOf(mean);
  return swingKm < scaleHeightKm(meanPerigeeAltitudeKm(mean)) / 3 ? "semi-major axis" : "perigee";
}

/** Orbital energy per mass, -µ/2a, in J/kg. */
function specificEnergyJPerKg(mean: Equinoctial): number {
  return (-WGS72_MU_KM3_PER_S2 / (2 * mean.semiMajorAxisKm)) * 1e6;
}
