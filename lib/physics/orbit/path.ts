import { type EarthFixedNode, earthFixedNode } from "./earth-fixed";
import { blankSegment, evaluate, fitSegment, type HermiteSegment } from "./hermite";
import type { Orbit } from "./propagate";

/** Thrown where a calculation that must not be left out has no state to work with; the message is a sentence. */
export class PropagationFailure extends Error {}

/**
 * An orbit over a span of time on evenly spaced SGP4 nodes, with Hermite polynomials between them; nodes and
 * polynomials are made when they are first needed.
 */
export interface Path {
  readonly orbit: Orbit;
  readonly fromMs: number;
  readonly stepMs: number;
  readonly nodes: (EarthFixedNode | undefined)[];
  readonly segments: (HermiteSegment | undefined)[];
}

/** A path of `steps` equal steps over [fromMs, toMs]. */
export function makePath(orbit: Orbit, fromMs: number, toMs: number, steps: number): Path {
  return { orbit, fromMs, stepMs: (toMs - fromMs) / steps, nodes: [], segments: new Array(steps) };
}

/** The SGP4 state at a time, Earth-fixed; throws PropagationFailure with SGP4's sentence. */
export function mustNode(orbit: Orbit, atMs: number): EarthFixedNode {
  const node = earthFixedNode(orbit, atMs);
  if (node) return node;
  const got = orbit.stateAt(atMs);
  throw new PropagationFailure(got.ok ? "Propagation fails." : got.reason);
}

/** The i-th node of a path. Throws PropagationFailure. */
export function pathNode(path: Path, i: number): EarthFixedNode {
  const known = path.nodes[i];
  if (known) return known;
  const made = mustNode(path.orbit, path.fromMs + i * path.stepMs);
  path.nodes[i] = made;
  return made;
}

/** Position (km) and velocity (km/s), Earth-fixed, at any time of the path. Throws PropagationFailure. */
export function pathAt(path: Path, atMs: number, out: Float64Array): void {
  const last = path.segments.length - 1;
  const i = Math.max(0, Math.min(last, Math.floor((atMs - path.fromMs) / path.stepMs)));
  let segment = path.segments[i];
  if (!segment) {
    segment = blankSegment();
    fitSegment(pathNode(path, i), pathNode(path, i + 1), segment);
    path.segments[i] = segment;
  }
  evaluate(segment, atMs, out, 0);
}

/** Writes a node's position and velocity in the form of `pathAt`. */
export function writeNode(node: EarthFixedNode, out: Float64Array): void {
  out[0] = node.x;
  out[1] = node.y;
  out[2] = node.z;
  out[3] = node.vx;
  out[4] = node.vy;
  out[5] = node.vz;
}
