import { EARTH_J2, EARTH_MU_KM3_PER_S2, EARTH_RADIUS_KM, EARTH_ROTATION_RAD_PER_S } from "../constants";
import { gmstRad } from "../frames/earth";
import type { Orbit, OrbitState } from "./propagate";

/**
 * Position (km), velocity (km/s) and acceleration (km/s²) in the Earth-fixed frame at one time. Plain
 * numbers, not vectors: searches make millions of these.
 */
export interface EarthFixedNode {
  readonly atMs: number;
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly vx: number;
  readonly vy: number;
  readonly vz: number;
  readonly ax: number;
  readonly ay: number;
  readonly az: number;
}

const W = EARTH_ROTATION_RAD_PER_S;

/**
 * The SGP4 state at a time, Earth-fixed by sidereal time, with the acceleration of two bodies and J2 in the
 * rotating frame. Null where propagation fails: `orbit.stateAt` has the sentence.
 */
export function earthFixedNode(orbit: Orbit, atMs: number): EarthFixedNode | null {
  const got = orbit.stateAt(atMs);
  if (!got.ok) return null;
  const { rKm, vKmPerS } = got.state;
  const angle = gmstRad(atMs);
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  const x = c * rKm.x + s * rKm.y;
  const y = c * rKm.y - s * rKm.x;
  const z = rKm.z;
  const vx = c * vKmPerS.x + s * vKmPerS.y + W * y;
  const vy = c * vKmPerS.y - s * vKmPerS.x - W * x;
  const r2 = x * x + y * y + z * z;
  const central = -EARTH_MU_KM3_PER_S2 / (r2 * Math.sqrt(r2));
  const oblate = (1.5 * EARTH_J2 * EARTH_RADIUS_KM * EARTH_RADIUS_KM) / r2;
  const polar = (5 * z * z) / r2;
  const level = central * (1 + oblate * (1 - polar)) + W * W;
  return {
    atMs,
    x,
    y,
    z,
    vx,
    vy,
    vz: vKmPerS.z,
    // Coriolis and centrifugal parts belong to the turning frame.
    ax: level * x + 2 * W * vy,
    ay: level * y - 2 * W * vx,
    az: central * (1 + oblate * (3 - polar)) * z,
  };
}

/** The node carried on by some milliseconds with its own acceleration; for fractions of a second only. */
export function shiftNode(node: EarthFixedNode, byMs: number): EarthFixedNode {
  const t = byMs / 1000;
  const half = (t * t) / 2;
  return {
    ...node,
    atMs: node.atMs + byMs,
    x: node.x + node.vx * t + node.ax * half,
    y: node.y + node.vy * t + node.ay * half,
    z: node.z + node.vz * t + node.az * half,
    vx: node.vx + node.ax * t,
    vy: node.vy + node.ay * t,
    vz: node.vz + node.az * t,
  };
}

/** The node in the form of an Earth-fixed state. */
export function stateOfNode(node: EarthFixedNode): OrbitState {
  return {
    rKm: { x: node.x, y: node.y, z: node.z },
    vKmPerS: { x: node.vx, y: node.vy, z: node.vz },
  };
}
