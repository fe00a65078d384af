import { cross, dot, norm, scale, subtract, unit, type Vec3 } from "../vector";
import { normalBetween } from "./normal-integral";

/** A symmetric 3×3 covariance, row by row, km². */
export type Covariance3 = readonly [
  readonly [number, number, number],
  readonly [number, number, number],
  readonly [number, number, number],
];

/** The encounter plane: miss along the axes of the error ellipse, its standard deviations, one length unit. */
export interface Encounter {
  readonly missX: number;
  readonly missY: number;
  readonly sigmaX: number;
  readonly sigmaY: number;
  /** Sum of both objects' radii. */
  readonly radius: number;
}

/** Nodes and weights of five-point Gauss-Legendre quadrature on [-1, 1]. */
const GAUSS: readonly (readonly [number, number])[] = [
  [0, 0.5688888888888889],
  [-0.5384693101056831, 0.47862867049936647],
  [0.5384693101056831, 0.47862867049936647],
  [-0.906179845938664, 0.23692688505618908],
  [0.906179845938664, 0.23692688505618908],
];

/** Standard deviations around the mean beyond which nothing counts, when there is something within. */
const REACH_SIGMAS = 9;

/**
 * Probability that the miss vector lies within a disc, for a normal error in the encounter plane (Foster and
 * Estes 1992; the inner integral by error functions, as Alfano 2005). Advice only: it is as good as the
 * covariances assumed. Zero or negative deviations give NaN.
 */
export function discProbability(e: Encounter): number {
  if (!(e.sigmaX > 0 && e.sigmaY > 0)) return Number.NaN;
  const lo = Math.max(-e.radius, e.missX - REACH_SIGMAS * e.sigmaX);
  const hi = Math.min(e.radius, e.missX + REACH_SIGMAS * e.sigmaX);
  // When the disc lies wholly outside that reach, the tail is all there is.
  const [from, to] = lo < hi ? [lo, hi] : [-e.radius, e.radius];
  // x = R sin(angle) takes the edge of the disc out of the integrand.
  const fromAngle = Math.asin(from / e.radius);
  const toAngle = Math.asin(to / e.radius);
  const panels = Math.ceil(40 + (20 * (to - from)) / Math.min(e.sigmaX, e.sigmaY, to - from));
  const step = (toAngle - fromAngle) / panels;
  let sum = 0;
  for (let i = 0; i < panels; i++) {
    const middle = fromAngle + (i + 0.5) * step;
    for (const [node, weight] of GAUSS) sum += weight * slice(e, middle + (node * step) / 2);
  }
  return (sum * step) / 2;
}

/** Density over x of the probability to lie in the disc, times dx over d(angle). */
function slice(e: Encounter, angle: number): number {
  const x = e.radius * Math.sin(angle);
  const halfChord = e.radius * Math.cos(angle);
  const z = (x - e.missX) / e.sigmaX;
  const density = Math.exp((-z * z) / 2) / (e.sigmaX * Math.sqrt(2 * Math.PI));
  return (
    density * halfChord * normalBetween((-halfChord - e.missY) / e.sigmaY, (halfChord - e.missY) / e.sigmaY)
  );
}

/**
 * The encounter plane of a fast encounter: relative position (km), relative velocity (km/s), the sum of both
 * position covariances (km²) and of both radii (km), all in one frame, at closest approach.
 */
export function encounterPlane(
  relativeKm: Vec3,
  relativeKmPerS: Vec3,
  covarianceKm2: Covariance3,
  radiusKm: number,
): Encounter {
  const along = unit(relativeKmPerS);
  // Miss and covariance are projected; the first axis is the miss itself, unless there is none.
  const miss = subtract(relativeKm, scale(along, dot(relativeKm, along)));
  const first = norm(miss) > 0 ? unit(miss) : anyAcross(along);
  const second = cross(along, first);
  const xx = quadratic(covarianceKm2, first, first);
  const xy = quadratic(covarianceKm2, first, second);
  const yy = quadratic(covarianceKm2, second, second);
  const turn = Math.atan2(2 * xy, xx - yy) / 2;
  const mean = (xx + yy) / 2;
  const spread = Math.hypot((xx - yy) / 2, xy);
  return {
    missX: norm(miss) * Math.cos(turn),
    missY: -norm(miss) * Math.sin(turn),
    sigmaX: Math.sqrt(mean + spread),
    sigmaY: Math.sqrt(Math.max(0, mean - spread)),
    radius: radiusKm,
  };
}

function quadratic(c: Covariance3, a: Vec3, b: Vec3): number {
  const row = (r: readonly [number, number, number]) => r[0] * b.x + r[1] * b.y + r[2] * b.z;
  return a.x * row(c[0]) + a.y * row(c[1]) + a.z * row(c[2]);
}

function anyAcross(along: Vec3): Vec3 {
  const other = Math.abs(along.x) < 0.9 ? { x: 1, y: 0, z: 0 } : { x: 0, y: 1, z: 0 };
  return unit(cross(along, other));
}
