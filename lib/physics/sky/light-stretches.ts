import type { Orbit } from "../orbit/propagate";
import { type Sunlight, sunlightAt } from "./shadow";
import { sunPositionKm } from "./sun";

/** A stretch of time over which the Sun shines on an object in one way. */
export interface LightStretch {
  readonly fromMs: number;
  readonly toMs: number;
  readonly sunlight: Sunlight;
}

/** Looks at most. */
const MOST_LOOKS = 1200;

/**
 * How the Sun shines on an object over [fromMs, toMs): looked at every second (every 1,200th part of a
 * longer time), edges halved to some 10 ms. Only a graze of the shadow shorter than a look can be passed
 * over. Empty where SGP4 fails at any look.
 */
export function lightStretches(orbit: Orbit, fromMs: number, toMs: number): LightStretch[] {
  const looks = Math.max(1, Math.min(MOST_LOOKS, Math.ceil((toMs - fromMs) / 1000)));
  const stretches: LightStretch[] = [];
  let startMs = fromMs;
  let before = lightAt(orbit, fromMs);
  if (!before) return [];
  for (let i = 1; i <= looks; i++) {
    const atMs = fromMs + (i * (toMs - fromMs)) / looks;
    const light = lightAt(orbit, atMs);
    if (!light) return [];
    if (light === before) continue;
    const edgeMs = edgeBetween(orbit, fromMs + ((i - 1) * (toMs - fromMs)) / looks, atMs, before);
    stretches.push({ fromMs: startMs, toMs: edgeMs, sunlight: before });
    [startMs, before] = [edgeMs, light];
  }
  stretches.push({ fromMs: startMs, toMs, sunlight: before });
  return stretches;
}

/** How the Sun shines on an object at a Unix time (ms); null where SGP4 gives no state. */
export function lightAt(orbit: Orbit, atMs: number): Sunlight | null {
  const at = orbit.stateAt(atMs);
  return at.ok ? sunlightAt(at.state.rKm, sunPositionKm(atMs)) : null;
}

function edgeBetween(orbit: Orbit, fromMs: number, toMs: number, before: Sunlight): number {
  let [lo, hi] = [fromMs, toMs];
  while (hi - lo > 10) {
    const middle = (lo + hi) / 2;
    if (lightAt(orbit, middle) === before) lo = middle;
    else hi = middle;
  }
  return hi;
}
