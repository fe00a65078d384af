import { DEG } from "@/lib/physics/constants";
import { type SiteFrame, siteStateTeme } from "@/lib/physics/frames/earth";
import type { Orbit, OrbitState } from "@/lib/physics/orbit/propagate";
import { isoTime } from "@/lib/physics/time";
import type { Vec3 } from "@/lib/physics/vector";
import { gravityKmPerS2 } from "./gravity";
import { cubic, quintic } from "./hermite";

/** Longest span that one track covers. */
const MAX_SPAN_MS = 24 * 3600_000;

/** Distance of the SGP4 states that the track interpolates between: at 10 s within decimetres of SGP4. */
const NODE_SPACING_MS = 10_000;

/** A fragment this little under the horizon still counts as on it: rise times are good to a millisecond. */
const HORIZON_TOLERANCE_RAD = 0.01 * DEG;

/** The untouched fragment and the station at one time, TEME; `up` is the station's geodetic vertical. */
export interface TrackPoint {
  readonly state: OrbitState;
  /** Gravity on the untouched fragment, km/s². */
  readonly gravity: Vec3;
  readonly siteKm: Vec3;
  readonly up: Vec3;
}

/** The untouched path of a fragment over a station, quick to evaluate anywhere in its span. */
export interface Track {
  readonly fromMs: number;
  readonly toMs: number;
  /** The point at a time within the span. */
  at(atMs: number): TrackPoint;
  /** The point in the middle of the whole UTC second that begins at `second` (Unix seconds), kept. */
  middleOfSecond(second: number): TrackPoint;
}

/** Why there is no track, and which of its inputs is to blame. */
export interface NoTrack {
  readonly ok: false;
  readonly about: "from" | "to" | "orbit";
  readonly reason: string;
}

interface Node {
  readonly state: OrbitState;
  readonly acceleration: Vec3;
}

/**
 * A track from SGP4 states every 10 s, with Hermite interpolation between (acceleration by mass and J2). Refused with a sentence when the span is empty or too long, when
 * propagation fails, or when the fragment is below the station's horizon in it.
 */
export function makeTrack(
  orbit: Orbit,
  frame: SiteFrame,
  fromMs: number,
  toMs: number,
): { ok: true; track: Track } | NoTrack {
  const fault = spanFault(fromMs, toMs);
  if (fault) return { ok: false, about: "to", reason: fault };
  // A second beyond the end, so that the last whole second has a middle.
  const startMs = fromMs - 1000;
  const count = Math.max(1, Math.ceil((toMs + 1000 - startMs) / NODE_SPACING_MS));
  const spacingMs = (toMs + 1000 - startMs) / count;
  const nodes: Node[] = [];
  for (let i = 0; i <= count; i++) {
    const at = orbit.stateAt(startMs + i * spacingMs);
    if (!at.ok) return { ok: false, about: "orbit", reason: at.reason };
    const { x, y, z } = at.state.rKm;
    nodes.push({ state: at.state, acceleration: gravityKmPerS2(x, y, z) });
  }
  const track = trackOf(nodes, startMs, spacingMs, frame, fromMs, toMs);
  const lowMs = firstBelowHorizon(track);
  if (lowMs === null) return { ok: true, track };
  return {
    ok: false,
    about: lowMs === fromMs ? "from" : "to",
    reason: `The fragment is below the station's horizon at ${isoTime(lowMs)}: the model covers elevations from 0 upwards.`,
  };
}

function spanFault(fromMs: number, toMs: number): string | null {
  if (!Number.isFinite(fromMs) || !Number.isFinite(toMs)) return "The times from and to must be dates.";
  if (toMs <= fromMs) return "The time to must be later than from: the span is empty.";
  if (toMs - fromMs > MAX_SPAN_MS) return "The time to may be at most 24 hours after from.";
  return null;
}

