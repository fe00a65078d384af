import {
  DEG,
  EARTH_J2,
  EARTH_MU_KM3_PER_S2,
  EARTH_RADIUS_KM,
  EARTH_ROTATION_RAD_PER_S,
  TWO_PI,
} from "../constants";
import type { EarthFixedNode } from "../orbit/earth-fixed";
import type { Sight } from "./sight";

/** A stretch of time outside of which the object cannot be above a station's limit; Unix ms. */
export interface Window {
  readonly fromMs: number;
  readonly toMs: number;
}

/** Revolutions that one state is trusted to look ahead. */
const REVOLUTIONS_AHEAD = 2;

/**
 * Allowance on every angle, radians: geodetic against geocentric vertical (0.2°), the change of the plane and
 * of the phase over two revolutions (under 1° by J2 and drag), the station's own way during half a pass (2°).
 */
const ALLOWANCE_RAD = 3.5 * DEG;

/** Above this apogee radius, or beyond this half-angle of visibility, every stretch is looked at instead. */
const FARTHEST_SKIPPING_KM = 10_000;
const WIDEST_SKIPPING_RAD = 60 * DEG;

/** A window with less than this left is over: what it still holds is allowance, some 50 s of it. */
const OVER_S = 20;

/** The orbit through one node as far as the skipping needs it. Lengths km, times s, angles rad. */
interface Plane {
  readonly node: EarthFixedNode;
  /** Unit vectors: to the object, along its way, and normal to the plane. */
  readonly p: readonly [number, number, number];
  readonly q: readonly [number, number, number];
  readonly n: readonly [number, number, number];
  readonly meanMotion: number;
  readonly periodS: number;
  /** e cos ν and e sin ν at the node. */
  readonly ec: number;
  readonly es: number;
  readonly apogeeKm: number;
}

/** The half-angle at the Earth's centre within which a station can see up to a radius, radians. */
export function visibilityHalfAngle(sight: Sight, radiusKm: number): number {
  const { x, y, z } = sight.frame.positionKm;
  const stationKm = Math.hypot(x, y, z);
  const limit = sight.minElevationRad;
  const cosine = (stationKm * Math.cos(limit)) / Math.max(radiusKm, stationKm);
  return Math.acos(Math.min(1, cosine)) - limit;
}

/** Whether passes of an orbit with this apogee (km from the centre) can be found by skipping. */
export function canSkip(sights: readonly Sight[], apogeeKm: number): boolean {
  if (apogeeKm > FARTHEST_SKIPPING_KM) return false;
  return sights.every((s) => visibilityHalfAngle(s, apogeeKm) < WIDEST_SKIPPING_RAD);
}

/** The osculating orbit at a node, in axes that stand still where the Earth-fixed ones are at the node. */
export function planeAt(node: EarthFixedNode): Plane {
  const { x, y, z } = node;
  const vx = node.vx - EARTH_ROTATION_RAD_PER_S * y;
  const vy = node.vy + EARTH_ROTATION_RAD_PER_S * x;
  const vz = node.vz;
  const r = Math.sqrt(x * x + y * y + z * z);
  const hx = y * vz - z * vy;
  const hy = z * vx - x * vz;
  const hz = x * vy - y * vx;
  const h = Math.sqrt(hx * hx + hy * hy + hz * hz);
  const mu = EARTH_MU_KM3_PER_S2;
  const latus = (h * h) / mu;
  // Energy with the J2 potential: its semi-major axis does not swing by 10 km within a revolution.
  const swing = (mu * EARTH_J2 * EARTH_RADIUS_KM ** 2 * (1.5 * (z / r) ** 2 - 0.5)) / (r * r * r);
  const energy = (vx * vx + vy * vy + vz * vz) / 2 - mu / r + swing;
  const semiMajorKm = -mu / (2 * energy);
  const ec = latus / r - 1;
  const es = (Math.sqrt(latus / mu) * (x * vx + y * vy + z * vz)) / r;
  const meanMotion = Math.sqrt(mu / semiMajorKm ** 3);
  const p = [x / r, y / r, z / r] as const;
  const n = [hx / h, hy / h, hz / h] as const;
  const q = [n[1] * p[2] - n[2] * p[1], n[2] * p[0] - n[0] * p[2], n[0] * p[1] - n[1] * p[0]] as const;
  const apogeeKm = semiMajorKm * (1 + Math.hypot(ec, es)) + 50;
  return { node, p, q, n, meanMotion, periodS: TWO_PI / meanMotion, ec, es, apogeeKm };
}

