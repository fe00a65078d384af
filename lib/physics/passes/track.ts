import { lookAngles } from "../frames/earth";
import { type EarthFixedNode, stateOfNode } from "../orbit/earth-fixed";
import type { Orbit } from "../orbit/propagate";
import { type Breakpoint, cutStretch, type NearPoint } from "./breakpoints";
import { polishCrossing } from "./polish";
import { rootBetween, type Stretch } from "./samples";
import { blankSighting, type Sight, sightNode } from "./sight";

/** One pass: the stretch of time above the elevation limit. Times are Unix ms, angles radians. */
export interface PassEvent {
  /** Rise, or the start of the search when the pass was under way there. */
  readonly riseMs: number;
  /** The highest point; of two culminations the higher one. */
  readonly culminateMs: number;
  /** Set, or the end of the search (or of propagation) when the pass was still under way there. */
  readonly setMs: number;
  readonly maxElevationRad: number;
  readonly riseAzimuthRad: number;
  readonly culminationAzimuthRad: number;
  readonly setAzimuthRad: number;
  readonly minRangeKm: number;
  readonly underWayAtFrom: boolean;
  readonly underWayAtTo: boolean;
}

/** What is known of one station while the search goes on. */
export interface Track {
  readonly sight: Sight;
  readonly passes: PassEvent[];
  open: { readonly rise: EarthFixedNode; readonly underWay: boolean; best: EarthFixedNode } | null;
  nearPoints: NearPoint[];
}

/** A track that has seen nothing yet. */
export function startTrack(sight: Sight): Track {
  return { sight, passes: [], open: null, nearPoints: [] };
}

const seen = blankSighting();

function elevationSine(sight: Sight, node: EarthFixedNode): number {
  sightNode(sight, node, seen);
  return seen.sinElevation;
}

/** Opens the pass that is already under way at the start of the search. */
export function beginTrack(track: Track, first: EarthFixedNode): void {
  sightNode(track.sight, first, seen);
  if (seen.overKm > 0) track.open = { rise: first, underWay: true, best: first };
}

/**
 * Follows one station through one stretch: opens passes at their rise, closes them at their set. False where
 * propagation fails while polishing.
 */
export function followTrack(track: Track, orbit: Orbit, stretch: Stretch): boolean {
  const points = cutStretch(orbit, track.sight, stretch, track.nearPoints);
  if (!points) return false;
  for (let i = 1; i < points.length; i++) {
    const a = points[i - 1] as Breakpoint;
    const b = points[i] as Breakpoint;
    if (a.overKm <= 0 && b.overKm > 0) {
      const rise = crossing(track.sight, orbit, stretch, a, b, true);
      if (!rise) return false;
      track.open = { rise, underWay: false, best: rise };
    }
    if (b.node && b.overKm > 0 && track.open) track.open.best = higher(track.sight, track.open.best, b.node);
    if (a.overKm > 0 && b.overKm <= 0) {
      const set = crossing(track.sight, orbit, stretch, a, b, false);
      if (!set) return false;
      closeTrack(track, set, false);
    }
  }
  if (!track.open) track.nearPoints = [];
  return true;
}

/** The node of two at which the object stands higher. */
function higher(sight: Sight, a: EarthFixedNode, b: EarthFixedNode): EarthFixedNode {
  return elevationSine(sight, b) > elevationSine(sight, a) ? b : a;
}

function crossing(
  sight: Sight,
  orbit: Orbit,
  stretch: Stretch,
  a: Breakpoint,
  b: Breakpoint,
  rising: boolean,
): EarthFixedNode | null {
  const guessMs = rootBetween(sight, stretch, "overKm", a.atMs, a.overKm, b.atMs, b.overKm);
  return polishCrossing(orbit, sight, a.atMs, b.atMs, guessMs, rising);
}

/** Ends the open pass at a node and notes it. */
export function closeTrack(track: Track, end: EarthFixedNode, underWay: boolean): void {
  const { open, sight } = track;
  track.open = null;
  // A rise after the end can only come from a stretch in which propagation failed.
  if (!open || open.rise.atMs >= end.atMs) return;
  const best = higher(sight, open.best, end);
  const [rise, top, set] = [open.rise, best, end].map((n) => lookAngles(sight.frame, stateOfNode(n)));
  if (!rise || !top || !set) return;
  let minRangeKm = Math.min(rise.rangeKm, top.rangeKm, set.rangeKm);
  for (const near of track.nearPoints) {
    const within = near.atMs >= open.rise.atMs && near.atMs <= end.atMs;
    if (within) minRangeKm = Math.min(minRangeKm, near.rangeKm);
  }
  track.passes.push({
    riseMs: open.rise.atMs,
    culminateMs: best.atMs,
    setMs: end.atMs,
    maxElevationRad: top.elevationRad,
    riseAzimuthRad: rise.azimuthRad,
    culminationAzimuthRad: top.azimuthRad,
    setAzimuthRad: set.azimuthRad,
    minRangeKm,
    underWayAtFrom: open.underWay,
    underWayAtTo: underWay,
  });
}
