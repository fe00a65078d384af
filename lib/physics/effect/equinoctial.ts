import type { OrbitState } from "@/lib/physics/orbit/propagate";
import { add, cross, dot, norm, scale, type Vec3 } from "@/lib/physics/vector";
import { eccentricityVector } from "./two-body";

/**
 * Elements without a singularity at circular or equatorial orbits (only at 180° inclination):
 * h, k = e·sin ϖ, e·cos ϖ and p, q = tan(i/2)·sin Ω, tan(i/2)·cos Ω; the mean longitude is M + ω + Ω.
 */
export interface Equinoctial {
  readonly semiMajorAxisKm: number;
  readonly h: number;
  readonly k: number;
  readonly p: number;
  readonly q: number;
  readonly meanLongitudeRad: number;
}

/**
 * Osculating equinoctial elements of an elliptic state (Broucke and Cefola 1972, from memory). Open
 * orbits give NaN, which callers must refuse.
 */
export function equinoctialOf(state: OrbitState, muKm3PerS2: number): Equinoctial {
  const { rKm: r, vKmPerS: v } = state;
  const a = 1 / (2 / norm(r) - dot(v, v) / muKm3PerS2);
  const angularMomentum = cross(r, v);
  const w = scale(angularMomentum, 1 / norm(angularMomentum));
  const p = w.x / (1 + w.z);
  const q = -w.y / (1 + w.z);
  const { f, g } = planeAxes(p, q);
  const e = eccentricityVector(state, muKm3PerS2);
  const [h, k] = [dot(e, g), dot(e, f)];
  return {
    semiMajorAxisKm: a,
    h,
    k,
    p,
    q,
    meanLongitudeRad: meanLongitude(dot(r, f) / a, dot(r, g) / a, h, k),
  };
}

/** Mean longitude from the position in the plane, in units of the semi-major axis. */
function meanLongitude(x: number, y: number, h: number, k: number): number {
  const root = Math.sqrt(1 - h * h - k * k);
  const beta = 1 / (1 + root);
  const cosF = k + ((1 - k * k * beta) * x - h * k * beta * y) / root;
  const sinF = h + ((1 - h * h * beta) * y - h * k * beta * x) / root;
  return Math.atan2(sinF, cosF) + h * cosF - k * sinF;
}

/** Eccentricity vector of equinoctial elements, in the frame that they are counted in. */
export function eccentricityVectorOf(elements: Equinoctial): Vec3 {
  const { f, g } = planeAxes(elements.p, elements.q);
  return add(scale(f, elements.k), scale(g, elements.h));
}

/** Unit vectors of the orbit plane from which longitudes are counted. */
function planeAxes(p: number, q: number): { f: Vec3; g: Vec3 } {
  const c = 1 / (1 + p * p + q * q);
  return {
    f: { x: c * (1 - p * p + q * q), y: c * 2 * p * q, z: -c * 2 * p },
    g: { x: c * 2 * p * q, y: c * (1 + p * p - q * q), z: c * 2 * q },
  };
}
