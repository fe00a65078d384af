import { couplingCurve, deltaVPerPulseMPerS } from "@/lib/physics/ablation/coupling";
import { heatToMeltJ, residualHeatJ } from "@/lib/physics/ablation/heat";
import { MATERIALS } from "@/lib/physics/ablation/materials";
import { axialEfficiency } from "@/lib/physics/ablation/shape";
import { transmission } from "@/lib/physics/beam/atmosphere";
import { fluenceJPerM2, jitterFactor } from "@/lib/physics/beam/fluence";
import { interceptedShare, spotAreaM2, spotDiameterM } from "@/lib/physics/beam/spot";
import type { Push } from "@/lib/physics/effect/accumulate";
import type { FragmentBody, PulsedLaser } from "./laser";

/** One pulse on the fragment: means over the jitter. */
export interface Shot {
  readonly transmission: number;
  readonly spotDiameterM: number;
  readonly fluenceJPerM2: number;
  readonly couplingNPerW: number;
  readonly deltaVMPerS: number;
  /** Heat that the pulse leaves in the fragment, J. */
  readonly heatJ: number;
}

/** How far the true fragment and laser may be from the stated ones, as factors; all 1 is the statement. */
export interface Variation {
  /** On the velocity change: coupling over mass. */
  readonly strength: number;
  readonly area: number;
  readonly jitter: number;
}

/** A laser and a fragment made ready: what a pulse does at any range and elevation. */
export interface Shots extends Push {
  /** A pulse at a range in km and an elevation in radians from 0 up. */
  at(rangeKm: number, elevationRad: number): Shot;
  /** Heat that brings the fragment from its start temperature to its melting point, J. */
  readonly meltJ: number;
}

const AS_STATED: Variation = { strength: 1, area: 1, jitter: 1 };

/** Makes the pulses of a laser on a fragment; both must have passed `laserFault` and `bodyFault`. */
export function makeShots(laser: PulsedLaser, body: FragmentBody, varied: Variation = AS_STATED): Shots {
  const material = MATERIALS[body.material];
  const curve = couplingCurve(material, laser, body.couplingNPerW);
  const efficiency = axialEfficiency(body.shape, body.spinRateHz).value;
  const areaM2 = body.areaM2 * varied.area;
  const jitterUrad = laser.jitterUrad * varied.jitter;
  const at = (rangeKm: number, elevationRad: number): Shot => {
    const passed = transmission(laser.zenithTransmission, elevationRad);
    const diameterM = spotDiameterM(laser, rangeKm);
    const jitter = jitterFactor(jitterUrad, rangeKm, diameterM);
    const { pulseEnergyJ, strehl } = laser;
    const fluence = fluenceJPerM2({ pulseEnergyJ, transmission: passed, strehl, jitter }, diameterM);
    const coupling = curve.at(fluence);
    // A fragment wider than the spot is pushed and heated by the spot's part of it only.
    const litM2 = interceptedShare(areaM2, diameterM) * spotAreaM2(diameterM);
    return {
      transmission: passed,
      spotDiameterM: diameterM,
      fluenceJPerM2: fluence,
      couplingNPerW: coupling,
      deltaVMPerS: varied.strength * deltaVPerPulseMPerS(efficiency, coupling, fluence, body.massKg / litM2),
      heatJ: residualHeatJ(material, fluence * litM2),
    };
  };
  return {
    repetitionRateHz: laser.repetitionRateHz,
    deltaVPerPulseMPerS: (rangeKm, elevationRad) => at(rangeKm, elevationRad).deltaVMPerS,
    at,
    meltJ: heatToMeltJ(material, body.massKg),
  };
}
