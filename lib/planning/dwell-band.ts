import { MATERIALS } from "@/lib/physics/ablation/materials";
import type { Sourced } from "@/lib/physics/ablation/sourced";
import { meanPerigeeAltitudeKm } from "@/lib/physics/effect/mean-elements";
import type { Track } from "@/lib/physics/effect/track";
import { type Nudge, nudgeOf } from "./dwell-nudge";
import { type Band, bandOf } from "./dwell-percentiles";
import { makeShots, type Variation } from "./dwell-shots";
import type { FragmentBody, PulsedLaser } from "./laser";

/** How well a fragment and the pointing are known: P10 and P90 lie this factor below and above. */
export interface Knowledge {
  readonly mass: Sourced;
  readonly area: Sourced;
  readonly pointingResidual: Sourced;
}

/** What we take for a fragment that nobody has measured closely. */
export const DEFAULT_KNOWLEDGE: Knowledge = {
  mass: { value: 1.5, source: "assumption of this project: mass estimated from size and material" },
  area: {
    value: 1.3,
    source: "assumption of this project: area estimated from radar or optical cross-section",
  },
  pointingResidual: {
    value: 1.5,
    source: "assumption of this project: closed-loop residual (µrad) against the laser setting's jitter",
  },
};

/** Standard deviations from the median to P90 of a normal distribution. */
const P90_SIGMAS = 1.2815515655446004;

/** Where the pointing is varied; the normal density at these points gives their weights. */
const POINTING_SIGMAS = [-2.4, -1.6, -0.8, 0, 0.8, 1.6, 2.4] as const;

/** Where the effect is worked out over the strength of the push; between lies their common polynomial. */
const STRENGTH_SIGMAS = [-2.4, -1.2, 0, 1.2, 2.4] as const;

/** A small change of the area, to see how much of it reaches the velocity change. */
const AREA_PROBE = 1.05;

/** Step and end of the fine division of the normal distribution of the strength, in sigmas. */
const FINE_STEP = 0.05;
const FINE_END = 3.2;

interface Outcome {
  readonly axisKm: number;
  readonly perigeeKm: number;
}

interface Weighted extends Outcome {
  readonly weight: number;
}

/**
 * Bands of the semi-major axis and the perigee after a dwell. Mass, area, coupling and pointing residual
 * are independent and lognormal about the stated values (pointing as a factor on the jitter; the
 * along-track error is no part of it, tracking removes it). Deterministic: coupling, mass and area make
 * one lognormal strength, followed at five points with a polynomial through them; the pointing changes
 * the fluence and so the coupling, and is followed at seven points by itself; then the weighted
 * percentiles of a fine division of both. Null where the orbit opens at one of the points.
 */
export function bandsAfter(
  track: Track,
  laser: PulsedLaser,
  body: FragmentBody,
  fromMs: number,
  toMs: number,
  knowledge: Knowledge = DEFAULT_KNOWLEDGE,
): { readonly axisKm: Band; readonly perigeeKm: Band } | null {
  const nudged = (varied: Variation): Nudge | null =>
    nudgeOf(track, makeShots(laser, body, varied), fromMs, toMs);
  const strengthSigma = Math.hypot(
    sigmaOf(MATERIALS[body.material].couplingBand),
    sigmaOf(knowledge.mass),
    sigmaOf(knowledge.area) * areaElasticity(nudged),
  );
  const pointingSigma = laser.jitterUrad > 0 ? sigmaOf(knowledge.pointingResidual) : 0;
  const all: Weighted[] = [];
  for (const pointing of pointingSigma > 0 ? POINTING_SIGMAS : [0]) {
    const jitter = Math.exp(pointingSigma * pointing);
    const outcomes: Outcome[] = [];
    for (const z of STRENGTH_SIGMAS) {
      const nudge = nudged({ strength: Math.exp(strengthSigma * z), area: 1, jitter });
      if (!nudge) return null;
      const { semiMajorAxisKm } = nudge.after;
      outcomes.push({ axisKm: semiMajorAxisKm, perigeeKm: meanPerigeeAltitudeKm(nudge.after) });
    }
    spread(all, outcomes, density(pointing));
  }
  return {
    axisKm: bandOf(all.map((o) => ({ value: o.axisKm, weight: o.weight }))),
    perigeeKm: bandOf(all.map((o) => ({ value: o.perigeeKm, weight: o.weight }))),
  };
}

/** Standard deviation of the logarithm of a factor that is P90 over the median. */
function sigmaOf(factor: Sourced): number {
  return Math.log(factor.value) / P90_SIGMAS;
}

/** Share of a small relative change of the area that reaches the velocity change: 1, or less where the spot is narrow. */
function areaElasticity(nudged: (varied: Variation) => Nudge | null): number {
  const size = (area: number): number => {
    const deviation = nudged({ strength: 1, area, jitter: 1 })?.deviation;
    return deviation ? Math.hypot(deviation.radial, deviation.transverse, deviation.normal) : 0;
  };
  const [stated, larger] = [size(1), size(AREA_PROBE)];
  return stated > 0 && larger > 0 ? Math.log(larger / stated) / Math.log(AREA_PROBE) : 0;
}

function density(sigmas: number): number {
  return Math.exp(-0.5 * sigmas * sigmas);
}

/** Adds the outcomes over the whole distribution of the strength, by the polynomial through its points. */
function spread(all: Weighted[], outcomes: readonly Outcome[], weight: number): void {
  for (let z = -FINE_END; z <= FINE_END + FINE_STEP / 2; z += FINE_STEP) {
    let [axisKm, perigeeKm] = [0, 0];
    for (const [i, outcome] of outcomes.entries()) {
      const share = lagrange(i, z);
      axisKm += share * outcome.axisKm;
      perigeeKm += share * outcome.perigeeKm;
    }
    all.push({ axisKm, perigeeKm, weight: weight * density(z) });
  }
}

/** Lagrange's polynomial that is 1 at point i and 0 at the others. */
function lagrange(i: number, z: number): number {
  const here = STRENGTH_SIGMAS[i] ?? Number.NaN;
  let product = 1;
  for (const [j, other] of STRENGTH_SIGMAS.entries()) {
    if (j !== i) product *= (z - other) / (here - other);
  }
  return product;
}
