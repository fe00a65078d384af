import { DEG } from "@/lib/physics/constants";
import { DAY_MS } from "@/lib/physics/time";

export const PROTECTED_CLASSES = ["crewed", "payload", "optical payload", "own"] as const;
export type ProtectedClass = (typeof PROTECTED_CLASSES)[number];

/** Half-angle of the cone that is kept free around an object, with where the number comes from. */
export interface KeepOut {
  readonly halfAngleDeg: number;
  readonly source: string;
}

/**
 * Keep-out half-angle by class. A protected object may carry its own. Common practice starts from 2.5°
 * and goes down to 0.1° (arXiv 2606.25238, summary); the rest are our settings within that range, and
 * twice the usual cone for crewed spacecraft.
 */
export const KEEP_OUT: Readonly<Record<ProtectedClass, KeepOut>> = {
  crewed: { halfAngleDeg: 5, source: "our setting: twice the 2.5° of common practice" },
  "optical payload": { halfAngleDeg: 2.5, source: "common practice (arXiv 2606.25238, summary)" },
  payload: { halfAngleDeg: 1, source: "our setting, between the 2.5° and the 0.1° of common practice" },
  own: { halfAngleDeg: 0.5, source: "our setting, between the 2.5° and the 0.1° of common practice" },
};

/** The smallest half-angle that is ever used, degrees (arXiv 2606.25238, summary). */
export const SMALLEST_HALF_ANGLE_DEG = 0.1;

/** Along-track error of an element set at its epoch, km (common practice). */
export const ALONG_TRACK_AT_EPOCH_KM = 1;

/** Growth of the along-track error, km a day (common practice; Levit and Marshall 2011 imply it). */
export const ALONG_TRACK_GROWTH_KM_PER_DAY = 1;

/** A crossing is widened by this at both ends, s: clock and shutter latency (our setting, 1 to 2 s is usual). */
export const TIMING_GUARD_S = 2;

/** A set farther than this from its epoch no longer tells where a protected object is, days (our setting). */
export const USABLE_SET_DAYS = 14;

/** Along-track error of an element set at a time, km; before the epoch it grows as it does after. */
export function alongTrackErrorKm(epochMs: number, atMs: number): number {
  return ALONG_TRACK_AT_EPOCH_KM + (ALONG_TRACK_GROWTH_KM_PER_DAY * Math.abs(atMs - epochMs)) / DAY_MS;
}

/** True when an element set of a protected object may be screened with at that time. */
export function isUsableSet(epochMs: number, atMs: number): boolean {
  return Math.abs(atMs - epochMs) <= USABLE_SET_DAYS * DAY_MS;
}

/** The half-angle of an object in degrees: its own, else its class's, never under the smallest. */
export function halfAngleOf(protectedClass: ProtectedClass, ownHalfAngleDeg: number | null): number {
  return Math.max(ownHalfAngleDeg ?? KEEP_OUT[protectedClass].halfAngleDeg, SMALLEST_HALF_ANGLE_DEG);
}

/** The class of that name, or null. */
export function protectedClassNamed(name: string): ProtectedClass | null {
  return PROTECTED_CLASSES.find((known) => known === name) ?? null;
}

/** A half-angle with what the age of the element sets adds to it, shown apart. */
export interface InflatedHalfAngle {
  readonly halfAngleRad: number;
  readonly addedRad: number;
  /** The sum: what the beam must stay clear of. */
  readonly totalRad: number;
}

/**
 * The keep-out half-angle at one time, widened by the along-track errors of both element sets, each as
 * the angle that it spans at its object's range from the station: atan(error / range).
 */
export function inflatedHalfAngle(args: {
  readonly halfAngleDeg: number;
  readonly atMs: number;
  readonly target: { readonly epochMs: number; readonly rangeKm: number };
  readonly other: { readonly epochMs: number; readonly rangeKm: number };
}): InflatedHalfAngle {
  const halfAngleRad = args.halfAngleDeg * DEG;
  const addedRad = errorAngleRad(args.target, args.atMs) + errorAngleRad(args.other, args.atMs);
  return { halfAngleRad, addedRad, totalRad: halfAngleRad + addedRad };
}

function errorAngleRad(object: { epochMs: number; rangeKm: number }, atMs: number): number {
  return Math.atan2(alongTrackErrorKm(object.epochMs, atMs), object.rangeKm);
}

/** A crossing widened by the timing guard at both ends; Unix milliseconds. */
export function guardedCrossing(crossing: { readonly fromMs: number; readonly toMs: number }): {
  readonly fromMs: number;
  readonly toMs: number;
} {
  return { fromMs: crossing.fromMs - TIMING_GUARD_S * 1000, toMs: crossing.toMs + TIMING_GUARD_S * 1000 };
}
