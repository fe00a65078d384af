import { checkForDecay, type SatRec, sgp4 } from "satellite.js";
import { isoTime } from "@/lib/physics/time";
import type { Vec3 } from "@/lib/physics/vector";
import type { Elements } from "./elements";
import { satrecOf } from "./satrec";

/** Position and velocity in the frame the caller names; SGP4 gives TEME. */
export interface OrbitState {
  readonly rKm: Vec3;
  readonly vKmPerS: Vec3;
}

/** A state, or the sentence that says why there is none. */
export type Propagation =
  | { readonly ok: true; readonly state: OrbitState }
  | { readonly ok: false; readonly reason: string };

/** An element set made ready for propagation. */
export interface Orbit {
  readonly elements: Elements;
  /** Anomalistic period from the mean motion of the set, in seconds. */
  readonly periodS: number;
  /**
   * TEME state at a Unix time in milliseconds (fractions count). Never throws, never gives NaN. It judges that
   * one moment: an orbit that dips under the ground has states again beyond it.
   */
  stateAt(atMs: number): Propagation;
}

/**
 * Below this distance from the Earth's centre an object counts as decayed. SGP4 itself only objects
 * below one Earth radius; the published verification rows go down to 6,382.7 km.
 */
const DECAY_RADIUS_KM = 6380;

/** Beyond this a result is garbage: the Moon's distance is 384,400 km, and SGP4 knows no such orbits. */
const FARTHEST_RADIUS_KM = 1_000_000;

/** 1,000 km/s, squared. */
const GREATEST_SPEED2 = 1e6;

/** What SGP4's error numbers mean (Vallado et al. 2006, AIAA 2006-6753), as ends of a sentence. */
const SGP4_ERRORS: Readonly<Record<number, string>> = {
  1: "the mean eccentricity leaves the range from 0 to 1",
  2: "the mean motion falls to zero or below",
  3: "the perturbed eccentricity leaves the range from 0 to 1",
  4: "the semi-latus rectum falls below zero",
  6: "the object has decayed",
};

/**
 * Makes an orbit of an element set: WGS-72 SGP4, or SDP4 from a period of 225 minutes up. Refused with a
 * sentence when a value is out of range or when the set gives no state at its own epoch.
 */
export function makeOrbit(elements: Elements): { ok: true; orbit: Orbit } | { ok: false; reason: string } {
  const fault = rangeFault(elements);
  if (fault) return { ok: false, reason: fault };
  const satrec = satrecOf(elements);
  const atEpoch = propagate(satrec, elements.epochMs, elements.epochMs);
  if (!atEpoch.ok) return { ok: false, reason: `No state at the set's own epoch. ${atEpoch.reason}` };
  const orbit: Orbit = {
    elements,
    periodS: 86400 / elements.meanMotionRevPerDay,
    stateAt: (atMs) => propagate(satrec, elements.epochMs, atMs),
  };
  return { ok: true, orbit };
}

/** SGP4 at one time, with every way to fail turned into a sentence. */
function propagate(satrec: SatRec, epochMs: number, atMs: number): Propagation {
  // Minutes from the difference of two Unix times: a whole Julian date resolves only 40 microseconds.
  const result = sgp4(satrec, (atMs - epochMs) / 60_000);
  if (!result) return failure(atMs, SGP4_ERRORS[satrec.error] ?? `SGP4 reports error ${satrec.error}`);
  const { position, velocity } = result;
  const radiusKm = Math.sqrt(position.x ** 2 + position.y ** 2 + position.z ** 2);
  const speed2 = velocity.x ** 2 + velocity.y ** 2 + velocity.z ** 2;
  if (radiusKm < DECAY_RADIUS_KM || checkForDecay(satrec)) return failure(atMs, "the object has decayed");
  if (!isUsableState(radiusKm, speed2)) return failure(atMs, "SGP4 gives no finite state");
  return { ok: true, state: { rKm: position, vKmPerS: velocity } };
}

/**
 * Whether a state may be used at all: its distance from the Earth's centre (km) and the square of its speed
 * (km²/s²) are finite, not decayed and not beyond reason. Written so that NaN fails.
 */
export function isUsableState(radiusKm: number, speed2: number): boolean {
  return radiusKm >= DECAY_RADIUS_KM && radiusKm < FARTHEST_RADIUS_KM && speed2 < GREATEST_SPEED2;
}

function failure(atMs: number, what: string): Propagation {
  return { ok: false, reason: `Propagation fails at ${isoTime(atMs)}: ${what}.` };
}

/** The first value that no orbit can have, as a sentence, or null. */
function rangeFault(e: Elements): string | null {
  const finite = [
    ["epoch", e.epochMs],
    ["mean motion", e.meanMotionRevPerDay],
    ["eccentricity", e.eccentricity],
    ["inclination", e.inclinationDeg],
    ["right ascension of the ascending node", e.raanDeg],
    ["argument of pericentre", e.argPericenterDeg],
    ["mean anomaly", e.meanAnomalyDeg],
    ["drag term", e.bstar],
  ] as const;
  for (const [name, value] of finite) {
    if (!Number.isFinite(value)) return `The ${name} is not a number.`;
  }
  if (Math.abs(e.epochMs) > 8.64e15) return "The epoch is not a date.";
  if (e.meanMotionRevPerDay <= 0) return "The mean motion must be above zero.";
  if (e.eccentricity < 0 || e.eccentricity >= 1) return "The eccentricity must be from 0 to below 1.";
  if (e.inclinationDeg < 0 || e.inclinationDeg > 180) return "The inclination must be from 0 to 180 degrees.";
  return null;
}
