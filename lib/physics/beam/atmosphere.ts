import { DEG } from "@/lib/physics/constants";

/** Sea-level pressure that the airmass formula is made for, Pa. */
const STANDARD_PRESSURE_PA = 101325;

/**
 * Relative optical airmass at an elevation in radians (Kasten and Young 1989, Appl. Opt. 28, 4735).
 * The formula is made for the apparent elevation; we give it the geometric one, which lies lower by the
 * refraction (0.16° at 5°, under 0.03° from 30° up), so the loss comes out slightly too large.
 * Throws RangeError below the horizon: the formula knows nothing there.
 */
export function airmass(elevationRad: number): number {
  if (!(elevationRad >= 0)) {
    throw new RangeError("The airmass is known from the horizon upwards only: the elevation is below 0.");
  }
  const elevationDeg = elevationRad / DEG;
  return 1 / (Math.sin(elevationRad) + 0.50572 * (elevationDeg + 6.07995) ** -1.6364);
}

/**
 * Share of the light that passes the air at an elevation in radians, from the share at the zenith of the
 * same station: T₀ to the power of the airmass (Beer and Lambert). `pressurePa` scales the airmass where
 * the zenith value was measured at sea level and the station stands higher.
 * Throws RangeError below the horizon.
 */
export function transmission(
  zenithTransmission: number,
  elevationRad: number,
  pressurePa: number = STANDARD_PRESSURE_PA,
): number {
  const depth = -Math.log(zenithTransmission) * (pressurePa / STANDARD_PRESSURE_PA);
  return Math.exp(-depth * airmass(elevationRad));
}
