import { deviated, lase, noDeviation } from "@/lib/physics/effect/accumulate";
import type { Equinoctial } from "@/lib/physics/effect/equinoctial";
import { drifted, meanFromState, meanNear } from "@/lib/physics/effect/mean-elements";
import type { Track } from "@/lib/physics/effect/track";
import type { Shots } from "./dwell-shots";
import type { AimMeasure } from "./worth-aim";

/**
 * Gain in the aim per second over each step of a track when the laser fires from its start on: the
 * difference of the aim's measure between untouched and nudged mean elements at the end of the step, less
 * what was gained before. Pulses are spread evenly here, so that the curve has no teeth at low rates.
 * Null when the nudged orbit opens on the way.
 */
export function worthCurve(
  track: Track,
  shots: Shots,
  measure: AimMeasure,
  meanAtStart: Equinoctial,
  stepS: number,
): number[] | null {
  const deviation = noDeviation();
  const worth: number[] = [];
  let reached = 0;
  let mean = meanAtStart;
  for (let fromMs = track.fromMs; fromMs < track.toMs; ) {
    const toMs = Math.min(track.toMs, track.fromMs + (worth.length + 1) * stepS * 1000);
    const seconds = (toMs - fromMs) / 1000;
    lase(deviation, track, shots, { fromMs, toMs, firstPulseMs: track.fromMs, whole: false });
    const untouched = track.at(toMs).state;
    const next = meanFromState(untouched, drifted(mean, seconds));
    const nudged = next && meanNear(deviated(untouched, deviation), untouched, next);
    if (!next || !nudged) return null;
    const gain = measure.valueOf(next) - measure.valueOf(nudged);
    worth.push((gain - reached) / seconds);
    reached = gain;
    mean = next;
    fromMs = toMs;
  }
  return worth;
}
