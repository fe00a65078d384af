import { WGS72_J2, WGS72_MU_KM3_PER_S2, WGS72_RADIUS_KM } from "@/lib/physics/constants";
import type { OrbitState } from "@/lib/physics/orbit/propagate";
import { add, norm, scale, type Vec3 } from "@/lib/physics/vector";

const WGS72_J3 = -2.53881e-6;

/** Potential of the Earth with J2 and, when asked, J3; the acceleration is its numerical gradient. */
function potential(r: Vec3, withJ3: boolean): number {
  const d = norm(r);
  const s = r.z / d;
  const q = WGS72_RADIUS_KM / d;
  const j2 = WGS72_J2 * q * q * (1.5 * s * s - 0.5);
  const j3 = withJ3 ? WGS72_J3 * q ** 3 * (2.5 * s ** 3 - 1.5 * s) : 0;
  return (WGS72_MU_KM3_PER_S2 / d) * (1 - j2 - j3);
}

/** Acceleration in km/s² by central differences: nothing in common with the library's closed form. */
export function numericalGravity(r: Vec3, withJ3 = false): Vec3 {
  const h = 0.5;
  const along = (axis: Vec3): number =>
    (8 * (potential(add(r, scale(axis, h)), withJ3) - potential(add(r, scale(axis, -h)), withJ3)) -
      (potential(add(r, scale(axis, 2 * h)), withJ3) - potential(add(r, scale(axis, -2 * h)), withJ3))) /
    (12 * h);
  return {
    x: along({ x: 1, y: 0, z: 0 }),
    y: along({ x: 0, y: 1, z: 0 }),
    z: along({ x: 0, y: 0, z: 1 }),
  };
}

/** One step of the classical Runge-Kutta method under an acceleration of time (s from the step's start) and state. */
export function rungeKutta(
  state: OrbitState,
  stepS: number,
  acceleration: (seconds: number, r: Vec3) => Vec3,
): OrbitState {
  const slope = (seconds: number, s: OrbitState): OrbitState => ({
    rKm: s.vKmPerS,
    vKmPerS: acceleration(seconds, s.rKm),
  });
  const shifted = (k: OrbitState, by: number): OrbitState => ({
    rKm: add(state.rKm, scale(k.rKm, by)),
    vKmPerS: add(state.vKmPerS, scale(k.vKmPerS, by)),
  });
  const k1 = slope(0, state);
  const k2 = slope(stepS / 2, shifted(k1, stepS / 2));
  const k3 = slope(stepS / 2, shifted(k2, stepS / 2));
  const k4 = slope(stepS, shifted(k3, stepS));
  const mean = (of: (k: OrbitState) => Vec3): Vec3 =>
    scale(add(add(of(k1), scale(of(k2), 2)), add(scale(of(k3), 2), of(k4))), stepS / 6);
  return {
    rKm: add(
      state.rKm,
      mean((k) => k.rKm),
    ),
    vKmPerS: add(
      state.vKmPerS,
      mean((k) => k.vKmPerS),
    ),
  };
}