function trackOf(
  nodes: readonly Node[],
  startMs: number,
  spacingMs: number,
  frame: SiteFrame,
  fromMs: number,
  toMs: number,
): Track {
  const at = (atMs: number): TrackPoint => {
    const place = (atMs - startMs) / spacingMs;
    const index = Math.max(0, Math.min(nodes.length - 2, Math.floor(place)));
    const [before, after] = [nodes[index], nodes[index + 1]];
    if (!before || !after) throw new RangeError("A track has at least two nodes.");
    const state = interpolate(before, after, place - index, spacingMs / 1000);
    const gravity = gravityKmPerS2(state.rKm.x, state.rKm.y, state.rKm.z);
    return { state, gravity, ...siteAt(frame, atMs) };
  };
  const kept: TrackPoint[] = [];
  const firstSecond = Math.floor(fromMs / 1000);
  return {
    fromMs,
    toMs,
    at,
    middleOfSecond: (second) => {
      const index = second - firstSecond;
      const known = kept[index];
      if (known) return known;
      const point = at(second * 1000 + 500);
      if (index >= 0) kept[index] = point;
      return point;
    },
  };
}

/** Station and vertical in TEME, the vertical turned by the same sidereal angle. */
function siteAt(frame: SiteFrame, atMs: number): { siteKm: Vec3; up: Vec3 } {
  const siteKm = siteStateTeme(frame, atMs).rKm;
  const { positionKm: p, up: u } = frame;
  const level2 = p.x * p.x + p.y * p.y;
  // At a pole the vertical is the axis and does not turn.
  if (level2 === 0) return { siteKm, up: u };
  const c = (p.x * siteKm.x + p.y * siteKm.y) / level2;
  const s = (p.x * siteKm.y - p.y * siteKm.x) / level2;
  return { siteKm, up: { x: c * u.x - s * u.y, y: s * u.x + c * u.y, z: u.z } };
}

/**
 * Position and velocity are interpolated each by itself: SGP4's velocity is not quite the derivative of
 * its position (0.1 m/s apart at e = 0.02), and the mean elements rest on the velocity.
 */
function interpolate(a: Node, b: Node, share: number, spacingS: number): OrbitState {
  const { rKm: rA, vKmPerS: vA } = a.state;
  const { rKm: rB, vKmPerS: vB } = b.state;
  const [gA, gB] = [a.acceleration, b.acceleration];
  return {
    rKm: {
      x: quintic(rA.x, vA.x, gA.x, rB.x, vB.x, gB.x, share, spacingS),
      y: quintic(rA.y, vA.y, gA.y, rB.y, vB.y, gB.y, share, spacingS),
      z: quintic(rA.z, vA.z, gA.z, rB.z, vB.z, gB.z, share, spacingS),
    },
    vKmPerS: {
      x: cubic(vA.x, gA.x, vB.x, gB.x, share, spacingS),
      y: cubic(vA.y, gA.y, vB.y, gB.y, share, spacingS),
      z: cubic(vA.z, gA.z, vB.z, gB.z, share, spacingS),
    },
  };
}

/** First time, to 10 s and at the ends, at which the fragment stands under the horizon; null when it never does. */
function firstBelowHorizon(track: Track): number | null {
  const steps = Math.max(1, Math.ceil((track.toMs - track.fromMs) / NODE_SPACING_MS));
  for (let i = 0; i <= steps; i++) {
    const atMs = track.fromMs + (i * (track.toMs - track.fromMs)) / steps;
    const { state, siteKm, up } = track.at(atMs);
    const [x, y, z] = [state.rKm.x - siteKm.x, state.rKm.y - siteKm.y, state.rKm.z - siteKm.z];
    const sine = (x * up.x + y * up.y + z * up.z) / Math.sqrt(x * x + y * y + z * z);
    if (!(sine >= -Math.sin(HORIZON_TOLERANCE_RAD))) return atMs;
  }
  return null;
}
