import { EARTH_MU_KM3_PER_S2 } from "../constants";
import type { EarthFixedNode } from "../orbit/earth-fixed";
import { type Path, pathAt } from "../orbit/path";
import type { Vec3 } from "../vector";

/** The half-angle may not change faster than this, rad/s: a guard of 4 s over a low pass changes by 2e-3. */
export const FASTEST_HALF_ANGLE_RAD_PER_S = 2e-3;

/** Stretches are not halved below this; what is left is looked at exactly. */
const SHORTEST_S = 1;

/**
 * SGP4's velocity is not quite the rate of its position: by 17 m/s at most in the published verification
 * file, by 312 m/s for its one orbit of two weeks. Taken as 30 and 500 m/s, from a period of two days up.
 */
const VELOCITY_ERROR_KM_PER_S = 0.03;
const SLOW_ORBIT_VELOCITY_ERROR_KM_PER_S = 0.5;
const SLOW_ORBIT_PERIOD_S = 2 * 86400;

/** Greatest pull on anything outside the Earth in the turning frame, km/s². */
const GREATEST_PULL_KM_PER_S2 = 0.012;

/** What the search for near times works on: one chunk of time, both objects. */
export interface Chunk {
  readonly station: Vec3;
  readonly midMs: number;
  /** Half the length of the chunk, s. */
  readonly halfS: number;
  readonly target: Path;
  /** State of the other object in the middle of the chunk, and its period, s. */
  readonly other: EarthFixedNode;
  readonly otherPeriodS: number;
  readonly halfAngleRad: (atMs: number) => number;
}

const target = new Float64Array(6);

/**
 * Stretches of a chunk, a second or two long, in which the other object may stand within the half-angle of
 * the line to the target; pushed to `out` in order of time as [from, to] in ms. Everything else is shown to
 * be free by a bound: within a stretch neither direction can turn farther than its object can move, and the
 * other object is where its one SGP4 state carries it, up to a bounded remainder.
 */
export function nearTimes(chunk: Chunk, out: [number, number][]): void {
  search(chunk, chunk.midMs, chunk.halfS, out);
}

function search(chunk: Chunk, atMs: number, halfS: number, out: [number, number][]): void {
  if (clearance(chunk, atMs, halfS) > 0) return;
  if (halfS <= SHORTEST_S) {
    const [fromMs, toMs] = [atMs - 1000 * halfS, atMs + 1000 * halfS];
    const last = out.at(-1);
    if (last && last[1] >= fromMs - 1) last[1] = toMs;
    else out.push([fromMs, toMs]);
    return;
  }
  search(chunk, atMs - 500 * halfS, halfS / 2, out);
  search(chunk, atMs + 500 * halfS, halfS / 2, out);
}

/** An angle by which the other object surely stays outside the cone over a stretch; else not above 0. */
function clearance(chunk: Chunk, atMs: number, halfS: number): number {
  const { station: s, other } = chunk;
  pathAt(chunk.target, atMs, target);
  const tx = (target[0] as number) - s.x;
  const ty = (target[1] as number) - s.y;
  const tz = (target[2] as number) - s.z;
  const targetSpeed = Math.hypot(target[3] as number, target[4] as number, target[5] as number);
  const targetKm = Math.sqrt(tx * tx + ty * ty + tz * tz);
  const targetTurn = turnWithin((targetSpeed + GREATEST_PULL_KM_PER_S2 * halfS) * halfS, targetKm);

  const t = (atMs - chunk.midMs) / 1000;
  const ox = other.x + other.vx * t + (other.ax * t * t) / 2 - s.x;
  const oy = other.y + other.vy * t + (other.ay * t * t) / 2 - s.y;
  const oz = other.z + other.vz * t + (other.az * t * t) / 2 - s.z;
  const otherKm = Math.sqrt(ox * ox + oy * oy + oz * oz);
  const speed = Math.sqrt(other.vx * other.vx + other.vy * other.vy + other.vz * other.vz);
  const movedKm = (speed + GREATEST_PULL_KM_PER_S2 * chunk.halfS) * halfS;
  const unsureKm = remainderKm(chunk, speed, Math.abs(t) + halfS);
  const otherTurn = turnWithin(movedKm + unsureKm, otherKm);

  const cx = ty * oz - tz * oy;
  const cy = tz * ox - tx * oz;
  const cz = tx * oy - ty * ox;
  const apart = Math.atan2(Math.sqrt(cx * cx + cy * cy + cz * cz), tx * ox + ty * oy + tz * oz);
  const halfAngle = chunk.halfAngleRad(atMs) + FASTEST_HALF_ANGLE_RAD_PER_S * halfS;
  return apart - targetTurn - otherTurn - halfAngle;
}

/** The largest turn of a direction when its end, some way off, may move by a distance (both km). */
function turnWithin(movedKm: number, rangeKm: number): number {
  return movedKm < rangeKm ? Math.asin(movedKm / rangeKm) : Math.PI;
}

/** How far the other object can be from where its middle state carries it after some seconds, km. */
function remainderKm(chunk: Chunk, speed: number, afterS: number): number {
  const { x, y, z } = chunk.other;
  const radius = Math.sqrt(x * x + y * y + z * z) - speed * afterS;
  const jerk = (3 * EARTH_MU_KM3_PER_S2 * speed) / Math.max(6000, radius) ** 3;
  const velocityError =
    chunk.otherPeriodS > SLOW_ORBIT_PERIOD_S ? SLOW_ORBIT_VELOCITY_ERROR_KM_PER_S : VELOCITY_ERROR_KM_PER_S;
  return 0.2 + velocityError * afterS + (jerk * afterS ** 3) / 6;
}
