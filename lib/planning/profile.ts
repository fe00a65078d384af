import { DEG } from "@/lib/physics/constants";
import { meanFromState } from "@/lib/physics/effect/mean-elements";
import { makeTrack, type Track } from "@/lib/physics/effect/track";
import { rtnAxes } from "@/lib/physics/effect/two-body";
import { lookAngles, type SiteFrame, temeToEcef } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { dot, scale, subtract } from "@/lib/physics/vector";
import { heatCurve, shortestMeltS } from "./dwell-heat";
import { makeShots, type Shots } from "./dwell-shots";
import { type Aim, bodyFault, type FragmentBody, laserFault, type PulsedLaser } from "./laser";
import { type AimMeasure, measureOf } from "./worth-aim";
import { worthCurve } from "./worth-curve";

/** Most samples that one profile may have. */
const MAX_SAMPLES = 100_000;

/** What lasing does at one moment of a span, on the untouched path. */
export interface ProfileSample {
  readonly atMs: number;
  readonly elevationDeg: number;
  readonly azimuthDeg: number;
  readonly rangeKm: number;
  readonly transmission: number;
  readonly spotDiameterM: number;
  readonly fluenceJPerM2: number;
  readonly couplingNPerW: number;
  /** Velocity change gained per second of lasing, m/s per s, and its parts. */
  readonly deltaVMPerS: number;
  readonly radial: number;
  readonly transverse: number;
  readonly normal: number;
  /** Gain in the aim per second, of lasing from the profile's start on, in `aimUnit` per s. */
  readonly worthPerS: number;
}

/** The worth of a span, and all that `chooseDwell` needs to score any stretch of it exactly. */
export interface Profile {
  readonly samples: readonly ProfileSample[];
  readonly stepS: number;
  readonly aim: Aim;
  readonly aimUnit: string;
  readonly fromMs: number;
  readonly toMs: number;
  readonly laser: PulsedLaser;
  readonly body: FragmentBody;
  /** What the aim measures on this orbit. */
  readonly measure: AimMeasure;
  /** Seconds of lasing that nowhere in the span melt the fragment; null when none do. */
  readonly meltOnsetS: number | null;
  readonly track: Track;
  readonly shots: Shots;
}

/** Why there is no profile, and which of the arguments is to blame. */
export interface NoProfile {
  readonly ok: false;
  readonly about: "laser" | "body" | "orbit" | "from" | "to" | "step";
  readonly reason: string;
}

interface ProfileArgs {
  readonly orbit: Orbit;
  readonly frame: SiteFrame;
  readonly laser: PulsedLaser;
  readonly body: FragmentBody;
  readonly fromMs: number;
  readonly toMs: number;
  readonly stepS: number;
  readonly aim: Aim;
}

/**
 * Samples a span every `stepS` seconds, from `fromMs` on, `toMs` not included. The worth is the change of
 * the aim's measure in mean elements when the laser fires from the profile's start on, per second: its sum
 * times the step is the gain of lasing it all. Worth is not additive, so a stretch that begins later has
 * a curve of its own; `chooseDwell` scores every stretch by itself. Refused with a sentence that names the
 * value or the moment that the model doesn't cover.
 */
export function buildProfile(args: ProfileArgs): { ok: true; profile: Profile } | NoProfile {
  const { orbit, frame, laser, body, fromMs, toMs, stepS, aim } = args;
  const fault = inputFault(args);
  if (fault) return fault;
  const made = makeTrack(orbit, frame, fromMs, toMs);
  if (!made.ok) return made;
  const { track } = made;
  const mean = meanFromState(track.at(fromMs).state);
  if (!mean) return refused("orbit", "The fragment's orbit is open or grazes 180°: it has no mean elements.");
  const shots = makeShots(laser, body);
  const measure = measureOf(aim, mean, body);
  const worth = worthCurve(track, shots, measure, mean, stepS);
  if (!worth) {
    return refused("body", "Lasing this whole span would throw the fragment out of a bound orbit.");
  }
  const samples = worth.map((worthPerS, i) =>
    sampleAt(frame, track, shots, fromMs + i * stepS * 1000, worthPerS),
  );
  const heat = heatCurve(track, shots, fromMs, toMs, stepS);
  return {
    ok: true,
    profile: {
      samples,
      stepS,
      aim,
      aimUnit: measure.unit,
      fromMs,
      toMs,
      laser,
      body,
      measure,
      meltOnsetS: shortestMeltS(heat, stepS, shots.meltJ),
      track,
      shots,
    },
  };
}

function refused(about: NoProfile["about"], reason: string): NoProfile {
  return { ok: false, about, reason };
}

/** What can be refused before anything is computed. */
function inputFault(args: ProfileArgs): NoProfile | null {
  const { laser, body, stepS, fromMs, toMs } = args;
  const ofLaser = laserFault(laser);
  if (ofLaser) return refused("laser", ofLaser.reason);
  const ofBody = bodyFault(body, laser.pulseWidthNs);
  if (ofBody) return refused("body", ofBody.reason);
  if (!(stepS > 0 && Number.isFinite(stepS))) return refused("step", "stepS must be above 0 seconds.");
  if ((toMs - fromMs) / 1000 / stepS > MAX_SAMPLES) {
    return refused("step", "stepS is too small for the span.");
  }
  return null;
}

/** The sample of one moment on the untouched path. */
function sampleAt(
  frame: SiteFrame,
  track: Track,
  shots: Shots,
  atMs: number,
  worthPerS: number,
): ProfileSample {
  const { state, siteKm } = track.at(atMs);
  const look = lookAngles(frame, temeToEcef(state, atMs));
  const shot = shots.at(look.rangeKm, Math.max(0, look.elevationRad));
  const perSecond = shot.deltaVMPerS * shots.repetitionRateHz;
  const axes = rtnAxes(state);
  const away = scale(subtract(state.rKm, siteKm), perSecond / look.rangeKm);
  return {
    atMs,
    elevationDeg: look.elevationRad / DEG,
    azimuthDeg: look.azimuthRad / DEG,
    rangeKm: look.rangeKm,
    transmission: shot.transmission,
    spotDiameterM: shot.spotDiameterM,
    fluenceJPerM2: shot.fluenceJPerM2,
    couplingNPerW: shot.couplingNPerW,
    deltaVMPerS: perSecond,
    radial: dot(away, axes.radial),
    transverse: dot(away, axes.transverse),
    normal: dot(away, axes.normal),
    worthPerS,
  };
}
