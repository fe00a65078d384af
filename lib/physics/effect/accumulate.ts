import type { OrbitState } from "@/lib/physics/orbit/propagate";
import { dot, norm, subtract } from "@/lib/physics/vector";
import { gravityKmPerS2 } from "./gravity";
import type { Track, TrackPoint } from "./track";

/** What a laser does to a fragment, as far as the orbit is concerned. */
export interface Push {
  readonly repetitionRateHz: number;
  /** Velocity change in m/s away from the station by one pulse, at a range in km and an elevation in radians. */
  deltaVPerPulseMPerS(rangeKm: number, elevationRad: number): number;
}

/** How far a nudged fragment has moved from its untouched path, and what it was given on the way. */
export interface Deviation {
  /** Position off the path, km, and velocity, km/s. */
  x: number;
  y: number;
  z: number;
  vx: number;
  vy: number;
  vz: number;
  /** Sums of the velocity changes along the axes of each moment, m/s. */
  radial: number;
  transverse: number;
  normal: number;
}

/** A fragment that nothing has touched yet. */
export function noDeviation(): Deviation {
  return { x: 0, y: 0, z: 0, vx: 0, vy: 0, vz: 0, radial: 0, transverse: 0, normal: 0 };
}

/**
 * Number of pulses between two times (s after the first pulse), the earlier included and the later not.
 */
export function pulsesBetween(repetitionRateHz: number, fromS: number, toS: number): number {
  return pulsesBefore(repetitionRateHz, toS) - pulsesBefore(repetitionRateHz, fromS);
}

/** The tolerance keeps 10 s at 10 Hz at 100 pulses whatever the last digit of the product. */
function pulsesBefore(repetitionRateHz: number, seconds: number): number {
  return Math.ceil(seconds * repetitionRateHz - 1e-6);
}

/**
 * Lases from `fromMs` to `toMs` on top of a deviation, in steps of at most 1 s that end on whole UTC
 * seconds, and changes the deviation in place. In each step the pulses' velocity change acts in the
 * middle, along the line from the station to where the nudged fragment really is; the deviation itself
 * moves under the difference of gravity between nudged and untouched place (Encke's method, leapfrog).
 * So the path stays SGP4's, and the nudge is exact to the second order of a one-second step.
 */
export function lase(
  deviation: Deviation,
  track: Track,
  push: Push,
  span: {
    readonly fromMs: number;
    readonly toMs: number;
    readonly firstPulseMs: number;
    readonly whole: boolean;
  },
): void {
  for (let startMs = span.fromMs; startMs < span.toMs; ) {
    const second = Math.floor(startMs / 1000);
    const endMs = Math.min(span.toMs, (second + 1) * 1000);
    const isWhole = endMs - startMs === 1000;
    const middle = isWhole ? track.middleOfSecond(second) : track.at((startMs + endMs) / 2);
    const [fromS, toS] = [(startMs - span.firstPulseMs) / 1000, (endMs - span.firstPulseMs) / 1000];
    const pulses = span.whole
      ? pulsesBetween(push.repetitionRateHz, fromS, toS)
      : (toS - fromS) * push.repetitionRateHz;
    advance(deviation, middle, push, toS - fromS, pulses);
    startMs = endMs;
  }
}

/**
 * One step: drift half-way, kick by gravity's difference and the pulses, drift on. Plain numbers in here:
 * the choice of a dwell takes a hundred thousand of these steps.
 */
function advance(d: Deviation, middle: TrackPoint, push: Push, stepS: number, pulses: number): void {
  const r = middle.state.rKm;
  const half = stepS / 2;
  d.x += d.vx * half;
  d.y += d.vy * half;
  d.z += d.vz * half;
  if (d.x !== 0 || d.y !== 0 || d.z !== 0) {
    const nudged = gravityKmPerS2(r.x + d.x, r.y + d.y, r.z + d.z);
    const untouched = middle.gravity;
    d.vx += (nudged.x - untouched.x) * stepS;
    d.vy += (nudged.y - untouched.y) * stepS;
    d.vz += (nudged.z - untouched.z) * stepS;
  }
  const { siteKm, up } = middle;
  const lineX = r.x + d.x - siteKm.x;
  const lineY = r.y + d.y - siteKm.y;
  const lineZ = r.z + d.z - siteKm.z;
  const rangeKm = Math.sqrt(lineX * lineX + lineY * lineY + lineZ * lineZ);
  const elevationRad = Math.asin((lineX * up.x + lineY * up.y + lineZ * up.z) / rangeKm);
  const kick = pulses * push.deltaVPerPulseMPerS(rangeKm, Math.max(0, elevationRad));
  const perKm = kick / rangeKm;
  if (kick !== 0) applyKick(d, middle.state, lineX * perKm, lineY * perKm, lineZ * perKm);
  d.x += d.vx * half;
  d.y += d.vy * half;
  d.z += d.vz * half;
}

/** Adds a kick in m/s, and its parts along the nudged fragment's own axes. */
function applyKick(d: Deviation, untouched: OrbitState, kx: number, ky: number, kz: number): void {
  const x = untouched.rKm.x + d.x;
  const y = untouched.rKm.y + d.y;
  const z = untouched.rKm.z + d.z;
  const vx = untouched.vKmPerS.x + d.vx;
  const vy = untouched.vKmPerS.y + d.vy;
  const vz = untouched.vKmPerS.z + d.vz;
  d.vx += kx * 1e-3;
  d.vy += ky * 1e-3;
  d.vz += kz * 1e-3;
  const hx = y * vz - z * vy;
  const hy = z * vx - x * vz;
  const hz = x * vy - y * vx;
  const radius = Math.sqrt(x * x + y * y + z * z);
  const h = Math.sqrt(hx * hx + hy * hy + hz * hz);
  d.radial += (kx * x + ky * y + kz * z) / radius;
  d.normal += (kx * hx + ky * hy + kz * hz) / h;
  // Transverse = normal × radial, so its part of the kick is k · (h × r) / (|h| |r|).
  d.transverse += (kx * (hy * z - hz * y) + ky * (hz * x - hx * z) + kz * (hx * y - hy * x)) / (h * radius);
}

/** Range in km and elevation in radians, not below 0, of the untouched fragment at a point of its track. */
export function elevationAndRange(point: TrackPoint): { rangeKm: number; elevationRad: number } {
  const line = subtract(point.state.rKm, point.siteKm);
  const rangeKm = norm(line);
  return { rangeKm, elevationRad: Math.max(0, Math.asin(dot(line, point.up) / rangeKm)) };
}

/** The nudged state that belongs to an untouched one and a deviation at the same time. */
export function deviated(untouched: OrbitState, d: Deviation): OrbitState {
  const { rKm: r, vKmPerS: v } = untouched;
  return {
    rKm: { x: r.x + d.x, y: r.y + d.y, z: r.z + d.z },
    vKmPerS: { x: v.x + d.vx, y: v.y + d.vy, z: v.z + d.vz },
  };
}
