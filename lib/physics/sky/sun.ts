import { ASTRONOMICAL_UNIT_KM, DEG } from "../constants";
import { lookAngles, type SiteFrame, temeToEcef } from "../frames/earth";
import { centuriesSinceJ2000 } from "../time";
import type { Vec3 } from "../vector";

/** Obliquity of the ecliptic, radians, at a number of Julian centuries since J2000 (Vallado, algorithm 29). */
export function obliquityRad(centuries: number): number {
  return (23.439291 - 0.0130042 * centuries) * DEG;
}

/**
 * The Sun's position, km, on the mean equator and equinox of date, which stand within 0.006° of TEME's
 * (Vallado, algorithm 29: some 0.01° from 1950 to 2050). UTC serves as dynamical time: 0.001°.
 */
export function sunPositionKm(atMs: number): Vec3 {
  const t = centuriesSinceJ2000(atMs);
  const anomaly = (357.5277233 + 35999.05034 * t) * DEG;
  const meanLongitude = 280.46 + 36000.77 * t;
  const longitude =
    (meanLongitude + 1.914666471 * Math.sin(anomaly) + 0.019994643 * Math.sin(2 * anomaly)) * DEG;
  const distanceAu = 1.000140612 - 0.016708617 * Math.cos(anomaly) - 0.000139589 * Math.cos(2 * anomaly);
  const obliquity = obliquityRad(t);
  const r = distanceAu * ASTRONOMICAL_UNIT_KM;
  return {
    x: r * Math.cos(longitude),
    y: r * Math.cos(obliquity) * Math.sin(longitude),
    z: r * Math.sin(obliquity) * Math.sin(longitude),
  };
}

/** Where a body at a TEME position (km) stands over a station: radians, without refraction. */
export function bodyOverSite(
  frame: SiteFrame,
  positionKm: Vec3,
  atMs: number,
): { readonly azimuthRad: number; readonly elevationRad: number } {
  const ecef = temeToEcef({ rKm: positionKm, vKmPerS: { x: 0, y: 0, z: 0 } }, atMs);
  const { azimuthRad, elevationRad } = lookAngles(frame, ecef);
  return { azimuthRad, elevationRad };
}

/** Elevation of the Sun's centre over a station, radians, without refraction. */
export function sunElevationRad(frame: SiteFrame, atMs: number): number {
  return bodyOverSite(frame, sunPositionKm(atMs), atMs).elevationRad;
}
