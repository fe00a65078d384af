import { type EarthFixedNode, earthFixedNode } from "../orbit/earth-fixed";
import type { Orbit } from "../orbit/propagate";
import { polishExtremum } from "./polish";
import { rootBetween, type Stretch, sightBetween, sightEdge } from "./samples";
import { blankSighting, type Sight, type Sighting, sightNode } from "./sight";

/** An end of a stretch of time over which the elevation only climbs or only falls. */
export interface Breakpoint {
  readonly atMs: number;
  /** Height over the cone of the elevation limit, km. */
  readonly overKm: number;
  readonly kind: "edge" | "highest" | "lowest";
  /** The SGP4 state there; null where the polynomial was sure enough. */
  readonly node: EarthFixedNode | null;
}

/** A place where range stops falling and begins to rise. */
export interface NearPoint {
  readonly atMs: number;
  readonly rangeKm: number;
}

/**
 * The polynomial is trusted to say on which side of the limit an object stands when the sine of its elevation
 * is farther than this from the limit's: 63 m at 200 km would be 3e-4.
 */
const SURE = 1e-3;

/** An extremum that cannot reach the limit within this much is not looked for. */
const HOPELESS = 1e-2;

let here = blankSighting();
let next = blankSighting();

/**
 * Cuts a stretch, as one station sees it, at every extremum of the elevation that matters. Extrema above or
 * near the limit are polished on SGP4. Null where propagation fails while polishing.
 */
export function cutStretch(
  orbit: Orbit,
  sight: Sight,
  stretch: Stretch,
  nearPoints: NearPoint[],
): Breakpoint[] | null {
  const edges = stretch.edgesMs;
  sightEdge(sight, stretch, 0, here);
  const points: Breakpoint[] = [edgePoint(stretch.first, here)];
  for (let i = 1; i <= stretch.parts; i++) {
    const fromMs = edges[i - 1] as number;
    const toMs = edges[i] as number;
    if (!sightSurely(orbit, sight, stretch, i, next)) return null;
    if (here.receding < 0 && next.receding >= 0) {
      nearPoints.push(nearPoint(sight, stretch, fromMs, here.receding, toMs, next.receding));
    }
    const turns = here.climb > 0 !== next.climb > 0 && matters(sight, here, next, (toMs - fromMs) / 1000);
    if (turns || here.overKm > 0 !== next.overKm > 0) {
      // Points around anything of interest keep the brackets of the polishing short.
      points.push({ atMs: fromMs, overKm: here.overKm, kind: "edge", node: null });
      if (turns) {
        const point = extremum(orbit, sight, stretch, fromMs, here.climb, toMs, next.climb);
        if (!point) return null;
        points.push(point);
      }
      points.push({ atMs: toMs, overKm: next.overKm, kind: "edge", node: null });
    }
    [here, next] = [next, here];
  }
  points.push(edgePoint(stretch.last, here));
  return points;
}

/**
 * Sights the object at the edge of a part; near the limit on SGP4 itself, so that the sign there can be
 * relied on when the crossing is polished. False where propagation fails.
 */
function sightSurely(orbit: Orbit, sight: Sight, stretch: Stretch, i: number, out: Sighting): boolean {
  sightEdge(sight, stretch, i, out);
  const inner = i > 0 && i < stretch.parts;
  if (!inner || Math.abs(out.sinElevation - sight.sinMin) > SURE) return true;
  const node = earthFixedNode(orbit, stretch.edgesMs[i] as number);
  if (node) sightNode(sight, node, out);
  return node !== null;
}

function edgePoint(node: EarthFixedNode, seen: Sighting): Breakpoint {
  return { atMs: node.atMs, overKm: seen.overKm, kind: "edge", node };
}

/** Whether an extremum between two sightings can lie near or beyond the limit: by the tangents there. */
function matters(sight: Sight, a: Sighting, b: Sighting, seconds: number): boolean {
  if (a.overKm > 0 || b.overKm > 0) return true;
  // The elevation is concave around a culmination, so its tangents run above it; the rate of the sine of
  // the elevation is climb over range cubed.
  const fromLeft = a.sinElevation + (a.climb / a.rangeKm ** 3) * seconds;
  const fromRight = b.sinElevation - (b.climb / b.rangeKm ** 3) * seconds;
  return Math.max(fromLeft, fromRight) > sight.sinMin - HOPELESS;
}

const found = blankSighting();

function extremum(
  orbit: Orbit,
  sight: Sight,
  stretch: Stretch,
  fromMs: number,
  fromClimb: number,
  toMs: number,
  toClimb: number,
): Breakpoint | null {
  const highest = fromClimb > 0;
  const kind = highest ? "highest" : "lowest";
  const atMs = rootBetween(sight, stretch, "climb", fromMs, fromClimb, toMs, toClimb);
  sightBetween(sight, stretch, atMs, found);
  const over = found.sinElevation - sight.sinMin;
  const sure = Math.abs(over) > SURE && !(highest && over > 0);
  if (sure) return { atMs, overKm: found.overKm, kind, node: null };
  const node = polishExtremum(orbit, sight, fromMs, toMs, atMs, highest);
  if (!node) return null;
  sightNode(sight, node, found);
  return { atMs: node.atMs, overKm: found.overKm, kind, node };
}

function nearPoint(
  sight: Sight,
  stretch: Stretch,
  fromMs: number,
  fromValue: number,
  toMs: number,
  toValue: number,
): NearPoint {
  const atMs = rootBetween(sight, stretch, "receding", fromMs, fromValue, toMs, toValue);
  sightBetween(sight, stretch, atMs, found);
  return { atMs, rangeKm: found.rangeKm };
}
