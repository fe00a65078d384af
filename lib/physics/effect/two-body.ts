import { EARTH_MU_KM3_PER_S2, EARTH_RADIUS_KM } from "@/lib/physics/constants";
import type { OrbitState } from "@/lib/physics/orbit/propagate";
import { add, cross, dot, norm, scale, subtract, type Vec3 } from "@/lib/physics/vector";

/** Size and shape of the two-body orbit that a state would follow if the Earth were a point. */
export interface OsculatingOrbit {
  readonly semiMajorAxisKm: number;
  readonly eccentricity: number;
  readonly perigeeAltitudeKm: number;
}

/** Osculating orbit of a state: exact two-body algebra. A hyperbola has a negative semi-major axis. */
export function osculatingOrbit(
  state: OrbitState,
  muKm3PerS2: number = EARTH_MU_KM3_PER_S2,
): OsculatingOrbit {
  const r = norm(state.rKm);
  const semiMajorAxisKm = 1 / (2 / r - dot(state.vKmPerS, state.vKmPerS) / muKm3PerS2);
  const eccentricity = norm(eccentricityVector(state, muKm3PerS2));
  return {
    semiMajorAxisKm,
    eccentricity,
    perigeeAltitudeKm: semiMajorAxisKm * (1 - eccentricity) - EARTH_RADIUS_KM,
  };
}

/** Osculating eccentricity vector; it points to the perigee. */
export function eccentricityVector(state: OrbitState, muKm3PerS2: number): Vec3 {
  const { rKm: r, vKmPerS: v } = state;
  return subtract(scale(cross(v, cross(r, v)), 1 / muKm3PerS2), scale(r, 1 / norm(r)));
}

/** Radial, transverse and normal unit vectors of a state: outward, along the motion in the plane, along r × v. */
export interface RtnAxes {
  readonly radial: Vec3;
  readonly transverse: Vec3;
  readonly normal: Vec3;
}

/** The RTN axes of a state; a state with r parallel to v has none and gives NaN. */
export function rtnAxes(state: OrbitState): RtnAxes {
  const radial = scale(state.rKm, 1 / norm(state.rKm));
  const h = cross(state.rKm, state.vKmPerS);
  const normal = scale(h, 1 / norm(h));
  return { radial, transverse: cross(normal, radial), normal };
}

/** The state after an impulse, in m/s along the axes of the state's frame. */
export function withImpulse(state: OrbitState, deltaVMPerS: Vec3): OrbitState {
  return { rKm: state.rKm, vKmPerS: add(state.vKmPerS, scale(deltaVMPerS, 1e-3)) };
}
