import { makeSiteFrame } from "@/lib/physics/frames/earth";
import type { Elements, Site } from "@/lib/physics/orbit/elements";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { chooseDwell, type DwellLimits } from "./choose-dwell";
import { type Effect, effectOnTrack } from "./effect";
import type { Interval } from "./interval";
import { type Aim, bodyFault, type Fault, type FragmentBody, laserFault, type PulsedLaser } from "./laser";
import { buildProfile, type NoProfile, type Profile, type ProfileSample } from "./profile";

/** Most samples that an estimate answers with; a second apart as long as that suffices. */
const MAX_SAMPLES = 1200;

/** "Best" knows the asked interval only. */
const NO_LIMITS: DwellLimits = {
  acquisitionS: 0,
  guardS: 0,
  minDwellS: 1,
  maxDwellS: Number.POSITIVE_INFINITY,
  maxPulses: null,
  maxEnergyJ: null,
  maxHeatingS: null,
};

/** Where in the question each argument of the profile stands. */
const PATHS: Readonly<Record<NoProfile["about"], string>> = {
  laser: "laser",
  body: "fragment",
  orbit: "elementSet",
  from: "from",
  to: "to",
  step: "to",
};

/** A question about one fragment, one station and one interval, outside the book. */
export interface ImpulseQuestion {
  readonly station: Site;
  readonly laser: PulsedLaser | { readonly mode: "continuous" };
  readonly fragment: FragmentBody;
  readonly elements: Elements;
  readonly fromMs: number;
  readonly toMs: number;
  readonly aim: Aim;
}

/** The answer: samples along the interval, the effect of lasing all of it, and the best stretch for the aim. */
export interface ImpulseEstimate extends Effect {
  readonly samples: readonly ProfileSample[];
  readonly aimUnit: string;
  /** What the aim measures on this orbit, in words. */
  readonly measure: string;
  /** In whole seconds; null when no stretch of the interval serves the aim. */
  readonly best: Interval | null;
}

/**
 * Estimates what a pulsed laser does to a fragment over an interval. Refused with the path of the value in
 * the question and a sentence. Continuous lasers are refused by name.
 */
export function impulseEstimate(
  question: ImpulseQuestion,
): { ok: true; estimate: ImpulseEstimate } | { ok: false; path: string; reason: string } {
  const { station, laser, fragment, elements, fromMs, toMs, aim } = question;
  if (laser.mode !== "pulsed") {
    return {
      ok: false,
      path: "laser.mode",
      reason: "Continuous lasers are not modelled yet: only pulsed ones.",
    };
  }
  const fault = questionFault(laser, fragment, station);
  if (fault) return { ok: false, ...fault };
  const made = makeOrbit(elements);
  if (!made.ok) return { ok: false, path: "elementSet", reason: made.reason };
  const stepS = Math.max(1, Math.ceil((toMs - fromMs) / 1000 / MAX_SAMPLES));
  const frame = makeSiteFrame(station);
  const built = buildProfile({ orbit: made.orbit, frame, laser, body: fragment, fromMs, toMs, stepS, aim });
  if (!built.ok) return { ok: false, path: PATHS[built.about], reason: built.reason };
  const { profile } = built;
  const worked = effectOnTrack(profile.track, { laser, body: fragment, fromMs, toMs });
  if (!worked.ok) return { ok: false, path: "fragment", reason: worked.reason };
  return { ok: true, estimate: answer(profile, worked.effect) };
}

function answer(profile: Profile, effect: Effect): ImpulseEstimate {
  const { samples, aimUnit, measure, fromMs, toMs } = profile;
  const best = chooseDwell({ profile, riseMs: fromMs, openings: [{ fromMs, toMs }], limits: NO_LIMITS });
  return {
    ...effect,
    samples,
    aimUnit,
    measure: measure.measure,
    best: best && { fromMs: best.fromMs, toMs: best.toMs },
  };
}

function questionFault(laser: PulsedLaser, fragment: FragmentBody, station: Site): Fault | null {
  const ofLaser = laserFault(laser);
  if (ofLaser) return { path: `laser.${ofLaser.path}`, reason: ofLaser.reason };
  const ofBody = bodyFault(fragment, laser.pulseWidthNs);
  if (ofBody) return { path: `fragment.${ofBody.path}`, reason: ofBody.reason };
  const { latitudeDeg, longitudeDeg, altitudeM } = station;
  if (!(Math.abs(latitudeDeg) <= 90))
    return { path: "station.latitudeDeg", reason: "latitudeDeg must be from -90 to 90." };
  if (!(Math.abs(longitudeDeg) <= 360)) {
    return { path: "station.longitudeDeg", reason: "longitudeDeg must be from -360 to 360." };
  }
  if (!(altitudeM >= -500 && altitudeM <= 10_000)) {
    return { path: "station.altitudeM", reason: "altitudeM must be from -500 to 10000 m." };
  }
  return null;
}
