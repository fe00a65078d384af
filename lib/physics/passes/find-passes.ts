import { EARTH_MU_KM3_PER_S2, TWO_PI } from "../constants";
import { type EarthFixedNode, earthFixedNode } from "../orbit/earth-fixed";
import type { Site } from "../orbit/elements";
import type { Orbit } from "../orbit/propagate";
import { isoTime } from "../time";
import { makeStretch } from "./samples";
import { blankSighting, makeSight, sightNode } from "./sight";
import { canSkip, nextWindow, planeAt, type Window } from "./skip-ahead";
import { beginTrack, closeTrack, followTrack, type PassEvent, startTrack, type Track } from "./track";

export type { PassEvent } from "./track";

/** A station as the search needs it; the elevation limit is geometric (no refraction), in radians. */
export interface PassStation {
  readonly site: Site;
  readonly minElevationRad: number;
}

/** A pass and the index of its station in the list that was handed in. */
export interface StationPass {
  readonly stationIndex: number;
  readonly pass: PassEvent;
}

/** Nodes of a low orbit lie at most this far apart. */
const STEP_MS = 240_000;

/** Nodes of other orbits lie at most this angle apart, at the angular rate of a circular orbit there. */
const STEP_RAD = 0.2;

/** Where propagation fails, its last good moment is searched to this. */
const FAILURE_RESOLUTION_MS = 1000;

interface Search {
  readonly orbit: Orbit;
  readonly tracks: readonly Track[];
  /** Where each station can next see the object; stretches outside are jumped over. */
  readonly windows: Window[];
  readonly skipping: boolean;
  readonly toMs: number;
}

/**
 * All passes of one orbit over any number of stations in [fromMs, toMs), Unix ms, by rise. SGP4 is called
 * only where some station can see the object, on nodes minutes apart, with quintic Hermite polynomials
 * between them; rise, culmination and set are then polished on SGP4 itself (to about a millisecond).
 *
 * A pass under way at an end of the search is cut there and marked. Where propagation fails, `failure` is
 * the sentence that says why: passes before are kept, one under way there is cut and marked.
 */
export function findPasses(
  orbit: Orbit,
  stations: readonly PassStation[],
  fromMs: number,
  toMs: number,
): { passes: StationPass[]; failure: string | null } {
  if (!Number.isFinite(fromMs) || !Number.isFinite(toMs)) {
    return { passes: [], failure: "The search needs a start and an end that are dates." };
  }
  if (fromMs >= toMs || stations.length === 0) return { passes: [], failure: null };
  const first = earthFixedNode(orbit, fromMs);
  if (!first) return { passes: [], failure: failureAt(orbit, fromMs) };

  const sights = stations.map((s) => makeSight(s.site, s.minElevationRad));
  const tracks = sights.map(startTrack);
  for (const track of tracks) beginTrack(track, first);
  const windows = sights.map(() => ({ fromMs, toMs: fromMs }));
  const skipping = canSkip(sights, apogeeKm(orbit));
  const failure = run({ orbit, tracks, windows, skipping, toMs }, first);
  const passes = tracks.flatMap((track, stationIndex) =>
    track.passes.map((pass) => ({ stationIndex, pass })),
  );
  passes.sort((a, b) => a.pass.riseMs - b.pass.riseMs || a.stationIndex - b.stationIndex);
  return { passes, failure };
}

/** Goes through the time of the search node by node; the sentence of a failure, or null. */
function run(search: Search, first: EarthFixedNode): string | null {
  const { orbit, tracks, toMs } = search;
  let node = first;
  let failure: string | null = null;
  while (node.atMs < toMs && failure === null) {
    const wanted = nextTime(search, node);
    const { end, badMs } = nodeOrLastGood(orbit, node, wanted);
    if (badMs !== null) failure = failureAt(orbit, badMs);
    const looking = tracks.filter((_, i) => isLookedAt(search, i, node.atMs, end.atMs));
    if (looking.length > 0 && end.atMs > node.atMs) {
      const stretch = makeStretch(node, end);
      if (!looking.every((track) => followTrack(track, orbit, stretch))) {
        failure = failureWithin(orbit, node.atMs, end.atMs);
        break;
      }
    } else if (widenForLateLanding(search, node, end)) {
      failure = null;
      continue;
    }
    node = end;
  }
  for (const track of tracks) closeTrack(track, node, true);
  return failure;
}

