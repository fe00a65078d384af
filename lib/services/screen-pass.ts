import type { NewCrossing } from "@/db/queries/sweep-passes";
import { DEG, WGS72_MU_KM3_PER_S2 } from "@/lib/physics/constants";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { type ConeCrossing, screenBeamMany } from "@/lib/physics/screening/beam-cone";
import { norm } from "@/lib/physics/vector";
import {
  guardedCrossing,
  type InflatedHalfAngle,
  inflatedHalfAngle,
  isUsableSet,
  TIMING_GUARD_S,
} from "@/lib/planning/keep-out";
import type { FoundPass } from "./sweep-find";
import type { Guarded, SweepGround } from "./sweep-ground";

/** What the screening of one pass gave. */
export interface Screening {
  readonly crossings: readonly Omit<NewCrossing, "passId">[];
  /** Protected objects that could not be screened against, by id, in a steady order. */
  readonly gaps: readonly string[];
}

/** SGP4's osculating perigee swings around the mean one by some 20 km; so much is taken off. */
const PERIGEE_SWING_KM = 40;

/** No object is taken to come nearer than this. */
const NEAREST_KM = 80;

/**
 * Screens a whole pass against every protected object: when does one stand in the cone around the beam
 * from the station through the fragment and beyond, at any range. The cone is widened by the along-track
 * errors of both element sets, the crossing by the timing guard. An object without a usable set, or
 * without a state somewhere in the pass, is a gap: never taken as far away.
 */
export function screenPass(pass: FoundPass, target: Orbit, ground: SweepGround): Screening {
  const { riseMs: fromMs, setMs: toMs } = pass.event;
  const usable = ground.guarded.filter(
    ({ epochMs }) => isUsableSet(epochMs, fromMs) && isUsableSet(epochMs, toMs),
  );
  const widened = usable.map((object) => ({ object, halfAngle: widestHalfAngle(pass, target, object) }));
  const screenings = screenBeamMany({
    frame: pass.station.frame,
    target,
    others: widened.map(({ object, halfAngle }) => ({
      orbit: object.orbit,
      halfAngleRad: () => halfAngle.totalRad,
    })),
    fromMs,
    toMs,
  });
  const crossings: Omit<NewCrossing, "passId">[] = [];
  const seen = new Set<string>();
  for (const [i, { object, halfAngle }] of widened.entries()) {
    const screening = screenings[i];
    if (!screening?.ok) continue;
    seen.add(object.id);
    crossings.push(...screening.crossings.map((crossing) => crossingRow(object, crossing, halfAngle)));
  }
  const unseen = ground.guarded.filter(({ id }) => !seen.has(id)).map(({ id }) => id);
  return { crossings, gaps: [...ground.blind, ...unseen].sort() };
}

/**
 * The half-angle with the errors at the end where they are larger, and both objects as near as they come
 * in the pass: never too small, and one number for the whole pass, which keeps the screening fast.
 */
export function widestHalfAngle(
  pass: {
    readonly event: Pick<FoundPass["event"], "riseMs" | "setMs" | "minRangeKm">;
    readonly station: Pick<FoundPass["station"], "frame">;
  },
  target: Orbit,
  object: Pick<Guarded, "epochMs" | "halfAngleDeg" | "orbit">,
): InflatedHalfAngle {
  const { riseMs, setMs, minRangeKm } = pass.event;
  const other = {
    epochMs: object.epochMs,
    rangeKm: nearestRangeKm(object.orbit, norm(pass.station.frame.positionKm)),
  };
  const [atRise, atSet] = [riseMs, setMs].map((atMs) =>
    inflatedHalfAngle({
      halfAngleDeg: object.halfAngleDeg,
      atMs,
      target: { epochMs: target.elements.epochMs, rangeKm: minRangeKm },
      other,
    }),
  ) as [InflatedHalfAngle, InflatedHalfAngle];
  return atRise.totalRad > atSet.totalRad ? atRise : atSet;
}

/** A range below which the object can't come to a station at that distance from the Earth's centre, km. */
function nearestRangeKm(orbit: Orbit, stationRadiusKm: number): number {
  const meanMotionRadPerS = (2 * Math.PI) / orbit.periodS;
  const semiMajorKm = Math.cbrt(WGS72_MU_KM3_PER_S2 / meanMotionRadPerS ** 2);
  const perigeeKm = semiMajorKm * (1 - orbit.elements.eccentricity);
  return Math.max(NEAREST_KM, perigeeKm - PERIGEE_SWING_KM - stationRadiusKm);
}

function crossingRow(
  object: Guarded,
  crossing: ConeCrossing,
  halfAngle: InflatedHalfAngle,
): Omit<NewCrossing, "passId"> {
  const { fromMs, toMs } = guardedCrossing(crossing);
  return {
    protectedObjectId: object.id,
    elementSetId: object.elementSetId,
    // Outward to whole milliseconds, what the column keeps.
    fromAt: new Date(Math.floor(fromMs)),
    toAt: new Date(Math.ceil(toMs)),
    minSeparationDeg: crossing.minSeparationRad / DEG,
    halfAngleDeg: object.halfAngleDeg,
    addedDeg: halfAngle.addedRad / DEG,
    timingGuardS: TIMING_GUARD_S,
  };
}
