import { type EarthFixedNode, earthFixedNode, shiftNode } from "../orbit/earth-fixed";
import type { Orbit } from "../orbit/propagate";
import { blankSighting, climbRate, type Sight, sightNode } from "./sight";

/**
 * Newton steps shorter than this are taken by the node's own acceleration instead of another SGP4 call. What
 * the curvature then leaves is the step squared over the length of the pass: 2.5 ms for a pass of a second.
 */
const LAST_STEP_MS = 50;

/** After so many steps the bracket is halved instead, so that the search always ends. */
const MOST_NEWTON_STEPS = 8;

/** Brackets narrower than this are not split any further. */
const NARROW_MS = 0.5;

const scratch = blankSighting();

/** A value whose root is sought and its rate per second, at a node. */
type Measure = (node: EarthFixedNode) => { value: number; rate: number };

/**
 * The time between `loMs` and `hiMs` at which the object goes through the elevation limit, on SGP4 itself,
 * starting from a guess; `rising` says in which direction. Null where propagation fails.
 */
export function polishCrossing(
  orbit: Orbit,
  sight: Sight,
  loMs: number,
  hiMs: number,
  guessMs: number,
  rising: boolean,
): EarthFixedNode | null {
  const sign = rising ? 1 : -1;
  return polishRoot(orbit, loMs, hiMs, guessMs, (node) => {
    sightNode(sight, node, scratch);
    return { value: sign * scratch.overKm, rate: sign * scratch.overRate };
  });
}

/**
 * The time between `loMs` and `hiMs` of the highest (or with `highest` false the lowest) elevation, on SGP4
 * itself, starting from a guess. Null where propagation fails.
 */
export function polishExtremum(
  orbit: Orbit,
  sight: Sight,
  loMs: number,
  hiMs: number,
  guessMs: number,
  highest: boolean,
): EarthFixedNode | null {
  const sign = highest ? -1 : 1;
  return polishRoot(orbit, loMs, hiMs, guessMs, (node) => {
    sightNode(sight, node, scratch);
    return { value: sign * scratch.climb, rate: sign * climbRate(sight, node) };
  });
}

/** Newton's method for a value that grows through zero, held inside a bracket that shrinks. */
function polishRoot(
  orbit: Orbit,
  loMs: number,
  hiMs: number,
  guessMs: number,
  measure: Measure,
): EarthFixedNode | null {
  let lo = loMs;
  let hi = hiMs;
  let at = Math.min(Math.max(guessMs, lo), hi);
  for (let step = 1; ; step++) {
    const node = earthFixedNode(orbit, at);
    if (!node) return null;
    const { value, rate } = measure(node);
    if (value <= 0) lo = at;
    else hi = at;
    const stepMs = (-1000 * value) / rate;
    const inside = rate > 0 && at + stepMs >= lo && at + stepMs <= hi;
    if (inside && Math.abs(stepMs) <= LAST_STEP_MS) return shiftNode(node, stepMs);
    if (hi - lo <= NARROW_MS) return node;
    at = inside && step <= MOST_NEWTON_STEPS ? at + stepMs : (lo + hi) / 2;
  }
}
