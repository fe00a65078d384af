import { OPTIMUM_FLUENCE_FACTOR } from "@/lib/physics/ablation/coupling";
import { MATERIALS } from "@/lib/physics/ablation/materials";
import { axialEfficiency } from "@/lib/physics/ablation/shape";
import { spotFactor } from "@/lib/physics/beam/spot";
import { DEFAULT_KNOWLEDGE } from "./dwell-band";
import { ALONG_TRACK_AT_EPOCH_KM, ALONG_TRACK_GROWTH_KM_PER_DAY } from "./keep-out";
import type { FragmentBody, PulsedLaser } from "./laser";
import { trimmed } from "./words";

/** One thing that the figures of a pass take for granted, and where it comes from. */
export interface Assumption {
  readonly text: string;
  readonly source: string;
}

/** What the figures of a pass rest on, in the order of the calculation: orbit, beam, ablation, fragment. */
export function assumptionsOf(laser: PulsedLaser, body: FragmentBody, bodySource: string): Assumption[] {
  return [...orbitAssumptions(), ...beamAssumptions(laser), ...ablationAssumptions(body, bodySource)];
}

function orbitAssumptions(): Assumption[] {
  return [
    {
      text: "Positions follow SGP4 in the frame TEME, turned by sidereal time with UT1 taken as UTC; angles are geometric, without refraction.",
      source: "Vallado et al. 2006, AIAA 2006-6753",
    },
    {
      text: `The fragment may be ${ALONG_TRACK_AT_EPOCH_KM} km along its track from the element set at epoch, and ${ALONG_TRACK_GROWTH_KM_PER_DAY} km more each day; tracking removes this before lasing.`,
      source: "common practice",
    },
    {
      text: "Before and after are mean elements; drag during the pass is left out.",
      source: "first-order J2 theory",
    },
  ];
}

function beamAssumptions(laser: PulsedLaser): Assumption[] {
  const convention =
    typeof laser.spotConvention === "number" ? "its own number" : `the ${laser.spotConvention} convention`;
  return [
    {
      text: `The spot is ${trimmed(spotFactor(laser.spotConvention), 3)} · M² · λ · R / D, by ${convention}; the energy is spread evenly over it.`,
      source: "diffraction; the convention is a field of the laser setting",
    },
    {
      text: `The air passes ${trimmed(laser.zenithTransmission * 100, 1)} % at the zenith, less by the airmass elsewhere.`,
      source: "laser setting; airmass of Kasten and Young 1989, Appl. Opt. 28, 4735",
    },
    {
      text: `Strehl ratio ${trimmed(laser.strehl, 3)} and jitter ${trimmed(laser.jitterUrad, 3)} µrad hold over the whole pass.`,
      source: "laser setting",
    },
  ];
}

function ablationAssumptions(body: FragmentBody, bodySource: string): Assumption[] {
  const material = MATERIALS[body.material];
  const shape = axialEfficiency(body.shape, body.spinRateHz);
  const { couplingAtOptimumNPerW: coupling, couplingBand, thresholdShare, meltingPointK } = material;
  const stated = body.couplingNPerW;
  return [
    stated === null
      ? {
          text: `Coupling of ${body.material} at its optimum: ${trimmed(coupling.value * 1e6, 1)} µN/W.`,
          source: coupling.source,
        }
      : { text: `Coupling at the optimum: ${trimmed(stated * 1e6, 1)} µN/W.`, source: "fragment record" },
    {
      text: `The true coupling lies within a factor of ${trimmed(couplingBand.value, 1)} of that (P10 to P90).`,
      source: couplingBand.source,
    },
    {
      text: "The optimum fluence grows with the square root of the pulse width.",
      source: OPTIMUM_FLUENCE_FACTOR.source,
    },
    {
      text: `Nothing is ablated under ${trimmed(thresholdShare.value * 100, 0)} % of the optimum fluence.`,
      source: thresholdShare.source,
    },
    {
      text: `Lasing stops before the fragment reaches ${trimmed(meltingPointK.value, 0)} K.`,
      source: meltingPointK.source,
    },
    {
      text: `Of the push ${trimmed(shape.value * 100, 0)} % acts along the beam (${body.shape}).`,
      source: shape.source,
    },
    {
      text: `Mass ${trimmed(body.massKg, 3)} kg and area ${trimmed(body.areaM2, 4)} m², each within a factor of ${trimmed(DEFAULT_KNOWLEDGE.mass.value, 1)} and ${trimmed(DEFAULT_KNOWLEDGE.area.value, 1)} (P10 to P90).`,
      source: `${bodySource}; ${DEFAULT_KNOWLEDGE.mass.source}`,
    },
  ];
}
