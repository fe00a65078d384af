import type { SiteFrame } from "../frames/earth";
import { makePath, mustNode, type Path, PropagationFailure } from "../orbit/path";
import type { Orbit } from "../orbit/propagate";
import { type Cone, type ConeSample, exactCone, exactEdge, exactExtremum, sampleCone } from "./cone-edges";
import { nearTimes } from "./near-times";

/** A stretch in which an object stands within the cone; Unix ms, radians. */
export interface ConeCrossing {
  readonly fromMs: number;
  readonly toMs: number;
  readonly minSeparationRad: number;
  readonly minSeparationAtMs: number;
}

/** One object to be screened, with its own half-angle. */
export interface ScreenedObject {
  readonly orbit: Orbit;
  /** Half-angle of the cone, radians; must not change by more than 2e-3 rad/s. */
  readonly halfAngleRad: (atMs: number) => number;
}

/** What came of one object: its crossings, or the sentence why it could not be checked. */
export type Screening =
  | { readonly ok: true; readonly crossings: ConeCrossing[] }
  | { readonly ok: false; readonly reason: string };

/** Longest stretch that one SGP4 state of the other object is carried over, ms. */
const CHUNK_MS = 180_000;

/**
 * A sample on the polynomials is trusted to be inside or outside of the cone when it is farther from its edge
 * than this: they are off by some metres, by 2 km at worst near the perigee of a long orbit.
 */
const SURE_RAD = 1e-3;

/** Near times are looked at this often; within one step the angle has at most one extremum. */
const SAMPLE_MS = 1000;

/**
 * All crossings of one object through the cone around the line from a station through a target and beyond,
 * at any range, in front of the station, within [fromMs, toMs). Edges and least separations are polished on
 * SGP4 (some ms); no crossing is too short. The half-angle (radians, over Unix ms) must not change by more
 * than 2e-3 rad/s.
 *
 * Throws PropagationFailure with a sentence when either orbit fails within the time: nobody may take that
 * for a free line. `screenBeamMany` gives the same as a value.
 */
export function screenBeam(args: {
  readonly frame: SiteFrame;
  readonly target: Orbit;
  readonly other: Orbit;
  readonly fromMs: number;
  readonly toMs: number;
  readonly halfAngleRad: (atMs: number) => number;
}): ConeCrossing[] {
  const [result] = screenBeamMany({
    ...args,
    others: [{ orbit: args.other, halfAngleRad: args.halfAngleRad }],
  });
  if (!result?.ok) throw new PropagationFailure(result?.reason ?? "There is nothing to screen.");
  return result.crossings;
}

/**
 * `screenBeam` for many objects against one target: the target's states are computed once, and most objects
 * cost a single SGP4 state per three minutes. Results stand in the order of `others`.
 */
export function screenBeamMany(args: {
  readonly frame: SiteFrame;
  readonly target: Orbit;
  readonly others: readonly ScreenedObject[];
  readonly fromMs: number;
  readonly toMs: number;
}): Screening[] {
  const { frame, fromMs, toMs, others } = args;
  if (!(fromMs < toMs)) return others.map(() => ({ ok: true, crossings: [] }));
  const chunks = Math.ceil((toMs - fromMs) / CHUNK_MS);
  const target = makePath(args.target, fromMs, toMs, 2 * chunks);
  return others.map((other) => screenOne(frame, target, other));
}

function screenOne(frame: SiteFrame, target: Path, { orbit, halfAngleRad }: ScreenedObject): Screening {
  try {
    const near = nearTimesOf(frame, target, orbit, halfAngleRad);
    if (near.length === 0) return { ok: true, crossings: [] };
    const endMs = pathEnd(target);
    const other = makePath(orbit, target.fromMs, endMs, target.segments.length);
    const cone = { station: frame.positionKm, target, other, halfAngleRad };
    const crossings = near.flatMap(([fromMs, toMs]) => crossingsWithin(cone, fromMs, Math.min(toMs, endMs)));
    return { ok: true, crossings };
  } catch (error) {
    if (!(error instanceof PropagationFailure)) throw error;
    return { ok: false, reason: error.message };
  }
}

/** Near times over the whole of the target's path, by one state of the object for each two of its steps. */
function nearTimesOf(
  frame: SiteFrame,
  target: Path,
  orbit: Orbit,
  halfAngleRad: (atMs: number) => number,
): [number, number][] {
  const near: [number, number][] = [];
  for (let i = 1; i < target.segments.length; i += 2) {
    const midMs = target.fromMs + i * target.stepMs;
    const other = mustNode(orbit, midMs);
    const halfS = target.stepMs / 1000;
    const station = frame.positionKm;
    nearTimes({ station, midMs, halfS, target, other, otherPeriodS: orbit.periodS, halfAngleRad }, near);
  }
  return near;
}

function pathEnd(path: Path): number {
  return path.fromMs + path.segments.length * path.stepMs;
}

/** The crossings within one near time, exactly. */
function crossingsWithin(cone: Cone, fromMs: number, toMs: number): ConeCrossing[] {
  const found: ConeCrossing[] = [];
  const { points, nearest } = trace(cone, fromMs, toMs);
  let insideFromMs: number | null = null;
  for (const [i, point] of points.entries()) {
    const before = points[i - 1];
    if (point.outsideRad < 0 && insideFromMs === null) {
      insideFromMs = before ? exactEdge(cone, before, point) : point.atMs;
    } else if (point.outsideRad >= 0 && insideFromMs !== null && before) {
      found.push(describe(cone, insideFromMs, exactEdge(cone, before, point), nearest));
      insideFromMs = null;
    }
  }
  if (insideFromMs !== null) found.push(describe(cone, insideFromMs, toMs, nearest));
  return found;
}

/** Samples of a near time with every extremum of the distance from the cone's edge put in exactly. */
function trace(cone: Cone, fromMs: number, toMs: number): { points: ConeSample[]; nearest: ConeSample[] } {
  const steps = Math.max(1, Math.ceil((toMs - fromMs) / SAMPLE_MS));
  let last = exactCone(cone, fromMs);
  const points = [last];
  const nearest: ConeSample[] = [];
  for (let i = 1; i <= steps; i++) {
    const atMs = fromMs + ((toMs - fromMs) * i) / steps;
    let next = sampleCone(cone, atMs);
    if (i === steps || Math.abs(next.outsideRad) < SURE_RAD) next = exactCone(cone, atMs);
    if (last.opening > 0 !== next.opening > 0) points.push(exactExtremum(cone, "opening", last, next));
    if (last.cosineRate > 0 && next.cosineRate <= 0) {
      nearest.push(exactExtremum(cone, "cosineRate", last, next));
    }
    points.push(next);
    last = next;
  }
  return { points, nearest };
}

/** A crossing with its least separation: at an edge, or where the objects are nearest in between. */
function describe(cone: Cone, fromMs: number, toMs: number, nearest: readonly ConeSample[]): ConeCrossing {
  const within = nearest.filter((n) => n.atMs >= fromMs && n.atMs <= toMs);
  const candidates = [exactCone(cone, fromMs), exactCone(cone, toMs), ...within];
  const least = candidates.reduce((a, b) => (b.separationRad < a.separationRad ? b : a));
  return { fromMs, toMs, minSeparationRad: least.separationRad, minSeparationAtMs: least.atMs };
}
