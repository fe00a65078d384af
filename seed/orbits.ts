import type { Elements } from "@/lib/physics/orbit/elements";

/** An invented orbit, given at a fixed epoch; every start moves it to a fresh one. */
export interface InventedOrbit {
  readonly catalogNumber: number;
  readonly name: string;
  readonly meanMotionRevPerDay: number;
  readonly eccentricity: number;
  readonly inclinationDeg: number;
  readonly raanDeg: number;
  readonly argPericenterDeg: number;
  readonly meanAnomalyDeg: number;
  readonly bstar: number;
}

/** The epoch of all invented orbits: 2026-01-01 00:00 UTC. */
export const BASE_EPOCH_MS = Date.UTC(2026, 0, 1);

const MU_KM3_PER_S2 = 398600.8;
const EARTH_RADIUS_KM = 6378.135;
const J2 = 0.001082616;
const DAY_S = 86400;

const wrap = (deg: number): number => ((deg % 360) + 360) % 360;

/**
 * The orbit's elements at `epochMs`: node, perigee and anomaly are carried on by
 * the first-order J2 rates (Vallado, Fundamentals of Astrodynamics, section 9.6),
 * so that successive demo sets of one object agree with each other.
 */
export function elementsAt(orbit: InventedOrbit, epochMs: number): Elements {
  const days = (epochMs - BASE_EPOCH_MS) / 1000 / DAY_S;
  const nRadPerS = (orbit.meanMotionRevPerDay * 2 * Math.PI) / DAY_S;
  const aKm = Math.cbrt(MU_KM3_PER_S2 / nRadPerS ** 2);
  const cosI = Math.cos((orbit.inclinationDeg * Math.PI) / 180);
  const eta2 = 1 - orbit.eccentricity ** 2;
  const k = (1.5 * J2 * (EARTH_RADIUS_KM / (aKm * eta2)) ** 2 * orbit.meanMotionRevPerDay * 360) / 1;
  const raanRate = -k * cosI;
  const argpRate = (k / 2) * (5 * cosI ** 2 - 1);
  const anomalyRate = orbit.meanMotionRevPerDay * 360 + (k / 2) * Math.sqrt(eta2) * (3 * cosI ** 2 - 1);
  return {
    catalogNumber: orbit.catalogNumber,
    objectName: orbit.name,
    objectId: null,
    epochMs,
    meanMotionRevPerDay: orbit.meanMotionRevPerDay,
    eccentricity: orbit.eccentricity,
    inclinationDeg: orbit.inclinationDeg,
    raanDeg: wrap(orbit.raanDeg + raanRate * days),
    argPericenterDeg: wrap(orbit.argPericenterDeg + argpRate * days),
    meanAnomalyDeg: wrap(orbit.meanAnomalyDeg + anomalyRate * days),
    bstar: orbit.bstar,
    meanMotionDot: 0,
    meanMotionDdot: 0,
  };
}

/** Mean motion in revolutions per day of a circular orbit at a height above the equatorial radius. */
export function meanMotionAtHeight(heightKm: number): number {
  const aKm = EARTH_RADIUS_KM + heightKm;
  return (Math.sqrt(MU_KM3_PER_S2 / aKm ** 3) * DAY_S) / (2 * Math.PI);
}
