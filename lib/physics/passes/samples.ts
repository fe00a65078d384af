import type { EarthFixedNode } from "../orbit/earth-fixed";
import { blankSegment, evaluate, fitSegment, type HermiteSegment } from "../orbit/hermite";
import { blankSighting, type Sight, type Sighting, sightAt } from "./sight";

/**
 * A stretch is looked at in parts of a minute or so, at most in so many: a sixteenth of a radian of a low orbit,
 * a thirtieth of others. Within one part the elevation has at most one extremum.
 */
const PART_MS = 60_000;
const MOST_PARTS = 12;

/**
 * One stretch between two SGP4 nodes, with positions in between, shared by all stations. A search keeps one
 * and refills it.
 */
export interface Stretch {
  readonly segment: HermiteSegment;
  first: EarthFixedNode;
  last: EarthFixedNode;
  parts: number;
  /** Times of the parts' edges, and six numbers (km, km/s) for each. */
  readonly edgesMs: Float64Array;
  readonly states: Float64Array;
}

/** A stretch without length, to be refilled. */
export function blankStretch(node: EarthFixedNode): Stretch {
  return {
    segment: blankSegment(),
    first: node,
    last: node,
    parts: 0,
    edgesMs: new Float64Array(MOST_PARTS + 1),
    states: new Float64Array(6 * (MOST_PARTS + 1)),
  };
}

/** Prepares a stretch between two nodes. */
export function fillStretch(stretch: Stretch, first: EarthFixedNode, last: EarthFixedNode): void {
  const { segment, edgesMs, states } = stretch;
  stretch.first = first;
  stretch.last = last;
  const parts = Math.min(MOST_PARTS, Math.ceil((last.atMs - first.atMs) / PART_MS));
  stretch.parts = parts;
  fitSegment(first, last, segment);
  edgesMs[0] = first.atMs;
  edgesMs[parts] = last.atMs;
  // The end points are SGP4's own, so that neighbouring stretches agree to the last bit.
  putNode(states, 0, first);
  putNode(states, 6 * parts, last);
  for (let i = 1; i < parts; i++) {
    const atMs = first.atMs + ((last.atMs - first.atMs) * i) / parts;
    edgesMs[i] = atMs;
    evaluate(segment, atMs, states, 6 * i);
  }
}

function putNode(states: Float64Array, at: number, node: EarthFixedNode): void {
  states[at] = node.x;
  states[at + 1] = node.y;
  states[at + 2] = node.z;
  states[at + 3] = node.vx;
  states[at + 4] = node.vy;
  states[at + 5] = node.vz;
}

const point = new Float64Array(6);

/** Sights the object at one of the edges of the parts. */
export function sightEdge(sight: Sight, stretch: Stretch, edge: number, out: Sighting): void {
  sightNumbers(sight, stretch.states, 6 * edge, out);
}

/** Sights the object at any time of the stretch, on the polynomial. */
export function sightBetween(sight: Sight, stretch: Stretch, atMs: number, out: Sighting): void {
  evaluate(stretch.segment, atMs, point, 0);
  sightNumbers(sight, point, 0, out);
}

function sightNumbers(sight: Sight, s: Float64Array, at: number, out: Sighting): void {
  sightAt(
    sight,
    s[at] as number,
    s[at + 1] as number,
    s[at + 2] as number,
    s[at + 3] as number,
    s[at + 4] as number,
    s[at + 5] as number,
    out,
  );
}

const CLOSE_MS = 100;

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
    if (value === 0 || Math.abs(root - previous) < CLOSE_MS) return root;
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
