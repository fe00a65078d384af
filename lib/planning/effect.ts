import { pulsesBetween } from "@/lib/physics/effect/accumulate";
import { meanPerigeeAltitudeKm } from "@/lib/physics/effect/mean-elements";
import { makeTrack, type Track } from "@/lib/physics/effect/track";
import type { SiteFrame } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { bandsAfter, type Knowledge } from "./dwell-band";
import { heatCurve, meltOnset } from "./dwell-heat";
import { nudgeOf } from "./dwell-nudge";
import type { Band } from "./dwell-percentiles";
import { makeShots } from "./dwell-shots";
import { bodyFault, type FragmentBody, laserFault, type PulsedLaser } from "./laser";

export type { Band } from "./dwell-percentiles";

/** Step of the heat sum. */
const HEAT_STEP_S = 1;

/** What a dwell does to the orbit, in the mean elements of an element set at the dwell's end. */
export interface Effect {
  /** Velocity change in radial, transverse and normal parts, summed along the dwell, as stated (no band). */
  readonly deltaV: {
    readonly radialMPerS: number;
    readonly transverseMPerS: number;
    readonly normalMPerS: number;
  };
  readonly semiMajorAxisBeforeKm: number;
  readonly semiMajorAxisAfterKm: Band;
  /** Perigee above the Earth's equatorial radius. */
  readonly perigeeBeforeKm: number;
  readonly perigeeAfterKm: Band;
  readonly pulses: number;
  readonly energyJ: number;
  /** Seconds of the dwell until the fragment reaches its melting point; null when it doesn't. */
  readonly meltOnsetS: number | null;
}

interface EffectArgs {
  readonly orbit: Orbit;
  readonly frame: SiteFrame;
  readonly laser: PulsedLaser;
  readonly body: FragmentBody;
  readonly fromMs: number;
  readonly toMs: number;
  readonly knowledge?: Knowledge;
}

/**
 * Effect of lasing a fragment from `fromMs` to `toMs` (not included), by exact accumulation of the pulses.
 * "Before" is the fragment left alone, at the same time as "after". Refused with a sentence that names the
 * value or the moment that the model doesn't cover.
 */
export function effectOfDwell(
  args: EffectArgs,
): { ok: true; effect: Effect } | { ok: false; reason: string } {
  const { orbit, frame, laser, body, fromMs, toMs } = args;
  const fault = laserFault(laser) ?? bodyFault(body, laser.pulseWidthNs);
  if (fault) return { ok: false, reason: fault.reason };
  const made = makeTrack(orbit, frame, fromMs, toMs);
  if (!made.ok) return made;
  return effectOnTrack(made.track, args);
}

/** The same on a track that is already there and covers the dwell; laser and fragment must be checked. */
export function effectOnTrack(
  track: Track,
  args: Pick<EffectArgs, "laser" | "body" | "fromMs" | "toMs" | "knowledge">,
): { ok: true; effect: Effect } | { ok: false; reason: string } {
  const { laser, body, fromMs, toMs, knowledge } = args;
  const shots = makeShots(laser, body);
  const nudge = nudgeOf(track, shots, fromMs, toMs);
  const bands = nudge && bandsAfter(track, laser, body, fromMs, toMs, knowledge);
  if (!nudge || !bands) {
    return {
      ok: false,
      reason: "The dwell is so strong that the orbit would open: the model covers bound orbits.",
    };
  }
  const lengthS = (toMs - fromMs) / 1000;
  const pulses = pulsesBetween(laser.repetitionRateHz, 0, lengthS);
  const heatW = heatCurve(track, shots, fromMs, toMs, HEAT_STEP_S);
  return {
    ok: true,
    effect: {
      deltaV: {
        radialMPerS: nudge.deviation.radial,
        transverseMPerS: nudge.deviation.transverse,
        normalMPerS: nudge.deviation.normal,
      },
      semiMajorAxisBeforeKm: nudge.before.semiMajorAxisKm,
      semiMajorAxisAfterKm: bands.axisKm,
      perigeeBeforeKm: meanPerigeeAltitudeKm(nudge.before),
      perigeeAfterKm: bands.perigeeKm,
      pulses,
      energyJ: pulses * laser.pulseEnergyJ,
      meltOnsetS: meltOnset(heatW, HEAT_STEP_S, lengthS, shots.meltJ),
    },
  };
}
