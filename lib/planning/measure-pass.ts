import { DEG } from "@/lib/physics/constants";
import { lookAngles, temeToEcef } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { airspaceKey, type PlacedVolume, type StationMap } from "./airspace";
import { type Pointing, volumeSpans } from "./airspace-stretches";
import { highestMaskDeg, type MaskStep } from "./horizon-mask";
import { type Interval, merge } from "./interval";
import type { PassGeometry } from "./pass-geometry";

/** The elevation limits of a station, with the version that has them. */
export interface ElevationLimits {
  readonly version: number;
  readonly minElevationDeg: number;
  readonly maxElevationDeg: number;
  readonly horizonMask?: readonly MaskStep[];
  readonly maxAzimuthRateDegPerS?: number | null;
}

/** Where the beam points, and how fast the mount turns in azimuth. */
interface Sight extends Pointing {
  readonly azimuthRateRadPerS: number;
}

/** Rise and set are kept to a millisecond; so much under the floor is not a finding, degrees. */
const FLOOR_TOLERANCE_DEG = 0.002;

/** Longest step between two samples of a pass, ms. */
const STEP_MS = 1000;

/**
 * Measures a pass for the rules: where it leaves the station's elevation limits, and where the beam runs
 * through each of the given volumes (all that the station can reach). Refused with a sentence when the
 * orbit gives no state somewhere in the pass.
 */
export function measurePass(args: {
  readonly orbit: Orbit;
  readonly elementSetId: string;
  readonly map: StationMap;
  readonly limits: ElevationLimits;
  readonly volumes: readonly PlacedVolume[];
  readonly pass: {
    readonly riseMs: number;
    readonly culminateMs: number;
    readonly setMs: number;
    readonly maxElevationDeg: number;
  };
}): { ok: true; geometry: PassGeometry } | { ok: false; reason: string } {
  const { orbit, map, limits, volumes, pass } = args;
  const pointed = pointings(orbit, map, sampleTimes(pass));
  if (!pointed.ok) return pointed;
  const { samples } = pointed;
  const pointingAt = (atMs: number): Sight => pointing(orbit, map, atMs) ?? nearest(samples, atMs);
  const elevationDeg = (p: Sight) => p.elevationRad / DEG;
  const outside = (isOut: (p: Sight) => boolean) => spansWhere(samples, pointingAt, isOut);
  const geometry: PassGeometry = {
    elementSetId: args.elementSetId,
    riseMs: pass.riseMs,
    culminateMs: pass.culminateMs,
    setMs: pass.setMs,
    maxElevationDeg: pass.maxElevationDeg,
    stationVersion: limits.version,
    belowFloor: outside((p) => elevationDeg(p) < limits.minElevationDeg - FLOOR_TOLERANCE_DEG),
    aboveCeiling: outside((p) => elevationDeg(p) > limits.maxElevationDeg),
    belowMask: outside((p) => elevationDeg(p) < maskAround(limits.horizonMask ?? [], p)),
    tooFast: outside((p) => Math.abs(p.azimuthRateRadPerS) / DEG > fastestOf(limits)),
    airspaceKey: airspaceKey(volumes),
    volumes: volumes
      .map((volume) => ({ volumeId: volume.id, spans: volumeSpans({ map, volume, samples, pointingAt }) }))
      .filter((found) => found.spans.length > 0),
  };
  return { ok: true, geometry };
}

/**
 * The highest horizon over all azimuths that the beam passes within half a step to both sides: a tooth of the
 * mask narrower than a step can't hide between two samples; it closes up to half a second more.
 */
function maskAround(mask: readonly MaskStep[], at: Sight): number {
  const aroundDeg = (Math.abs(at.azimuthRateRadPerS) / DEG) * (STEP_MS / 2000);
  return highestMaskDeg(mask, at.azimuthRad / DEG, aroundDeg);
}

function fastestOf(limits: ElevationLimits): number {
  return limits.maxAzimuthRateDegPerS ?? Number.POSITIVE_INFINITY;
}

/** From rise to set at equal steps of at most a second, and the culmination, so that no peak hides. */
function sampleTimes(pass: { riseMs: number; culminateMs: number; setMs: number }): number[] {
  const steps = Math.max(1, Math.ceil((pass.setMs - pass.riseMs) / STEP_MS));
  const times = [pass.culminateMs];
  for (let i = 0; i <= steps; i++) times.push(pass.riseMs + ((pass.setMs - pass.riseMs) * i) / steps);
  return times.sort((a, b) => a - b);
}

function pointings(
  orbit: Orbit,
  map: StationMap,
  times: readonly number[],
): { ok: true; samples: Sight[] } | { ok: false; reason: string } {
  const samples: Sight[] = [];
  for (const atMs of times) {
    const found = orbit.stateAt(atMs);
    if (!found.ok) return found;
    const look = lookAngles(map.frame, temeToEcef(found.state, atMs));
    const { azimuthRad, elevationRad, azimuthRateRadPerS } = look;
    samples.push({ atMs, azimuthRad, elevationRad, azimuthRateRadPerS });
  }
  return { ok: true, samples };
}

function pointing(orbit: Orbit, map: StationMap, atMs: number): Sight | null {
  const found = pointings(orbit, map, [atMs]);
  return found.ok ? (found.samples[0] ?? null) : null;
}

/** Stands in where the orbit has no state between two that it has. */
function nearest(samples: readonly Sight[], atMs: number): Sight {
  return samples.reduce((best, next) =>
    Math.abs(next.atMs - atMs) < Math.abs(best.atMs - atMs) ? next : best,
  );
}

/** Stretches of samples where the condition holds, edges halved to 0.1 s and laid on the outer side. */
function spansWhere(
  samples: readonly Sight[],
  pointingAt: (atMs: number) => Sight,
  holds: (pointing: Sight) => boolean,
): Interval[] {
  const spans: Interval[] = [];
  for (const [i, to] of samples.entries()) {
    const from = samples[i - 1];
    if (!from) continue;
    const [before, after] = [holds(from), holds(to)];
    if (before && after) spans.push({ fromMs: from.atMs, toMs: to.atMs });
    else if (before) spans.push({ fromMs: from.atMs, toMs: edgeMs(from, to, pointingAt, holds) });
    else if (after) spans.push({ fromMs: edgeMs(to, from, pointingAt, holds), toMs: to.atMs });
  }
  return merge(spans);
}

/** Halves between a sample where the condition holds and one where it doesn't; the outer side of the edge. */
function edgeMs(
  inside: Sight,
  outside: Sight,
  pointingAt: (atMs: number) => Sight,
  holds: (pointing: Sight) => boolean,
): number {
  let [innerMs, outerMs] = [inside.atMs, outside.atMs];
  while (Math.abs(outerMs - innerMs) > 100) {
    const middleMs = (innerMs + outerMs) / 2;
    if (holds(pointingAt(middleMs))) innerMs = middleMs;
    else outerMs = middleMs;
  }
  return outerMs;
}
