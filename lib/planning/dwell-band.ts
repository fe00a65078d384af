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

/** Where the effect is worked out over the strength of the push, and what lies between is interpolated. */
const STRENGTH_SIGMAS = [-2.4, -1.6, -0.8, 0, 0.8, 1.6, 2.4] as const;

/** Step and end of the fine division of the normal distribution of the strength, in sigmas. */
const FINE_STEP = 0.05;
const FINE_END = 3.2;

interface Outcome {
  readonly axisKm: number;
  readonly perigeeKm: number;
}

/**
 * Bands of the semi-major axis and the perigee after a dwell. Mass, area, coupling and pointing residual
 * are independent and lognormal about the stated values (pointing as a factor on the jitter; the
 * along-track error is no part of it, tracking removes it). Deterministic: three Gauss-Hermite points each
 * for area and pointing, seven points for the strength (coupling over mass) with straight lines between,
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
  const strengths = STRENGTH_SIGMAS.map((z) => Math.exp(strengthSigma * z));
  const all: (Outcome & { weight: number })[] = [];
  for (const [areaZ, areaWeight] of THREE_POINTS) {
    for (const [jitterZ, jitterWeight] of laser.jitterUrad > 0 ? THREE_POINTS : ([[0, 1]] as const)) {
      const area = Math.exp(sigma(knowledge.area.value) * areaZ);
      const jitter = Math.exp(sigma(knowledge.pointingResidual.value) * jitterZ);
      const outcomes: Outcome[] = [];
      for (const strength of strengths) {
        const nudge = nudgeOf(track, makeShots(laser, body, { strength, area, jitter }), fromMs, toMs);
        if (!nudge) return null;
        const { semiMajorAxisKm } = nudge.after;
        outcomes.push({ axisKm: semiMajorAxisKm, perigeeKm: meanPerigeeAltitudeKm(nudge.after) });
      }
      spread(all, strengths, outcomes, strengthSigma, areaWeight * jitterWeight);
    }
  }
  return { axisKm: bandOf(all, "axisKm"), perigeeKm: bandOf(all, "perigeeKm") };
}

/** Adds the outcomes over the whole distribution of the strength, by straight lines between its points. */
function spread(
  all: (Outcome & { weight: number })[],
  strengths: readonly number[],
  outcomes: readonly Outcome[],
  strengthSigma: number,
  weight: number,
): void {
  for (let z = -FINE_END; z <= FINE_END + FINE_STEP / 2; z += FINE_STEP) {
    const strength = Math.exp(strengthSigma * z);
    const above = strengths.findIndex((s) => s >= strength);
    const i = above === -1 ? strengths.length - 1 : Math.max(1, above);
    const [s0, s1, o0, o1] = [strengths[i - 1], strengths[i], outcomes[i - 1], outcomes[i]];
    if (s0 === undefined || s1 === undefined || !o0 || !o1) continue;
    const share = (strength - s0) / (s1 - s0);
    all.push({
      axisKm: o0.axisKm + share * (o1.axisKm - o0.axisKm),
      perigeeKm: o0.perigeeKm + share * (o1.perigeeKm - o0.perigeeKm),
      weight: weight * Math.exp(-z * z * 0.5),
    });
  }
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
