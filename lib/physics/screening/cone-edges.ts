import { mustNode, type Path, pathAt, writeNode } from "../orbit/path";
import type { Vec3 } from "../vector";
import { blankSeparation, type Separation, separate } from "./separation";

/** Station, both objects' paths, and the cone's half-angle over time. */
export interface Cone {
  readonly station: Vec3;
  readonly target: Path;
  readonly other: Path;
  readonly halfAngleRad: (atMs: number) => number;
}

/** The separation at one time, and how far it is outside the cone. */
export interface ConeSample extends Separation {
  atMs: number;
  /** Separation minus half-angle, radians: below 0 inside the cone. */
  outsideRad: number;
  /** Has the sign of the rate of `outsideRad`, and is smooth. */
  opening: number;
}

/** Times on SGP4 are found to this; edges need 0.1 s. */
const EDGE_RESOLUTION_MS = 2;

/** The half-angle's rate is taken over this, on both sides. */
const RATE_OVER_MS = 250;

const a = new Float64Array(6);
const b = new Float64Array(6);

/** The cone at a time, on the polynomials of both paths. */
export function sampleCone(cone: Cone, atMs: number): ConeSample {
  pathAt(cone.target, atMs, a);
  pathAt(cone.other, atMs, b);
  return sample(cone, atMs);
}

/** The cone at a time, on SGP4 itself. */
export function exactCone(cone: Cone, atMs: number): ConeSample {
  writeNode(mustNode(cone.target.orbit, atMs), a);
  writeNode(mustNode(cone.other.orbit, atMs), b);
  return sample(cone, atMs);
}

function sample(cone: Cone, atMs: number): ConeSample {
  const half = cone.halfAngleRad(atMs);
  const widening =
    (cone.halfAngleRad(atMs + RATE_OVER_MS) - cone.halfAngleRad(atMs - RATE_OVER_MS)) / (RATE_OVER_MS / 500);
  const out = { ...blankSeparation(), atMs, outsideRad: 0, opening: 0 };
  separate(cone.station, a, b, out);
  out.outsideRad = out.separationRad - half;
  out.opening = -out.cosineRate - widening * Math.sin(out.separationRad);
  return out;
}

/**
 * Where a quantity goes through nothing between two samples of different sign: on the polynomials first,
 * then once more from there by its slope on SGP4. For extrema, whose value hardly depends on their time.
 */
export function exactExtremum(
  cone: Cone,
  quantity: "opening" | "cosineRate",
  from: ConeSample,
  to: ConeSample,
): ConeSample {
  const nearMs = falsePosition(from, to, quantity, (atMs) => sampleCone(cone, atMs), 1);
  const near = exactCone(cone, nearMs);
  const slope = (to[quantity] - from[quantity]) / (to.atMs - from.atMs);
  const stepMs = -near[quantity] / slope;
  const atMs = Math.min(to.atMs, Math.max(from.atMs, nearMs + stepMs));
  return Math.abs(atMs - nearMs) < 0.002 ? near : exactCone(cone, atMs);
}

/** The moment between two samples at which the object goes in or out of the cone, on SGP4, Unix ms. */
export function exactEdge(cone: Cone, from: ConeSample, to: ConeSample): number {
  const guessMs = falsePosition(from, to, "outsideRad", (atMs) => sampleCone(cone, atMs), EDGE_RESOLUTION_MS);
  // A short bracket around the guess, widened until SGP4 changes sign within it, or the samples end it.
  for (let widthMs = 20; ; widthMs *= 5) {
    const lo = exactCone(cone, Math.max(from.atMs, guessMs - widthMs));
    const hi = exactCone(cone, Math.min(to.atMs, guessMs + widthMs));
    if (lo.outsideRad < 0 !== hi.outsideRad < 0) {
      return falsePosition(lo, hi, "outsideRad", (atMs) => exactCone(cone, atMs), EDGE_RESOLUTION_MS);
    }
    if (lo.atMs === from.atMs && hi.atMs === to.atMs) return guessMs;
  }
}

/** Root by false position that halves a stuck end (Illinois variant), to a step of some ms. */
function falsePosition(
  from: ConeSample,
  to: ConeSample,
  quantity: "outsideRad" | "opening" | "cosineRate",
  at: (atMs: number) => ConeSample,
  resolutionMs: number,
): number {
  let [x0, y0, x1, y1] = [from.atMs, from[quantity], to.atMs, to[quantity]];
  let root = x0;
  for (let step = 0; step < 40; step++) {
    const previous = root;
    root = (x0 * y1 - x1 * y0) / (y1 - y0);
    const y = at(root)[quantity];
    if (y === 0 || Math.abs(root - previous) < resolutionMs) return root;
    if (y > 0 === y1 > 0) y0 /= 2;
    else [x0, y0] = [x1, y1];
    [x1, y1] = [root, y];
  }
  return root;
}
