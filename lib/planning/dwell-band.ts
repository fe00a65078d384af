import { MATERIALS } from "@/lib/physics/ablation/materials";
import type { Sourced } from "@/lib/physics/ablation/sourced";
import { meanPerigeeAltitudeKm } from "@/lib/physics/effect/mean-elements";
import type { Track } from "@/lib/physics/effect/track";
import { nudgeOf } from "./dwell-nudge";
import { makeShots } from "./dwell-shots";
import type { FragmentBody, PulsedLaser } from "./laser";

/** Percentiles of a result; P10 is the lowest. */
export interface Band {
  readonly p10: number;
  readonly p50: number;
  readonly p90: number;
}

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

/** Three points that average any polynomial of degree five over a normal distribution (Gauss and Hermite). */
const THREE_POINTS: readonly (readonly [sigmas: number, weight: number])[] = [
  [-Math.sqrt(3), 1 / 6],
  [0, 2 / 3],
  [Math.sqrt(3), 1 / 6],
];

/** Where the effect is worked out over the strength of the push; between lies their common polynomial. */
const STRENGTH_SIGMAS = [-2.4, -1.2, 0, 1.2, 2.4] as const;

/** Step and end of the fine division of the normal distribution of the strength, in sigmas. */
const FINE_STEP = 0.05;
const FINE_END = 2.8;

interface Outcome {
  readonly axisKm: number;
  readonly perigeeKm: number;
}

/**
 * Bands of the semi-major axis and the perigee after a dwell. Mass, area, coupling and pointing residual
 * are independent and lognormal about the stated values (pointing as a factor on the jitter; the
 * along-track error is no part of it, tracking removes it). Deterministic: three Gauss-Hermite points each
 * for area and pointing, five points for the strength (coupling over mass) with a polynomial through them,
 * then the weighted percentiles of a fine division. Null where the orbit opens even at a moderate push.
 */
export function bandsAfter(
  track: Track,
  laser: PulsedLaser,
  body: FragmentBody,
  fromMs: number,
  toMs: number,
  knowledge: Knowledge = DEFAULT_KNOWLEDGE,
): { readonly axisKm: Band; readonly perigeeKm: Band } | null {
  const sigma = (factor: number): number => Math.log(factor) / P90_SIGMAS;
  const strengthSigma = Math.hypot(
    sigma(MATERIALS[body.material].couplingBand.value),
    sigma(knowledge.mass.value),
  );
  const all: (Outcome & { weight: number })[] = [];
  for (const [areaZ, areaWeight] of THREE_POINTS) {
    for (const [jitterZ, jitterWeight] of laser.jitterUrad > 0 ? THREE_POINTS : ([[0, 1]] as const)) {
      const area = Math.exp(sigma(knowledge.area.value) * areaZ);
      const jitter = Math.exp(sigma(knowledge.pointingResidual.value) * jitterZ);
      const outcomes: Outcome[] = [];
      for (const z of STRENGTH_SIGMAS) {
        const strength = Math.exp(strengthSigma * z);
        const nudge = nudgeOf(track, makeShots(laser, body, { strength, area, jitter }), fromMs, toMs);
        if (!nudge) return null;
        const { semiMajorAxisKm } = nudge.after;
        outcomes.push({ axisKm: semiMajorAxisKm, perigeeKm: meanPerigeeAltitudeKm(nudge.after) });
      }
      spread(all, outcomes, areaWeight * jitterWeight);
    }
  }
  return { axisKm: bandOf(all, "axisKm"), perigeeKm: bandOf(all, "perigeeKm") };
}

/** Adds the outcomes over the whole distribution of the strength, by the polynomial through its points. */
function spread(all: (Outcome & { weight: number })[], outcomes: readonly Outcome[], weight: number): void {
  for (let z = -FINE_END; z <= FINE_END + FINE_STEP / 2; z += FINE_STEP) {
    let [axisKm, perigeeKm] = [0, 0];
    for (const [i, outcome] of outcomes.entries()) {
      const share = lagrange(i, z);
      axisKm += share * outcome.axisKm;
      perigeeKm += share * outcome.perigeeKm;
    }
    all.push({ axisKm, perigeeKm, weight: weight * Math.exp(-z * z * 0.5) });
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

function bandOf(all: readonly (Outcome & { weight: number })[], of: keyof Outcome): Band {
  const sorted = all.map((o) => ({ value: o[of], weight: o.weight })).sort((a, b) => a.value - b.value);
  const total = sorted.reduce((sum, o) => sum + o.weight, 0);
  const percentile = (share: number): number => {
    let below = 0;
    let [lastAt, lastValue] = [0, sorted[0]?.value ?? Number.NaN];
    for (const { value, weight } of sorted) {
      // Each outcome stands in the middle of its own weight.
      const at = below + weight / 2;
      if (at >= share * total) {
        return at > lastAt
          ? lastValue + ((share * total - lastAt) / (at - lastAt)) * (value - lastValue)
          : value;
      }
      below += weight;
      [lastAt, lastValue] = [at, value];
    }
    return lastValue;
  };
  return { p10: percentile(0.1), p50: percentile(0.5), p90: percentile(0.9) };
}
