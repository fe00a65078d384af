import { DEG, TWO_PI, WGS72_MU_KM3_PER_S2 } from "@/lib/physics/constants";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit, type Orbit, type OrbitState } from "@/lib/physics/orbit/propagate";
import { norm, subtract } from "@/lib/physics/vector";
import { type Equinoctial, equinoctialOf } from "./equinoctial";

/** A fit is taken when its state at the epoch is this near the wanted one. */
const POSITION_TOLERANCE_KM = 1e-5;
const VELOCITY_TOLERANCE_KM_PER_S = 1e-8;

const MOST_STEPS = 60;

/**
 * The element set whose SGP4 state at a time (Unix ms) is the given one (TEME), with the drag term and the
 * names of `like`: differential correction of the mean elements by what is missing in the osculating
 * ones. SGP4's periodic terms are some thousandths and smooth, so the identity serves as the matrix of
 * partial derivatives; each step gains two to three digits. Refused with a sentence when the orbit is open or the
 * correction does not settle.
 */
export function fitElements(
  state: OrbitState,
  atMs: number,
  like: Elements,
): { readonly ok: true; readonly orbit: Orbit } | { readonly ok: false; readonly reason: string } {
  const target = equinoctialOf(state, WGS72_MU_KM3_PER_S2);
  let mean = target;
  for (let step = 0; step < MOST_STEPS; step++) {
    const elements = elementsFrom(mean, atMs, like);
    if (!elements) return { ok: false, reason: "The state belongs to no bound orbit." };
    const made = makeOrbit(elements);
    if (!made.ok) return made;
    const at = made.orbit.stateAt(atMs);
    if (!at.ok) return at;
    const missKm = norm(subtract(at.state.rKm, state.rKm));
    const missKmPerS = norm(subtract(at.state.vKmPerS, state.vKmPerS));
    if (missKm < POSITION_TOLERANCE_KM && missKmPerS < VELOCITY_TOLERANCE_KM_PER_S) return made;
    mean = corrected(mean, target, equinoctialOf(at.state, WGS72_MU_KM3_PER_S2));
  }
  return {
    ok: false,
    reason: "No element set was found that gives the state: the correction does not settle.",
  };
}

function corrected(mean: Equinoctial, wanted: Equinoctial, got: Equinoctial): Equinoctial {
  const turn = wanted.meanLongitudeRad - got.meanLongitudeRad;
  return {
    semiMajorAxisKm: mean.semiMajorAxisKm + wanted.semiMajorAxisKm - got.semiMajorAxisKm,
    h: mean.h + wanted.h - got.h,
    k: mean.k + wanted.k - got.k,
    p: mean.p + wanted.p - got.p,
    q: mean.q + wanted.q - got.q,
    meanLongitudeRad: mean.meanLongitudeRad + turn - TWO_PI * Math.round(turn / TWO_PI),
  };
}

/** The set as a file would state it, with Kozai's mean motion from the semi-major axis; null for open orbits. */
function elementsFrom(mean: Equinoctial, epochMs: number, like: Elements): Elements | null {
  const eccentricity = Math.hypot(mean.h, mean.k);
  if (!(mean.semiMajorAxisKm > 0 && eccentricity < 1)) return null;
  const node = Math.atan2(mean.p, mean.q);
  const pericentre = Math.atan2(mean.h, mean.k);
  const radPerS = Math.sqrt(WGS72_MU_KM3_PER_S2 / mean.semiMajorAxisKm ** 3);
  return {
    ...like,
    epochMs,
    meanMotionRevPerDay: (radPerS * 86400) / TWO_PI,
    eccentricity,
    inclinationDeg: (2 * Math.atan(Math.hypot(mean.p, mean.q))) / DEG,
    raanDeg: turnDeg(node),
    argPericenterDeg: turnDeg(pericentre - node),
    meanAnomalyDeg: turnDeg(mean.meanLongitudeRad - pericentre),
  };
}

/** An angle in degrees from 0 to below 360. */
function turnDeg(angleRad: number): number {
  return (angleRad - TWO_PI * Math.floor(angleRad / TWO_PI)) / DEG;
}
