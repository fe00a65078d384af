import { EARTH_MU_KM3_PER_S2, TWO_PI } from "../constants";
import type { EarthFixedNode } from "../orbit/earth-fixed";
import { makePath, mustNode, type Path, PropagationFailure, pathAt } from "../orbit/path";
import type { Orbit } from "../orbit/propagate";
import { dot, norm, subtract, type Vec3 } from "../vector";

/** A moment at which two objects are nearer to each other than just before and after. */
export interface CloseApproach {
  readonly atMs: number;
  readonly missKm: number;
  readonly relativeSpeedKmPerS: number;
  /** Relative position (km) and velocity (km/s) of the second object, TEME: what a probability needs. */
  readonly relativeKm: Vec3;
  readonly relativeKmPerS: Vec3;
  /** The nearest moment lies at an end of the time looked at: outside they may be nearer still. */
  readonly atEdge: boolean;
}

/** Close approaches with one object, or the sentence why it could not be checked. */
export type ApproachScreening =
  | { readonly ok: true; readonly approaches: CloseApproach[] }
  | { readonly ok: false; readonly reason: string };

/** What SGP4's short-period terms can add to the mean apogee and take from the mean perigee, km. */
const FILTER_PAD_KM = 50;

/** Near each other, objects are looked at this often: their relative motion is then nearly straight. */
const STEP_MS = 30_000;

/** Nodes of the first object's path lie at most this far apart, in a circular orbit at its perigee. */
const PATH_STEP_RAD = 0.26;

/** The moment of closest approach is found to this. */
const RESOLUTION_MS = 1;

/**
 * All closest approaches of `primary` with each of `others` nearer than a threshold (km) within
 * [fromMs, toMs), in order of time, on SGP4. Far apart, time is skipped by the greatest speed at which the two
 * can near each other. Orbits whose shells never come near cost nothing: apogee against perigee, padded by
 * 50 km (Hoots, Crawford and Roehrich 1984, Celest. Mech. 33, 143).
 */
export function closeApproaches(args: {
  readonly primary: Orbit;
  readonly others: readonly Orbit[];
  readonly fromMs: number;
  readonly toMs: number;
  readonly thresholdKm: number;
}): ApproachScreening[] {
  const { primary, others, fromMs, toMs, thresholdKm } = args;
  if (!(fromMs < toMs)) return others.map(() => ({ ok: true, approaches: [] }));
  const stepS = PATH_STEP_RAD * Math.sqrt(shell(primary).perigeeKm ** 3 / EARTH_MU_KM3_PER_S2);
  const path = makePath(primary, fromMs, toMs, Math.ceil((toMs - fromMs) / (1000 * stepS)));
  return others.map((other) => {
    if (shellGapKm(primary, other) > thresholdKm + FILTER_PAD_KM) return { ok: true, approaches: [] };
    try {
      return { ok: true, approaches: follow(path, other, fromMs, toMs, thresholdKm) };
    } catch (error) {
      if (!(error instanceof PropagationFailure)) throw error;
      return { ok: false, reason: error.message };
    }
  });
}

/** Perigee and apogee radius, km, and speed at perigee, km/s, from the mean elements. */
function shell(orbit: Orbit): { perigeeKm: number; apogeeKm: number; fastest: number } {
  const semiMajorKm = Math.cbrt(EARTH_MU_KM3_PER_S2 / (TWO_PI / orbit.periodS) ** 2);
  const e = orbit.elements.eccentricity;
  const fastest = Math.sqrt((EARTH_MU_KM3_PER_S2 * (1 + e)) / (semiMajorKm * (1 - e)));
  return { perigeeKm: semiMajorKm * (1 - e), apogeeKm: semiMajorKm * (1 + e), fastest };
}

function shellGapKm(a: Orbit, b: Orbit): number {
  const [p, q] = [shell(a), shell(b)];
  return Math.max(p.perigeeKm, q.perigeeKm) - Math.min(p.apogeeKm, q.apogeeKm);
}

