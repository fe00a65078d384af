import { EARTH_RADIUS_KM } from "../constants";
import type { Orbit } from "../orbit/propagate";
import { geodeticFromEcef, temeToEcef } from "./earth";

/** The point of the ellipsoid under an object, and the object's height over it. */
export interface GroundPoint {
  readonly atMs: number;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly heightKm: number;
}

/** The points under an object at some Unix times (ms), in their order; the sentence where SGP4 fails. */
export function groundPoints(
  orbit: Orbit,
  timesMs: readonly number[],
): { readonly ok: true; readonly points: GroundPoint[] } | { readonly ok: false; readonly reason: string } {
  const points: GroundPoint[] = [];
  for (const atMs of timesMs) {
    const at = orbit.stateAt(atMs);
    if (!at.ok) return at;
    const { latitudeDeg, longitudeDeg, altitudeKm } = geodeticFromEcef(temeToEcef(at.state, atMs).rKm);
    points.push({ atMs, latitudeDeg, longitudeDeg, heightKm: altitudeKm });
  }
  return { ok: true, points };
}

/**
 * Angle at the Earth's centre, radians, from a station to the farthest point over which an object of a
 * height (km) still stands at an elevation (radians) or higher: arccos(R cos ε / (R + h)) − ε on a round
 * Earth of the equatorial radius, from the triangle of centre, station and object. The flattening moves
 * the edge by some 10 km.
 */
export function footprintRadiusRad(heightKm: number, elevationRad: number): number {
  return Math.acos((EARTH_RADIUS_KM * Math.cos(elevationRad)) / (EARTH_RADIUS_KM + heightKm)) - elevationRad;
}
