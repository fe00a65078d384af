import { EARTH_MU_KM3_PER_S2, EARTH_RADIUS_KM, TWO_PI } from "../constants";
import { type EarthFixedNode, earthFixedNode } from "../orbit/earth-fixed";
import { blankSegment, evaluate, fitSegment } from "../orbit/hermite";
import type { Orbit } from "../orbit/propagate";
import { blankSighting, type Sight, sightNode } from "./sight";
import { foretells, isLow, nextWindow, planeAt, type Window } from "./skip-ahead";
import type { Track } from "./track";

/**
 * Nodes of a low, nearly circular orbit lie this angle apart at most, 12 minutes at 800 km: the polynomials
 * between them are then within 160 m of SGP4 (25 m on average; 1,200 real sets).
 */
const LOW_STEP_RAD = 0.75;

/** Nodes of other orbits lie this angle apart at most, at the rate of a circular orbit at that distance. */
const STEP_RAD = 0.3;

/** ... and nearer together until the polynomial is within this angle of SGP4, seen from the ground. */
const TOLERANCE_RAD = 2e-4;
const SHORTEST_STEP_MS = 5_000;

/** Where in a step the polynomial is compared: errors of the velocities cancel in the middle. */
const PROBE_AT = 0.3;

/** What a search for passes carries along. */
export interface Search {
  readonly orbit: Orbit;
  readonly tracks: readonly Track[];
  /** Where each station can next see the object; stretches outside are jumped over. */
  readonly windows: Window[];
  readonly skipping: boolean;
  /** Longest step while skipping. */
  readonly stepMs: number;
  readonly toMs: number;
}

/** Readies a search for the time from `first` to `toMs`. */
export function startSearch(
  orbit: Orbit,
  tracks: readonly Track[],
  first: EarthFixedNode,
  toMs: number,
): Search {
  const windows = tracks.map(() => ({ fromMs: first.atMs, toMs: first.atMs }));
  const skipping = canSkip(orbit, tracks, first, toMs);
  const stepMs = (1000 * orbit.periodS * LOW_STEP_RAD) / TWO_PI;
  return { orbit, tracks, windows, skipping, stepMs, toMs };
}

/** Revolutions over which the look-ahead is tried at the start and at the end of a search. */
const TRIAL_REVOLUTIONS = 3.3;

/** Whether the orbit lies low, and its look-ahead holds at both ends of the search (drag grows in between). */
function canSkip(orbit: Orbit, tracks: readonly Track[], first: EarthFixedNode, toMs: number): boolean {
  const sights: Sight[] = tracks.map((track) => track.sight);
  if (!isLow(sights, orbit.elements.eccentricity, apogeeKm(orbit))) return false;
  const trialMs = TRIAL_REVOLUTIONS * 1000 * orbit.periodS;
  const starts = toMs - trialMs > first.atMs ? [first.atMs, toMs - trialMs] : [first.atMs];
  return starts.every((atMs) => {
    const [node, later] = [earthFixedNode(orbit, atMs), earthFixedNode(orbit, atMs + trialMs)];
    return node !== null && later !== null && foretells(node, later);
  });
}

/** When the next node is needed: after a step while a station may see the object, else at a window. */
export function nextTime(search: Search, node: EarthFixedNode): number {
  if (!search.skipping) return adaptedStep(search, node);
  const { tracks, windows, toMs } = search;
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
    if (track.open) untilMs = Math.max(untilMs, window.toMs, node.atMs + search.stepMs / 4);
    else if (window.fromMs <= node.atMs) untilMs = Math.max(untilMs, window.toMs);
    else nearestMs = Math.min(nearestMs, window.fromMs);
  }
  if (untilMs <= node.atMs) return nearestMs;
  const leftMs = Math.min(untilMs, toMs) - node.atMs;
  return node.atMs + leftMs / Math.ceil(leftMs / search.stepMs);
}

const trial = blankSegment();
const point = new Float64Array(6);

/** The end of the longest step, up to the usual one, over which the polynomial is near enough to SGP4. */
function adaptedStep(search: Search, node: EarthFixedNode): number {
  const radius = Math.hypot(node.x, node.y, node.z);
  const usualMs = 1000 * STEP_RAD * Math.sqrt(radius ** 3 / EARTH_MU_KM3_PER_S2);
  let stepMs = Math.min(search.toMs - node.atMs, usualMs);
  let end = earthFixedNode(search.orbit, node.atMs + stepMs);
  while (stepMs > SHORTEST_STEP_MS) {
    const probeMs = stepMs * PROBE_AT;
    const probe = earthFixedNode(search.orbit, node.atMs + probeMs);
    if (end && probe && isNear(node, end, probe)) break;
    [stepMs, end] = [probeMs, probe];
  }
  return node.atMs + stepMs;
}

function isNear(first: EarthFixedNode, last: EarthFixedNode, probe: EarthFixedNode): boolean {
  fitSegment(first, last, trial);
  evaluate(trial, probe.atMs, point, 0);
  const [x = 0, y = 0, z = 0] = point;
  const offKm = Math.hypot(x - probe.x, y - probe.y, z - probe.z);
  const nearestKm = Math.max(100, Math.hypot(probe.x, probe.y, probe.z) - EARTH_RADIUS_KM);
  return offKm < TOLERANCE_RAD * nearestKm;
}

/** Whether a station must look at the stretch between two times. */
export function isLookedAt(search: Search, i: number, fromMs: number, toMs: number): boolean {
  const window = search.windows[i] as Window;
  if (!search.skipping || search.tracks[i]?.open) return true;
  return window.fromMs < toMs && window.toMs > fromMs;
}

const seen = blankSighting();

/**
 * A guard that should never act: when a station that is not looking would find an object above its limit at
 * the next node, its window is widened back to the present one, and the step is to be chosen anew.
 */
export function widenForLateLanding(search: Search, node: EarthFixedNode, next: EarthFixedNode): boolean {
  let late = false;
  for (const [i, track] of search.tracks.entries()) {
    if (isLookedAt(search, i, node.atMs, next.atMs) || next.atMs <= node.atMs) continue;
    sightNode(track.sight, next, seen);
    if (seen.overKm <= 0) continue;
    search.windows[i] = { fromMs: node.atMs, toMs: next.atMs + search.stepMs };
    late = true;
  }
  return late;
}

/** Apogee radius from the mean elements, km, with room for what SGP4 adds to it. */
function apogeeKm(orbit: Orbit): number {
  const meanMotion = TWO_PI / orbit.periodS;
  const semiMajorKm = Math.cbrt(EARTH_MU_KM3_PER_S2 / meanMotion ** 2);
  return semiMajorKm * (1 + orbit.elements.eccentricity) + 50;
}