/** Where the next node is needed: after one step while a station may see the object, else at a window. */
function nextTime(search: Search, node: EarthFixedNode): number {
  const { tracks, windows, toMs } = search;
  if (!search.skipping) {
    const radius = Math.hypot(node.x, node.y, node.z);
    return Math.min(toMs, node.atMs + 1000 * STEP_RAD * Math.sqrt(radius ** 3 / EARTH_MU_KM3_PER_S2));
  }
  let plane: ReturnType<typeof planeAt> | null = null;
  let untilMs = Number.NEGATIVE_INFINITY;
  let nearestMs = toMs;
  for (const [i, track] of tracks.entries()) {
    let window = windows[i] as Window;
    if (window.toMs <= node.atMs && !track.open) {
      plane ??= planeAt(node);
      window = nextWindow(plane, track.sight);
      windows[i] = window;
    }
    if (track.open) untilMs = Math.max(untilMs, window.toMs, node.atMs + STEP_MS);
    else if (window.fromMs <= node.atMs) untilMs = Math.max(untilMs, window.toMs);
    else nearestMs = Math.min(nearestMs, window.fromMs);
  }
  if (untilMs <= node.atMs) return nearestMs;
  const leftMs = Math.min(untilMs, toMs) - node.atMs;
  return node.atMs + leftMs / Math.ceil(leftMs / STEP_MS);
}

function isLookedAt(search: Search, i: number, fromMs: number, toMs: number): boolean {
  const window = search.windows[i] as Window;
  if (!search.skipping || search.tracks[i]?.open) return true;
  return window.fromMs < toMs && window.toMs > fromMs;
}

/**
 * A guard that should never act: when a jump ends with an object already above a station's limit, that
 * station's window is widened back to the node before the jump, and the jump is not made.
 */
function widenForLateLanding(search: Search, before: EarthFixedNode, landed: EarthFixedNode): boolean {
  const seen = blankSighting();
  let late = false;
  for (const [i, track] of search.tracks.entries()) {
    sightNode(track.sight, landed, seen);
    if (seen.overKm <= 0 || landed.atMs <= before.atMs) continue;
    search.windows[i] = { fromMs: before.atMs, toMs: landed.atMs + STEP_MS };
    late = true;
  }
  return late;
}

/** The node at a time, or where propagation fails the last good one before, and a time that is bad. */
function nodeOrLastGood(
  orbit: Orbit,
  node: EarthFixedNode,
  atMs: number,
): { end: EarthFixedNode; badMs: number | null } {
  const found = earthFixedNode(orbit, atMs);
  if (found) return { end: found, badMs: null };
  let end = node;
  let badMs = atMs;
  while (badMs - end.atMs > FAILURE_RESOLUTION_MS) {
    const middle = earthFixedNode(orbit, (end.atMs + badMs) / 2);
    if (middle) end = middle;
    else badMs = (end.atMs + badMs) / 2;
  }
  return { end, badMs };
}

/** SGP4's sentence for a time at which it fails. */
function failureAt(orbit: Orbit, atMs: number): string {
  const got = orbit.stateAt(atMs);
  return got.ok ? `Propagation fails near ${isoTime(atMs)}.` : got.reason;
}

/** The sentence for a failure somewhere between two times that are good themselves. */
function failureWithin(orbit: Orbit, fromMs: number, toMs: number): string {
  for (let atMs = fromMs; atMs < toMs; atMs += FAILURE_RESOLUTION_MS) {
    if (!orbit.stateAt(atMs).ok) return failureAt(orbit, atMs);
  }
  return `Propagation fails between ${isoTime(fromMs)} and ${isoTime(toMs)}.`;
}

/** Apogee radius from the mean elements, km, with room for what SGP4 adds to it. */
function apogeeKm(orbit: Orbit): number {
  const meanMotion = TWO_PI / orbit.periodS;
  const semiMajorKm = Math.cbrt(EARTH_MU_KM3_PER_S2 / meanMotion ** 2);
  return semiMajorKm * (1 + orbit.elements.eccentricity) + 50;
}
