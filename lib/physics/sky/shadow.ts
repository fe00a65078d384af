import { EARTH_RADIUS_KM, SUN_RADIUS_KM } from "../constants";
import { dot, norm, type Vec3 } from "../vector";

/** How the Sun shines on an object: fully, in part, or not at all. */
export type Sunlight = "sunlit" | "penumbra" | "umbra";

/**
 * Whether an object stands in the Earth's shadow: cones of umbra and penumbra behind a round Earth
 * (Vallado, algorithm 34; Neta and Vallado 1998, J. Astronaut. Sci. 46, 91). Both positions in one frame
 * with its origin in the Earth's centre, km. Air and flattening are left out: the flattening moves the edges
 * of the shadow by up to 0.4° of a low orbit, some 6 s.
 */
export function sunlightAt(rKm: Vec3, sunKm: Vec3): Sunlight {
  const sunDistance = norm(sunKm);
  const behind = -dot(rKm, sunKm) / sunDistance;
  if (behind <= 0) return "sunlit";
  const aside = Math.sqrt(Math.max(0, dot(rKm, rKm) - behind * behind));
  const penumbraKm =
    EARTH_RADIUS_KM + behind * Math.tan(Math.asin((SUN_RADIUS_KM + EARTH_RADIUS_KM) / sunDistance));
  const umbraKm =
    EARTH_RADIUS_KM - behind * Math.tan(Math.asin((SUN_RADIUS_KM - EARTH_RADIUS_KM) / sunDistance));
  if (aside > penumbraKm) return "sunlit";
  return aside > umbraKm ? "penumbra" : "umbra";
}
