import {
  DEG,
  EARTH_RADIUS_KM,
  TWO_PI,
  WGS72_J2,
  WGS72_MU_KM3_PER_S2,
  WGS72_RADIUS_KM,
} from "@/lib/physics/constants";
import type { Elements } from "@/lib/physics/orbit/elements";
import type { OrbitState } from "@/lib/physics/orbit/propagate";
import { type Equinoctial, equinoctialOf } from "./equinoctial";
import { stateFromMean } from "./short-period";

/** Largest eccentricity and smallest semi-latus rectum for which the first-order theory is inverted. */
const MAX_ECCENTRICITY = 0.97;
const MIN_SEMI_LATUS_KM = 1500;

/**
 * Mean elements of a state: those whose element set would give this very state at this time. Found by
 * fixed-point iteration, since the periodic terms are small (a thousandth) and smooth. `near` is a
 * first guess. Null for open orbits, for inclinations at 180° and beyond the limits above.
 */
export function meanFromState(state: OrbitState, near: Equinoctial | null = null): Equinoctial | null {
  const target = equinoctialOf(state, WGS72_MU_KM3_PER_S2);
  let mean = near ?? target;
  for (let i = 0; i < 40; i++) {
    if (!inRange(mean)) return null;
    const back = equinoctialOf(stateFromMean(mean), WGS72_MU_KM3_PER_S2);
    const change = difference(target, back);
    mean = sum(mean, change);
    if (size(change) < 1e-11) return inRange(mean) ? mean : null;
  }
  return null;
}

/**
 * Mean elements of a nudged state, from the exact conversion where the theory holds. Where it doesn't
 * (the nudge was so strong that the orbit dives deep into the Earth), the periodic terms of the
 * untouched state stand in: the difference is under a hundredth of such a change. Null when the orbit is open.
 */
export function meanNear(
  state: OrbitState,
  untouched: OrbitState,
  meanOfUntouched: Equinoctial,
): Equinoctial | null {
  const target = equinoctialOf(state, WGS72_MU_KM3_PER_S2);
  const offset = difference(meanOfUntouched, equinoctialOf(untouched, WGS72_MU_KM3_PER_S2));
  const guess = sum(target, offset);
  if (!(guess.semiMajorAxisKm > 0 && eccentricityOf(guess) < 1)) return null;
  return meanFromState(state, guess) ?? guess;
}

/** Mean elements that an element set states at its own epoch (semi-major axis freed of Kozai's convention). */
export function meanFromElementSet(elements: Elements): Equinoctial {
  const e = elements.eccentricity;
  const inclination = elements.inclinationDeg * DEG;
  const raan = elements.raanDeg * DEG;
  const longitude = raan + elements.argPericenterDeg * DEG;
  const half = Math.tan(inclination / 2);
  return {
    semiMajorAxisKm: semiMajorAxisFromKozai(elements.meanMotionRevPerDay, e, Math.cos(inclination)),
    h: e * Math.sin(longitude),
    k: e * Math.cos(longitude),
    p: half * Math.sin(raan),
    q: half * Math.cos(raan),
    meanLongitudeRad: longitude + elements.meanAnomalyDeg * DEG,
  };
}

/** Kozai's mean motion to the mean semi-major axis in km (Spacetrack Report No. 3, section 6). */
function semiMajorAxisFromKozai(revPerDay: number, e: number, cosI: number): number {
  const timeUnitS = Math.sqrt(WGS72_RADIUS_KM ** 3 / WGS72_MU_KM3_PER_S2);
  const n = (revPerDay * TWO_PI * timeUnitS) / 86400;
  const d = (0.75 * WGS72_J2 * (3 * cosI * cosI - 1)) / (1 - e * e) ** 1.5;
  const a1 = n ** (-2 / 3);
  const d1 = d / (a1 * a1);
  const a0 = a1 * (1 - d1 * (1 / 3 + d1 * (1 + (134 / 81) * d1)));
  return (n / (1 + d / (a0 * a0))) ** (-2 / 3) * WGS72_RADIUS_KM;
}

/** Eccentricity of equinoctial elements. */
export function eccentricityOf(mean: Equinoctial): number {
  return Math.hypot(mean.h, mean.k);
}

/** Perigee of mean elements in km above the Earth's equatorial radius; below 0 the orbit dives in. */
export function meanPerigeeAltitudeKm(mean: Equinoctial): number {
  return mean.semiMajorAxisKm * (1 - eccentricityOf(mean)) - EARTH_RADIUS_KM;
}

/** Mean elements some seconds later, moved along the orbit by the mean motion alone: a first guess. */
export function drifted(mean: Equinoctial, seconds: number): Equinoctial {
  const meanMotion = Math.sqrt(WGS72_MU_KM3_PER_S2 / mean.semiMajorAxisKm ** 3);
  return { ...mean, meanLongitudeRad: mean.meanLongitudeRad + meanMotion * seconds };
}

function inRange(m: Equinoctial): boolean {
  const e2 = m.h * m.h + m.k * m.k;
  return (
    e2 < MAX_ECCENTRICITY ** 2 &&
    m.semiMajorAxisKm * (1 - e2) > MIN_SEMI_LATUS_KM &&
    Number.isFinite(m.p + m.q + m.meanLongitudeRad)
  );
}

function difference(a: Equinoctial, b: Equinoctial): Equinoctial {
  const turn = a.meanLongitudeRad - b.meanLongitudeRad;
  return {
    semiMajorAxisKm: a.semiMajorAxisKm - b.semiMajorAxisKm,
    h: a.h - b.h,
    k: a.k - b.k,
    p: a.p - b.p,
    q: a.q - b.q,
    meanLongitudeRad: turn - TWO_PI * Math.round(turn / TWO_PI),
  };
}

function sum(a: Equinoctial, b: Equinoctial): Equinoctial {
  return {
    semiMajorAxisKm: a.semiMajorAxisKm + b.semiMajorAxisKm,
    h: a.h + b.h,
    k: a.k + b.k,
    p: a.p + b.p,
    q: a.q + b.q,
    meanLongitudeRad: a.meanLongitudeRad + b.meanLongitudeRad,
  };
}

function size(change: Equinoctial): number {
  return (
    Math.abs(change.semiMajorAxisKm) / WGS72_RADIUS_KM +
    Math.abs(change.h) +
    Math.abs(change.k) +
    Math.abs(change.p) +
    Math.abs(change.q) +
    Math.abs(change.meanLongitudeRad)
  );
}
