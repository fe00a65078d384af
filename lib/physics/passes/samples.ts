import type { EarthFixedNode } from "../orbit/earth-fixed";
import { evaluate, type HermiteSegment, hermiteSegment } from "../orbit/hermite";
import { blankSighting, type Sight, type Sighting, sightAt } from "./sight";

/** Parts that a segment is looked at in; within one part the elevation has at most one extremum. */
const PARTS = 4;

/** One stretch between two SGP4 nodes, with positions in between, shared by all stations. */
export interface Stretch {
  readonly segment: HermiteSegment;
  readonly first: EarthFixedNode;
  readonly last: EarthFixedNode;
  /** Times of the parts' edges, and six numbers (km, km/s) for each. */
  readonly edgesMs: readonly number[];
  readonly states: Float64Array;
}

const point = new Float64Array(6);

/** Prepares a stretch between two nodes. */
export function makeStretch(first: EarthFixedNode, last: EarthFixedNode): Stretch {
  const segment = hermiteSegment(first, last);
  const edgesMs: number[] = [];
  const states = new Float64Array(6 * (PARTS + 1));
  for (let i = 0; i <= PARTS; i++) {
    const atMs = i === PARTS ? last.atMs : first.atMs + ((last.atMs - first.atMs) * i) / PARTS;
    edgesMs.push(atMs);
    evaluate(segment, atMs, point);
    states.set(point, 6 * i);
  }
  // The end points are SGP4's own, so that neighbouring stretches agree to the last bit.
  states.set([first.x, first.y, first.z, first.vx, first.vy, first.vz], 0);
  states.set([last.x, last.y, last.z, last.vx, last.vy, last.vz], 6 * PARTS);
  return { segment, first, last, edgesMs, states };
}

/** Sights the object at one of the edges of the parts. */
export function sightEdge(sight: Sight, stretch: Stretch, edge: number, out: Sighting): void {
  const s = stretch.states;
  const j = 6 * edge;
  sightAt(
    sight,
    s[j] as number,
    s[j + 1] as number,
    s[j + 2] as number,
    s[j + 3] as number,
    s[j + 4] as number,
    s[j + 5] as number,
    out,
  );
}

/** Sights the object at any time of the stretch, on the polynomial. */
export function sightBetween(sight: Sight, stretch: Stretch, atMs: number, out: Sighting): void {
  evaluate(stretch.segment, atMs, point);
  const [x, y, z, vx, vy, vz] = point as unknown as readonly [number, number, number, number, number, number];
  sightAt(sight, x, y, z, vx, vy, vz, out);
}

const probe = blankSighting();

/**
 * Root of one quantity of the sighting on the polynomial, between two times at which its signs differ, by
 * false position that halves a stuck end (Illinois variant); good to 50 ms or 12 steps.
 */
export function rootBetween(
  sight: Sight,
  stretch: Stretch,
  quantity: "overKm" | "climb" | "receding",
  fromMs: number,
  fromValue: number,
  toMs: number,
  toValue: number,
): number {
  let [a, fa, b, fb] = [fromMs, fromValue, toMs, toValue];
  let root = a;
  for (let step = 0; step < 12; step++) {
    const previous = root;
    root = (a * fb - b * fa) / (fb - fa);
    sightBetween(sight, stretch, root, probe);
    const value = probe[quantity];
    if (value === 0 || Math.abs(root - previous) < 50) return root;
    if (value > 0 === fb > 0) {
      [b, fb] = [root, value];
      fa /= 2;
    } else {
      [a, fa] = [b, fb];
      [b, fb] = [root, value];
    }
  }
  return root;
}