/** Seconds from the node until the object has gone on by an angle, to the second order in eccentricity. */
function secondsToSweep(plane: Plane, angle: number): number {
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  const es = plane.es * c + plane.ec * s;
  const ec = plane.ec * c - plane.es * s;
  return (angle - 2 * (es - plane.es) + 1.5 * (es * ec - plane.es * plane.ec)) / plane.meanMotion;
}

/** The station's direction after some seconds, as cosines along p, q, n. */
function stationAfter(plane: Plane, sight: Sight, seconds: number): [number, number, number] {
  const turn = EARTH_ROTATION_RAD_PER_S * seconds;
  const { x, y, z } = sight.frame.positionKm;
  const r = Math.sqrt(x * x + y * y + z * z);
  const c = Math.cos(turn) / r;
  const s = Math.sin(turn) / r;
  const [a, b, d] = [c * x - s * y, s * x + c * y, z / r];
  const { p, q, n } = plane;
  return [a * p[0] + b * p[1] + d * p[2], a * q[0] + b * q[1] + d * q[2], a * n[0] + b * n[1] + d * n[2]];
}

/**
 * The next stretch, from the node on, in which the object can stand above the station's limit; within the
 * next two revolutions. When there is none the window is empty and starts where the look-ahead ends.
 *
 * A station sees the object only near the moment when both have the same phase along the orbit's plane, and
 * only if the station is then near that plane. So those moments are computed, one per revolution, and the
 * others need no SGP4 at all.
 */
export function nextWindow(plane: Plane, sight: Sight): Window {
  const startMs = plane.node.atMs;
  const reach = Math.max(0, visibilityHalfAngle(sight, plane.apogeeKm)) + ALLOWANCE_RAD;
  const horizonS = REVOLUTIONS_AHEAD * plane.periodS;
  const [along, across] = stationAfter(plane, sight, 0);
  const phaseNow = Math.atan2(across, along);
  for (let turn = 0; turn <= REVOLUTIONS_AHEAD + 1; turn++) {
    const met = meeting(plane, sight, phaseNow + TWO_PI * turn);
    const fromS = secondsToSweep(plane, met.phase - reach);
    if (fromS >= horizonS) break;
    const toS = secondsToSweep(plane, met.phase + reach);
    if (Math.abs(met.offPlane) <= reach && toS > OVER_S) {
      return { fromMs: startMs + 1000 * Math.max(0, fromS), toMs: startMs + 1000 * toS };
    }
  }
  return { fromMs: startMs + 1000 * horizonS, toMs: startMs + 1000 * horizonS };
}

/** Where object and station have the same phase, near a first guess: the phase and the angle off the plane. */
function meeting(plane: Plane, sight: Sight, guess: number): { phase: number; offPlane: number } {
  let phase = guess;
  let offPlane = 0;
  for (let step = 0; step < 3; step++) {
    const [along, across, off] = stationAfter(plane, sight, secondsToSweep(plane, phase));
    offPlane = Math.asin(Math.max(-1, Math.min(1, off)));
    const now = Math.atan2(across, along);
    // The nearest turn of the station's phase to the last estimate.
    phase = now + TWO_PI * Math.round((phase - now) / TWO_PI);
  }
  return { phase, offPlane };
}
