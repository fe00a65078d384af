import type { Equinoctial } from "@/lib/physics/effect/equinoctial";
import { meanFromState } from "@/lib/physics/effect/mean-elements";
import { nudgeOf } from "./dwell-nudge";
import { linearGain, type Stretch, seedsOf } from "./dwell-seeds";
import { type DwellLimits, dwellLengths, dwellWindows, type Lengths, type Window } from "./dwell-windows";
import type { Interval } from "./interval";
import type { Profile } from "./profile";

export type { DwellLimits } from "./dwell-windows";

/** A hill whose linear top is lower than this share of the best one's is not climbed. */
const WORTH_CLIMBING = 0.7;

/** A longer stretch must gain more than this share beyond a shorter one. */
const PARSIMONY = 1e-9;

type Gain = (fromS: number, toS: number) => number;

/**
 * The stretch that gains most in the profile's aim, by its exact cumulative effect: within one opening,
 * guard and acquisition time kept, under every limit, in whole seconds. Linear running sums pick the
 * candidates, climbing with the exact gain settles them. Null when no permissible stretch gains anything.
 * Throws RangeError when a limit is below 0.
 */
export function chooseDwell(args: {
  readonly profile: Profile;
  readonly riseMs: number;
  readonly openings: readonly Interval[];
  readonly limits: DwellLimits;
}): { fromMs: number; toMs: number; gain: number } | null {
  const { profile, riseMs, openings, limits } = args;
  const lengths = dwellLengths(limits, profile.laser);
  if (lengths.longestS < lengths.shortestS) return null;
  const gain = exactGain(profile);
  let best: { fromMs: number; toMs: number; gain: number } | null = null;
  for (const window of dwellWindows(openings, limits, riseMs, profile)) {
    if (window.toS - window.fromS < lengths.shortestS) continue;
    const top = bestInWindow(profile, window, lengths, gain);
    if (!top) continue;
    const reached = gain(top.fromS, top.toS);
    if (reached > (best?.gain ?? 0)) best = { fromMs: top.fromS * 1000, toMs: top.toS * 1000, gain: reached };
  }
  return best;
}

/** Exact gain of a stretch in whole seconds, remembered; minus infinity where it can't be worked out. */
function exactGain(profile: Profile): Gain {
  const { track, shots, measure } = profile;
  const gains = new Map<string, number>();
  const untouched = new Map<number, Equinoctial | null>();
  return (fromS, toS) => {
    const key = `${fromS} ${toS}`;
    const known = gains.get(key);
    if (known !== undefined) return known;
    const before = untouched.get(toS) ?? meanFromState(track.at(toS * 1000).state);
    untouched.set(toS, before);
    const nudge = before && nudgeOf(track, shots, fromS * 1000, toS * 1000, before);
    const gain = nudge
      ? measure.valueOf(nudge.before) - measure.valueOf(nudge.after)
      : Number.NEGATIVE_INFINITY;
    gains.set(key, gain);
    return gain;
  };
}

function bestInWindow(profile: Profile, window: Window, lengths: Lengths, gain: Gain): Stretch | null {
  const middle = profile.track.at((window.fromS + window.toS) * 500).state;
  const mean = meanFromState(middle);
  if (!mean) return null;
  const rough = linearGain(profile, window, mean);
  const { stretches, gridS } = seedsOf(rough, window, lengths);
  const hills = stretches
    .map((seed) => climb(rough, seed, window, lengths, gridS))
    .sort((a, b) => rough(b.fromS, b.toS) - rough(a.fromS, a.toS));
  const [first] = hills;
  if (!first) return null;
  const floor = WORTH_CLIMBING * rough(first.fromS, first.toS);
  let best: Stretch | null = null;
  for (const hill of hills) {
    if (rough(hill.fromS, hill.toS) < floor) continue;
    const top = climb(gain, hill, window, lengths, Math.max(4, Math.round((hill.toS - hill.fromS) / 16)));
    if (!best || gain(top.fromS, top.toS) > gain(best.fromS, best.toS)) best = top;
  }
  return best;
}

/** Moves begin, end or both by ever smaller steps as long as that gains; of equals the shorter stays. */
function climb(gain: Gain, from: Stretch, window: Window, lengths: Lengths, firstStepS: number): Stretch {
  let best = from;
  for (let step = firstStepS; step >= 1; step = Math.floor(step / 2)) {
    for (let moved = true; moved; ) {
      moved = false;
      for (const next of neighbours(best, step, window, lengths)) {
        if (!better(gain, next, best)) continue;
        best = next;
        moved = true;
      }
    }
  }
  return best;
}

function better(gain: Gain, next: Stretch, best: Stretch): boolean {
  const [a, b] = [gain(next.fromS, next.toS), gain(best.fromS, best.toS)];
  const longer = next.toS - next.fromS > best.toS - best.fromS;
  const margin = PARSIMONY * Math.abs(b);
  return longer
    ? a > b + margin
    : a > b || (a >= b - margin && next.toS - next.fromS < best.toS - best.fromS);
}

function neighbours(s: Stretch, step: number, window: Window, lengths: Lengths): Stretch[] {
  const moves: readonly (readonly [number, number])[] = [
    [-step, 0],
    [step, 0],
    [0, -step],
    [0, step],
    [-step, -step],
    [step, step],
  ];
  return moves
    .map(([byFrom, byTo]) => ({ fromS: s.fromS + byFrom, toS: s.toS + byTo }))
    .filter(
      (n) =>
        n.fromS >= window.fromS &&
        n.toS <= window.toS &&
        n.toS - n.fromS >= lengths.shortestS &&
        n.toS - n.fromS <= lengths.longestS,
    );
}
