/**
 * Numbers of nature and of the conventions we follow. Units stand in the names,
 * the source beside each value.
 */

/** WGS-84 equatorial radius, km (NIMA TR8350.2). */
export const EARTH_RADIUS_KM = 6378.137;

/** WGS-84 flattening (NIMA TR8350.2). */
export const EARTH_FLATTENING = 1 / 298.257223563;

/** Earth's gravity constant for everything outside SGP4, km³/s² (WGS-84, EGM-96). */
export const EARTH_MU_KM3_PER_S2 = 398600.4418;

/** Second zonal harmonic for everything outside SGP4 (EGM-96, unnormalised). */
export const EARTH_J2 = 0.00108262668;

/** Rotation rate of the Earth against the mean equinox of date, rad/s (Vallado et al. 2006, AIAA 2006-6753). */
export const EARTH_ROTATION_RAD_PER_S = 7.292115146706979e-5;

/** WGS-72 set that SGP4 element sets are made with (AIAA 2006-6753, table 2). */
export const WGS72_MU_KM3_PER_S2 = 398600.8;
export const WGS72_RADIUS_KM = 6378.135;
export const WGS72_J2 = 0.001082616;

/** Radius of the Sun, km (Vallado, with whose shadow cones ours are compared; IAU 2015 has 695,700). */
export const SUN_RADIUS_KM = 696000;

/** Astronomical unit, km (IAU 2012 resolution B2, exact). */
export const ASTRONOMICAL_UNIT_KM = 149597870.7;

/** One degree in radians. */
export const DEG = Math.PI / 180;

/** A full turn in radians. */
export const TWO_PI = 2 * Math.PI;
