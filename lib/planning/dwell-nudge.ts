import { type Deviation, deviated, lase, noDeviation } from "@/lib/physics/effect/accumulate";
import type { Equinoctial } from "@/lib/physics/effect/equinoctial";
import { meanFromState, meanNear } from "@/lib/physics/effect/mean-elements";
import type { Track } from "@/lib/physics/effect/track";
import type { Shots } from "./dwell-shots";

/** What a dwell does: mean elements at its end of the fragment left alone and of the fragment lased. */
export interface Nudge {
  readonly before: Equinoctial;
  readonly after: Equinoctial;
  readonly deviation: Deviation;
}

/**
 * Lases the stretch with its real pulses, from the untouched path, step by step. `before` may be given
 * where it is known. Null when the orbit has no mean elements or opens.
 */
export function nudgeOf(
  track: Track,
  shots: Shots,
  fromMs: number,
  toMs: number,
  known: Equinoctial | null = null,
): Nudge | null {
  const deviation = noDeviation();
  lase(deviation, track, shots, { fromMs, toMs, firstPulseMs: fromMs, whole: true });
  const untouched = track.at(toMs).state;
  const before = known ?? meanFromState(untouched);
  const after = before && meanNear(deviated(untouched, deviation), untouched, before);
  return before && after ? { before, after, deviation } : null;
}