/** Distance (km) and its growth (km²/s, distance times rate) at one time. */
interface Distance {
  readonly atMs: number;
  readonly km: number;
  readonly growth: number;
}

const first = new Float64Array(6);

function follow(
  path: Path,
  other: Orbit,
  fromMs: number,
  toMs: number,
  thresholdKm: number,
): CloseApproach[] {
  const found: CloseApproach[] = [];
  // 3 % more than at the mean perigee, for the short-period terms.
  const fastest = 1.03 * (shell(path.orbit).fastest + shell(other).fastest);
  let last = distanceOnPath(path, other, fromMs);
  if (last.km <= thresholdKm && last.growth >= 0) found.push(describe(path.orbit, other, fromMs, true));
  while (last.atMs < toMs) {
    const freeMs = (1000 * (last.km - thresholdKm - 1)) / fastest;
    const atMs = Math.min(toMs, last.atMs + Math.max(STEP_MS, freeMs));
    const next = distanceOnPath(path, other, atMs);
    // Over a longer skip they cannot have come within the threshold.
    if (freeMs <= STEP_MS && last.growth < 0 && next.growth >= 0) {
      const nearest = describe(path.orbit, other, nearestTime(path.orbit, other, last, next), false);
      if (nearest.missKm <= thresholdKm) found.push(nearest);
    }
    last = next;
  }
  if (last.km <= thresholdKm && last.growth < 0) found.push(describe(path.orbit, other, toMs, true));
  return found;
}

function distanceOnPath(path: Path, other: Orbit, atMs: number): Distance {
  pathAt(path, atMs, first);
  const b = mustNode(other, atMs);
  const [x = 0, y = 0, z = 0, vx = 0, vy = 0, vz = 0] = first;
  return distance(atMs, b, x, y, z, vx, vy, vz);
}

function exactDistance(a: Orbit, b: Orbit, atMs: number): Distance {
  const p = mustNode(a, atMs);
  return distance(atMs, mustNode(b, atMs), p.x, p.y, p.z, p.vx, p.vy, p.vz);
}

function distance(
  atMs: number,
  b: EarthFixedNode,
  x: number,
  y: number,
  z: number,
  vx: number,
  vy: number,
  vz: number,
): Distance {
  const [dx, dy, dz] = [b.x - x, b.y - y, b.z - z];
  const growth = dx * (b.vx - vx) + dy * (b.vy - vy) + dz * (b.vz - vz);
  return { atMs, km: Math.sqrt(dx * dx + dy * dy + dz * dz), growth };
}

/** When the distance stops shrinking, between two times, on SGP4: false position, halving a stuck end. */
function nearestTime(a: Orbit, b: Orbit, from: Distance, to: Distance): number {
  let [x0, y0, x1, y1] = [from.atMs, from.growth, to.atMs, to.growth];
  let root = x0;
  for (let step = 0; step < 60; step++) {
    const previous = root;
    root = y1 === y0 ? (x0 + x1) / 2 : (x0 * y1 - x1 * y0) / (y1 - y0);
    const y = exactDistance(a, b, root).growth;
    if (y === 0 || Math.abs(root - previous) < RESOLUTION_MS) return root;
    if (y > 0 === y1 > 0) y0 /= 2;
    else [x0, y0] = [x1, y1];
    [x1, y1] = [root, y];
  }
  return root;
}

function describe(a: Orbit, b: Orbit, atMs: number, atEdge: boolean): CloseApproach {
  const [p, q] = [a.stateAt(atMs), b.stateAt(atMs)];
  if (!p.ok) throw new PropagationFailure(p.reason);
  if (!q.ok) throw new PropagationFailure(q.reason);
  const relativeKm = subtract(q.state.rKm, p.state.rKm);
  const relativeKmPerS = subtract(q.state.vKmPerS, p.state.vKmPerS);
  return {
    atMs,
    missKm: Math.sqrt(dot(relativeKm, relativeKm)),
    relativeSpeedKmPerS: norm(relativeKmPerS),
    relativeKm,
    relativeKmPerS,
    atEdge,
  };
}
