import { DEG } from "../constants";

/** How dark it is at a station, by the usual names. */
export type Darkness = "day" | "civil twilight" | "nautical twilight" | "astronomical twilight" | "night";

/**
 * Sunrise and sunset count the Sun's upper edge under mean refraction: the centre 50 minutes of arc below
 * the horizon (Astronomical Almanac).
 */
export const SUNRISE_ELEVATION_RAD = (-50 / 60) * DEG;

/** The name for an elevation of the Sun's centre, radians, without refraction (limits 50', 6°, 12°, 18°). */
export function darkness(sunElevationRad: number): Darkness {
  if (sunElevationRad >= SUNRISE_ELEVATION_RAD) return "day";
  if (sunElevationRad >= -6 * DEG) return "civil twilight";
  if (sunElevationRad >= -12 * DEG) return "nautical twilight";
  if (sunElevationRad >= -18 * DEG) return "astronomical twilight";
  return "night";
}
