import { pulsesBetween } from "@/lib/physics/effect/accumulate";
import { type Interval, intersect, roundInwardToSeconds } from "./interval";

/** What bounds a dwell besides its closures; null where there is no bound. */
export interface DwellLimits {
  /** Time from rise until the target is acquired and identified. */
  readonly acquisitionS: number;
  /** Kept free at both edges of every opening. */
  readonly guardS: number;
  readonly minDwellS: number;
  readonly maxDwellS: number;
  readonly maxPulses: number | null;
  readonly maxEnergyJ: number | null;
  /** Longest lasing before the fragment may melt: a profile's `meltOnsetS` is such a number. */
  readonly maxHeatingS: number | null;
}

/** A stretch of whole seconds that a dwell may lie in, in Unix seconds. */
export interface Window {
  readonly fromS: number;
  readonly toS: number;
}

/** Shortest and longest dwell in whole seconds. */
export interface Lengths {
  readonly shortestS: number;
  readonly longestS: number;
}

/**
 * Where a dwell may lie: openings less the guard at both edges, not before the target is identified, within
 * the span that is known, inward to whole seconds. Overlapping openings stay apart: a dwell lies in one.
 */
export function dwellWindows(
  openings: readonly Interval[],
  limits: DwellLimits,
  riseMs: number,
  span: Interval,
): Window[] {
  const allowed = intersect(span, { fromMs: riseMs + limits.acquisitionS * 1000, toMs: span.toMs });
  const windows: Window[] = [];
  for (const opening of openings) {
    const guarded = {
      fromMs: opening.fromMs + limits.guardS * 1000,
      toMs: opening.toMs - limits.guardS * 1000,
    };
    const inside = allowed && intersect(guarded, allowed);
    const whole = inside && roundInwardToSeconds(inside);
    if (whole) windows.push({ fromS: whole.fromMs / 1000, toS: whole.toMs / 1000 });
  }
  return windows;
}

/** Shortest and longest dwell that the limits leave with this laser. Throws RangeError on a limit below 0. */
export function dwellLengths(
  limits: DwellLimits,
  laser: { readonly repetitionRateHz: number; readonly pulseEnergyJ: number },
): Lengths {
  for (const [field, value] of Object.entries(limits) as [string, number | null][]) {
    if (value !== null && !(value >= 0)) throw new RangeError(`${field} must be a number from 0 upwards.`);
  }
  const pulses = Math.min(
    limits.maxPulses ?? Number.POSITIVE_INFINITY,
    Math.floor((limits.maxEnergyJ ?? Number.POSITIVE_INFINITY) / laser.pulseEnergyJ + 1e-9),
  );
  let longestS = Math.floor(
    Math.min(
      limits.maxDwellS,
      limits.maxHeatingS ?? Number.POSITIVE_INFINITY,
      (pulses + 1e-6) / laser.repetitionRateHz,
    ),
  );
  while (longestS > 0 && pulsesBetween(laser.repetitionRateHz, 0, longestS) > pulses) longestS -= 1;
  return { shortestS: Math.max(1, Math.ceil(limits.minDwellS)), longestS };
}
