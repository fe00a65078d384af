import {
  DEG,
  EARTH_J2,
  EARTH_MU_KM3_PER_S2,
  EARTH_RADIUS_KM,
  EARTH_ROTATION_RAD_PER_S,
  TWO_PI,
} from "../constants";
import type { EarthFixedNode } from "../orbit/earth-fixed";
import { unit, type Vec3 } from "../vector";
import type { Sight } from "./sight";

/** A stretch of time outside of which the object cannot be above a station's limit; Unix ms. */
export interface Window {
  readonly fromMs: number;
  readonly toMs: number;
}

/** Revolutions that one state is trusted to look ahead. */
const REVOLUTIONS_AHEAD = 3;

/**
 * Allowances, radians. Off the plane: geodetic against geocentric vertical (0.2°) and the turn of the plane
 * by J2. Along the orbit: what drag and the short-period terms do to the phase. Measured on 1,200 real sets,
 * the osculating orbit is off by 0.2°, 0.3°, 0.5°, 0.6° off the plane and by 0.4°, 1.0°, 2.1°, 3.7° along the
 * orbit after one, two, three, four revolutions. An orbit that does worse is not searched by skipping.
 */
const OFF_PLANE_ALLOWANCE_RAD = 1.2 * DEG;
const PHASE_ALLOWANCE_RAD = 0.5 * DEG;
const PHASE_ALLOWANCE_PER_TURN_RAD = 1 * DEG;

/** Above this apogee radius, eccentricity or half-angle of visibility every stretch is looked at instead. */
const FARTHEST_SKIPPING_KM = 10_000;
const MOST_ECCENTRIC_SKIPPING = 0.1;
const WIDEST_SKIPPING_RAD = 60 * DEG;

/** A window with less than this left is over: what it still holds is allowance. */
const OVER_S = 5;

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
  const limit = sight.minElevationRad;
  const cosine = (sight.radiusKm * Math.cos(limit)) / Math.max(radiusKm, sight.radiusKm);
  return Math.acos(Math.min(1, cosine)) - limit;
}

/** Whether an orbit of this eccentricity and apogee (km from the centre) lies low enough for skipping. */
export function isLow(sights: readonly Sight[], eccentricity: number, apogeeKm: number): boolean {
  if (apogeeKm > FARTHEST_SKIPPING_KM || eccentricity > MOST_ECCENTRIC_SKIPPING) return false;
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

/** Cosine and sine (times the cosine of the angle off the plane) of the station's phase, and off-plane sine. */
interface Phase {
  along: number;
  across: number;
  off: number;
}

const scratch: Phase = { along: 0, across: 0, off: 0 };

/** An Earth-fixed direction after some seconds, as cosines along p, q, n, written into `scratch`. */
function stationAfter(plane: Plane, direction: Vec3, seconds: number): Phase {
  const turn = EARTH_ROTATION_RAD_PER_S * seconds;
  const { x, y, z } = direction;
  const c = Math.cos(turn);
  const s = Math.sin(turn);
  const a = c * x - s * y;
  const b = s * x + c * y;
  const { p, q, n } = plane;
  scratch.along = a * p[0] + b * p[1] + z * p[2];
  scratch.across = a * q[0] + b * q[1] + z * q[2];
  scratch.off = a * n[0] + b * n[1] + z * n[2];
  return scratch;
}

/** Between two estimates of a meeting the station moves off the plane by less than this (sine). */
const FIRST_ESTIMATE = 0.1;

/**
 * The next stretch, from the node on, in which the object can stand above the station's limit; within the
 * next three revolutions. When there is none the window is empty and starts where the look-ahead ends.
 *
 * A station sees the object only near the moment when both have the same phase along the orbit's plane, and
 * only if the station is then near that plane. So those moments are computed, one per revolution, and the
 * others need no SGP4 at all.
 */
export function nextWindow(plane: Plane, sight: Sight): Window {
  const startMs = plane.node.atMs;
  const reach = Math.max(0, visibilityHalfAngle(sight, plane.apogeeKm)) + OFF_PLANE_ALLOWANCE_RAD;
  const sinReach = Math.sin(reach);
  const cosReach = Math.cos(reach);
  const horizonS = REVOLUTIONS_AHEAD * plane.periodS;
  let station = stationAfter(plane, sight.direction, 0);
  let phase = Math.atan2(station.across, station.along);
  for (;;) {
    let meetingS = secondsToSweep(plane, phase);
    if (meetingS - plane.periodS > horizonS) break;
    station = stationAfter(plane, sight.direction, meetingS);
    if (Math.abs(station.off) <= sinReach + FIRST_ESTIMATE) {
      for (let step = 0; step < 2; step++) {
        phase = nearestTurn(Math.atan2(station.across, station.along), phase);
        meetingS = secondsToSweep(plane, phase);
        station = stationAfter(plane, sight.direction, meetingS);
      }
      if (Math.abs(station.off) <= sinReach) {
        const half =
          Math.acos(cosReach / Math.sqrt(1 - station.off * station.off)) +
          phaseAllowance(meetingS / plane.periodS);
        const fromS = secondsToSweep(plane, phase - half);
        const toS = secondsToSweep(plane, phase + half);
        if (fromS >= horizonS) break;
        if (toS > OVER_S) return { fromMs: startMs + 1000 * Math.max(0, fromS), toMs: startMs + 1000 * toS };
      }
    }
    phase += TWO_PI;
  }
  return { fromMs: startMs + 1000 * horizonS, toMs: startMs + 1000 * horizonS };
}

function phaseAllowance(turns: number): number {
  return PHASE_ALLOWANCE_RAD + PHASE_ALLOWANCE_PER_TURN_RAD * Math.max(0, turns);
}

/**
 * Whether what a node foretells of a later node of the same orbit, some revolutions on, is well within the
 * allowances: a quarter of them is kept for places in between.
 */
export function foretells(node: EarthFixedNode, later: EarthFixedNode): boolean {
  const plane = planeAt(node);
  const seconds = (later.atMs - node.atMs) / 1000;
  const place = stationAfter(plane, directionOf(later), seconds);
  const phase = nearestTurn(Math.atan2(place.across, place.along), plane.meanMotion * seconds);
  const lateRad = (secondsToSweep(plane, phase) - seconds) * plane.meanMotion;
  const allowed = 0.75 * phaseAllowance(seconds / plane.periodS);
  return Math.abs(lateRad) < allowed && Math.abs(place.off) < 0.75 * OFF_PLANE_ALLOWANCE_RAD;
}

function directionOf(node: EarthFixedNode): Vec3 {
  return unit({ x: node.x, y: node.y, z: node.z });
}

/** The turn of an angle that lies nearest to another angle. */
function nearestTurn(angle: number, to: number): number {
  return angle + TWO_PI * Math.round((to - angle) / TWO_PI);
}
