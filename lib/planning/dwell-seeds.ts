import { WGS72_MU_KM3_PER_S2 } from "@/lib/physics/constants";
import { elevationAndRange } from "@/lib/physics/effect/accumulate";
import { type Equinoctial, eccentricityVectorOf } from "@/lib/physics/effect/equinoctial";
import { eccentricityOf } from "@/lib/physics/effect/mean-elements";
import { dot, scale, subtract } from "@/lib/physics/vector";
import type { Lengths, Window } from "./dwell-windows";
import type { Profile } from "./profile";

/** A stretch in whole Unix seconds. */
export interface Stretch {
  readonly fromS: number;
  readonly toS: number;
}

/** Points per axis of the coarse grid of begin and end. */
const GRID = 120;

/** Candidates that are followed up: the gain over begin and end has few hills, mostly one before and one after culmination. */
const SEEDS = 4;

/**
 * Linear gain of any stretch in a window from running sums: energy and eccentricity vector change by each
 * second's push on the untouched path, and add up. Good to a few per cent even for strong pushes, which is
 * enough to find the hills; `chooseDwell` climbs them with the exact gain.
 */
export function linearGain(
  profile: Profile,
  window: Window,
  mean: Equinoctial,
): (fromS: number, toS: number) => number {
  const sums = runningSums(profile, window);
  const start = eccentricityVectorOf(mean);
  const energy = -WGS72_MU_KM3_PER_S2 / (2 * mean.semiMajorAxisKm);
  const gainOf = linearMeasure(profile, mean);
  return (fromS, toS) => {
    const a = 4 * (fromS - window.fromS);
    const b = 4 * (toS - window.fromS);
    const x = start.x + between(sums, a + 1, b + 1);
    const y = start.y + between(sums, a + 2, b + 2);
    const z = start.z + between(sums, a + 3, b + 3);
    return gainOf(
      -WGS72_MU_KM3_PER_S2 / (2 * (energy + between(sums, a, b))),
      Math.sqrt(x * x + y * y + z * z),
    );
  };
}

function between(sums: Float64Array, from: number, to: number): number {
  return (sums[to] ?? 0) - (sums[from] ?? 0);
}

/** Sums of energy (km²/s²) and of the eccentricity vector up to each second of the window, four a second. */
function runningSums(profile: Profile, window: Window): Float64Array {
  const { track, shots } = profile;
  const sums = new Float64Array(4 * (window.toS - window.fromS + 1));
  for (let second = window.fromS; second < window.toS; second++) {
    const point = track.middleOfSecond(second);
    const { rKm: r, vKmPerS: v } = point.state;
    const { rangeKm, elevationRad } = elevationAndRange(point);
    const speed = shots.deltaVPerPulseMPerS(rangeKm, elevationRad) * shots.repetitionRateHz * 1e-3;
    const push = scale(subtract(r, point.siteKm), speed / rangeKm);
    const energy = dot(v, push);
    // Gauss's change of the eccentricity vector: [2 (v·k) r - (r·k) v - (r·v) k] / µ.
    const turn = scale(
      subtract(subtract(scale(r, 2 * energy), scale(v, dot(r, push))), scale(push, dot(r, v))),
      1 / WGS72_MU_KM3_PER_S2,
    );
    const at = 4 * (second - window.fromS);
    sums[at + 4] = (sums[at] ?? 0) + energy;
    sums[at + 5] = (sums[at + 1] ?? 0) + turn.x;
    sums[at + 6] = (sums[at + 2] ?? 0) + turn.y;
    sums[at + 7] = (sums[at + 3] ?? 0) + turn.z;
  }
  return sums;
}

/** Gain of a new semi-major axis and eccentricity; for the lifetime, by its logarithm's slopes. */
function linearMeasure(profile: Profile, mean: Equinoctial): (a: number, e: number) => number {
  const [a0, e0] = [mean.semiMajorAxisKm, eccentricityOf(mean)];
  const { measure } = profile.measure;
  if (measure === "perigee") return (a, e) => a0 * (1 - e0) - a * (1 - e);
  if (measure !== "lifetime") return (a) => a0 - a;
  const shaped = (perigeeKm: number, apogeeKm: number): number => {
    const a = (perigeeKm + apogeeKm) / 2;
    const squeeze = (apogeeKm - perigeeKm) / (perigeeKm + apogeeKm) / Math.max(e0, 1e-9);
    return Math.log(
      Math.max(
        1e-6,
        profile.measure.valueOf({ ...mean, semiMajorAxisKm: a, h: mean.h * squeeze, k: mean.k * squeeze }),
      ),
    );
  };
  const [p0, q0] = [a0 * (1 - e0), a0 * (1 + e0)];
  const here = shaped(p0, q0);
  const [byPerigee, byApogee] = [here - shaped(p0 - 1, q0), shaped(p0, q0 + 1) - here];
  return (a, e) => 1 - Math.exp(byPerigee * (a * (1 - e) - p0) + byApogee * (a * (1 + e) - q0));
}

/**
 * The most promising stretches of a window on a coarse grid of begin and end, the best first, each
 * overlapping none before it by more than half. Only stretches that gain anything.
 */
export function seedsOf(
  gain: (fromS: number, toS: number) => number,
  window: Window,
  lengths: Lengths,
): { readonly stretches: readonly Stretch[]; readonly gridS: number } {
  const gridS = Math.max(1, Math.ceil((window.toS - window.fromS) / GRID));
  const found: (Stretch & { gain: number })[] = [];
  for (let fromS = window.fromS; fromS + lengths.shortestS <= window.toS; fromS += gridS) {
    const lastS = Math.min(window.toS, fromS + lengths.longestS);
    for (let toS = fromS + lengths.shortestS; toS <= lastS; toS = nextEnd(toS, lastS, gridS)) {
      const here = gain(fromS, toS);
      if (here > 0) found.push({ fromS, toS, gain: here });
    }
  }
  found.sort((a, b) => b.gain - a.gain || a.toS - a.fromS - (b.toS - b.fromS));
  const chosen: Stretch[] = [];
  for (const next of found) {
    if (chosen.length >= SEEDS) break;
    if (chosen.every((kept) => !mostlySame(kept, next))) chosen.push(next);
  }
  return { stretches: chosen, gridS };
}

/** The next end on the grid; the last possible end is always tried. */
function nextEnd(toS: number, lastS: number, gridS: number): number {
  return toS === lastS ? lastS + 1 : Math.min(lastS, toS + gridS);
}

function mostlySame(a: Stretch, b: Stretch): boolean {
  const shared = Math.min(a.toS, b.toS) - Math.max(a.fromS, b.fromS);
  const either = Math.max(a.toS, b.toS) - Math.min(a.fromS, b.fromS);
  return shared > either / 2;
}
