import { EARTH_MU_KM3_PER_S2, EARTH_RADIUS_KM } from "@/lib/physics/constants";
import { densityKgPerM3, scaleHeightKm } from "./atmosphere";

/** Drag coefficient of free molecular flow on a tumbling body, the usual 2.2 (from memory). */
const DRAG_COEFFICIENT = 2.2;

/** At this perigee altitude an object comes down within the revolution or two that follow, km. */
const REENTRY_KM = 120;

/** Points over half a revolution; enough for a perigee a hundred scale heights under the middle of the orbit. */
const POINTS = 32;

/** Mean rates of change by drag: km and 1 per second. */
export interface DecayRates {
  readonly semiMajorAxisKmPerS: number;
  readonly eccentricityPerS: number;
}

/**
 * Change of semi-major axis and eccentricity by drag, averaged over one revolution in an atmosphere that
 * stands still and is round (Gauss's equations over the eccentric anomaly). Area over mass in m²/kg.
 */
export function decayRates(
  semiMajorAxisKm: number,
  eccentricity: number,
  areaPerMassM2PerKg: number,
): DecayRates {
  const [a, e] = [semiMajorAxisKm, eccentricity];
  let axis = 0;
  let shape = 0;
  for (let i = 0; i < POINTS; i++) {
    const c = Math.cos((Math.PI * (i + 0.5)) / POINTS);
    const density = densityKgPerM3(a * (1 - e * c) - EARTH_RADIUS_KM);
    const speedRatio = Math.sqrt((1 + e * c) / (1 - e * c));
    axis += density * speedRatio * (1 + e * c);
    shape += density * speedRatio * c;
  }
  // kg/m³ × m²/kg is 1/m: a thousand per km.
  const strength = (1000 * DRAG_COEFFICIENT * areaPerMassM2PerKg) / POINTS;
  const speed = Math.sqrt(EARTH_MU_KM3_PER_S2 / a);
  return {
    semiMajorAxisKmPerS: -strength * speed * a * axis,
    eccentricityPerS: -strength * speed * (1 - e * e) * shape,
  };
}

/**
 * ROUGH lifetime in days until the perigee sinks to 120 km, by drag alone in the exponential mean
 * atmosphere. Solar activity changes it up to tenfold either way, and nothing here knows about it: to be
 * shown as "rough" and used to compare, never to promise. 0 when the perigee is already lower.
 */
export function roughLifetimeDays(
  semiMajorAxisKm: number,
  eccentricity: number,
  areaPerMassM2PerKg: number,
): number {
  let [a, e, days] = [semiMajorAxisKm, eccentricity, 0];
  for (let i = 0; i < 2000; i++) {
    const perigeeKm = a * (1 - e) - EARTH_RADIUS_KM;
    if (perigeeKm <= REENTRY_KM) return days;
    const rates = decayRates(a, e, areaPerMassM2PerKg);
    const scale = scaleHeightKm(perigeeKm);
    const perigeeRate = rates.semiMajorAxisKmPerS * (1 - e) - a * rates.eccentricityPerS;
    // The rates change by some 40 % while perigee sinks, or the size shrinks, by this much.
    const stepS =
      0.4 *
      Math.min(scale / Math.abs(perigeeRate), Math.max(scale, a * e) / Math.abs(rates.semiMajorAxisKmPerS));
    const middle = decayRates(
      a + (rates.semiMajorAxisKmPerS * stepS) / 2,
      Math.max(0, e + (rates.eccentricityPerS * stepS) / 2),
      areaPerMassM2PerKg,
    );
    a += middle.semiMajorAxisKmPerS * stepS;
    e = Math.max(0, e + middle.eccentricityPerS * stepS);
    days += stepS / 86400;
  }
  return days;
}
