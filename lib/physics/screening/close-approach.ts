import { EARTH_MU_KM3_PER_S2, EARTH_RADIUS_KM } from "../constants";
import type { EarthFixedNode } from "../orbit/earth-fixed";
import { makePath, mustNode, type Path, PropagationFailure, pathAt } from "../orbit/path";
import type { Orbit, OrbitState } from "../orbit/propagate";
import { cross, dot, norm, subtract, type Vec3 } from "../vector";

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

/** What the short-period terms can add to an osculating apogee and take from a perigee, km. */
const FILTER_PAD_KM = 50;

/** The same for the speed at perigee. */
const SPEED_PAD = 1.03;

/** Escape speed at the ground, km/s: nothing that comes down is faster. */
const ESCAPE = Math.sqrt((2 * EARTH_MU_KM3_PER_S2) / EARTH_RADIUS_KM);

/** What the polynomials of the first object's path can be off by, km, near the perigee of a long orbit. */
const PATH_PAD_KM = 3;

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
  const screen = (other: Orbit): ApproachScreening => {
    try {
      const [p, q] = [shellOver(primary, fromMs, toMs), shellOver(other, fromMs, toMs)];
      if (shellGapKm(p, q) > thresholdKm + FILTER_PAD_KM) return { ok: true, approaches: [] };
      path ??= makePath(primary, fromMs, toMs, stepsFor(p, fromMs, toMs));
      const fastest = SPEED_PAD * (p.fastest + q.fastest);
      return { ok: true, approaches: follow(path, other, fromMs, toMs, thresholdKm, fastest) };
    } catch (error) {
      if (!(error instanceof PropagationFailure)) throw error;
      return { ok: false, reason: error.message };
    }
  };
  let path: Path | null = null;
  return others.map(screen);
}

function stepsFor(shell: Shell, fromMs: number, toMs: number): number {
  const stepS = PATH_STEP_RAD * Math.sqrt(shell.perigeeKm ** 3 / EARTH_MU_KM3_PER_S2);
  return Math.ceil((toMs - fromMs) / (1000 * stepS));
}

/** The shell an orbit keeps to, km from the Earth's centre, and its greatest speed, km/s. */
interface Shell {
  readonly perigeeKm: number;
  readonly apogeeKm: number;
  readonly fastest: number;
}

/**
 * The shell by the osculating orbits at both ends of the time, since drag lowers it in between; down to the
 * ground when the object comes down before the end. Throws PropagationFailure.
 */
function shellOver(orbit: Orbit, fromMs: number, toMs: number): Shell {
  const start = osculatingShell(mustState(orbit, fromMs));
  const last = orbit.stateAt(toMs);
  const end = last.ok
    ? osculatingShell(last.state)
    : { ...start, perigeeKm: EARTH_RADIUS_KM, fastest: ESCAPE };
  return {
    perigeeKm: Math.min(start.perigeeKm, end.perigeeKm),
    apogeeKm: Math.max(start.apogeeKm, end.apogeeKm),
    fastest: Math.max(start.fastest, end.fastest),
  };
}

function osculatingShell({ rKm, vKmPerS }: OrbitState): Shell {
  const mu = EARTH_MU_KM3_PER_S2;
  const semiMajorKm = 1 / (2 / norm(rKm) - dot(vKmPerS, vKmPerS) / mu);
  const momentum = norm(cross(rKm, vKmPerS));
  const e = Math.sqrt(Math.max(0, 1 - momentum ** 2 / (mu * semiMajorKm)));
  const perigeeKm = semiMajorKm * (1 - e);
  return { perigeeKm, apogeeKm: semiMajorKm * (1 + e), fastest: momentum / perigeeKm };
}

function mustState(orbit: Orbit, atMs: number): OrbitState {
  const got = orbit.stateAt(atMs);
  if (!got.ok) throw new PropagationFailure(got.reason);
  return got.state;
}

function shellGapKm(a: Shell, b: Shell): number {
  return Math.max(a.perigeeKm, b.perigeeKm) - Math.min(a.apogeeKm, b.apogeeKm);
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
  fastest: number,
): CloseApproach[] {
  const found: CloseApproach[] = [];
  let last = distanceOnPath(path, other, fromMs);
  if (last.km <= thresholdKm && last.growth >= 0) found.push(describe(path.orbit, other, fromMs, true));
  while (last.atMs < toMs) {
    const freeMs = (1000 * (last.km - thresholdKm - PATH_PAD_KM)) / fastest;
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
  const [p, q] = [mustState(a, atMs), mustState(b, atMs)];
  const relativeKm = subtract(q.rKm, p.rKm);
  const relativeKmPerS = subtract(q.vKmPerS, p.vKmPerS);
  const [missKm, relativeSpeedKmPerS] = [norm(relativeKm), norm(relativeKmPerS)];
  return { atMs, missKm, relativeSpeedKmPerS, relativeKm, relativeKmPerS, atEdge };
}
