import { type EarthFixedNode, earthFixedNode } from "../orbit/earth-fixed";
import type { Site } from "../orbit/elements";
import type { Orbit } from "../orbit/propagate";
import { failureAt, failureWithin, nodeOrLastGood } from "./failing";
import { blankStretch, fillStretch } from "./samples";
import { makeSight } from "./sight";
import { isLookedAt, nextTime, type Search, startSearch, widenForLateLanding } from "./steps";
import { beginTrack, closeTrack, followTrack, type PassEvent, startTrack } from "./track";

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

  const tracks = stations.map((s) => startTrack(makeSight(s.site, s.minElevationRad)));
  for (const track of tracks) beginTrack(track, first);
  const failure = run(startSearch(orbit, tracks, first, toMs), first);
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
  const stretch = blankStretch(first);
  while (node.atMs < toMs && failure === null) {
    const wanted = nextTime(search, node);
    const { end, badMs } = nodeOrLastGood(orbit, node, wanted);
    if (widenForLateLanding(search, node, end)) continue;
    if (badMs !== null) failure = failureAt(orbit, badMs);
    const looking = tracks.filter((_, i) => isLookedAt(search, i, node.atMs, end.atMs));
    if (looking.length > 0 && end.atMs > node.atMs) {
      fillStretch(stretch, node, end);
      if (!looking.every((track) => followTrack(track, orbit, stretch))) {
        failure = failureWithin(orbit, node.atMs, end.atMs);
        break;
      }
    }
    node = end;
  }
  for (const track of tracks) closeTrack(track, node, true);
  return failure;
}
