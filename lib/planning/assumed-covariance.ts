import { rtnAxes } from "@/lib/physics/effect/two-body";
import type { OrbitState } from "@/lib/physics/orbit/propagate";
import type { Covariance3 } from "@/lib/physics/screening/collision-probability";
import type { Vec3 } from "@/lib/physics/vector";
import { alongTrackErrorKm, type ProtectedClass } from "./keep-out";

/** Standard deviations along the axes of an orbit, km. */
export interface Sigmas {
  readonly radialKm: number;
  readonly transverseKm: number;
  readonly normalKm: number;
}

/** Across the track an element set is taken to be so much better than along it (our setting). */
const ACROSS_SHARE = 0.1;

/** P10 and P90 of a normal distribution lie so many standard deviations apart. */
const P10_TO_P90_SIGMAS = 2.5631;

/**
 * What an element set is assumed to be off by, as standard deviations: along the track 1 km at epoch and
 * 1 km a day more (common practice), a tenth of that across it (our setting). Sets carry no covariance.
 */
export function elementSetSigmas(epochMs: number, atMs: number): Sigmas {
  const transverseKm = alongTrackErrorKm(epochMs, atMs);
  const acrossKm = ACROSS_SHARE * transverseKm;
  return { radialKm: acrossKm, transverseKm, normalKm: acrossKm };
}

/**
 * The same with what is not known about the nudge: the band (P10 and P90, km) of the semi-major axis after
 * it, as an error of the height and, growing with time, along the track: δs = 3/2 n δa t (Kepler's
 * third law for a near-circular orbit).
 */
export function nudgedSigmas(args: {
  readonly epochMs: number;
  readonly atMs: number;
  readonly dwellEndMs: number;
  readonly periodS: number;
  readonly axisBandKm: { readonly p10: number; readonly p90: number };
}): Sigmas {
  const { epochMs, atMs, dwellEndMs, periodS, axisBandKm } = args;
  const set = elementSetSigmas(epochMs, atMs);
  const axisKm = Math.abs(axisBandKm.p90 - axisBandKm.p10) / P10_TO_P90_SIGMAS;
  const driftKm = (1.5 * (2 * Math.PI) * axisKm * Math.abs(atMs - dwellEndMs)) / (1000 * periodS);
  return {
    radialKm: Math.hypot(set.radialKm, axisKm),
    transverseKm: Math.hypot(set.transverseKm, driftKm),
    normalKm: set.normalKm,
  };
}

/** The covariance of a position, km², in the frame of the state whose axes the deviations belong to. */
export function covarianceOf(state: OrbitState, sigmas: Sigmas): Covariance3 {
  const { radial, transverse, normal } = rtnAxes(state);
  const parts: readonly (readonly [Vec3, number])[] = [
    [radial, sigmas.radialKm ** 2],
    [transverse, sigmas.transverseKm ** 2],
    [normal, sigmas.normalKm ** 2],
  ];
  const entry = (a: "x" | "y" | "z", b: "x" | "y" | "z"): number =>
    parts.reduce((sum, [axis, variance]) => sum + variance * axis[a] * axis[b], 0);
  return [
    [entry("x", "x"), entry("x", "y"), entry("x", "z")],
    [entry("y", "x"), entry("y", "y"), entry("y", "z")],
    [entry("z", "x"), entry("z", "y"), entry("z", "z")],
  ];
}

/** Sum of two covariances. */
export function addCovariances(a: Covariance3, b: Covariance3): Covariance3 {
  const row = (i: 0 | 1 | 2): [number, number, number] => [
    a[i][0] + b[i][0],
    a[i][1] + b[i][1],
    a[i][2] + b[i][2],
  ];
  return [row(0), row(1), row(2)];
}

/**
 * Radius that a protected object is assumed to have, m: a crewed station half its greatest length of some
 * 109 m (from memory), all others 5 m (our setting).
 */
export function assumedRadiusM(protectedClass: ProtectedClass): number {
  return protectedClass === "crewed" ? 55 : 5;
}

/** Radius of a fragment, m: of the disc that has its area. */
export function fragmentRadiusM(areaM2: number): number {
  return Math.sqrt(areaM2 / Math.PI);
}
