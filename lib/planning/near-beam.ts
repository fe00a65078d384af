import { DEG } from "@/lib/physics/constants";
import { lookAngles, type SiteFrame, temeToEcef } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { screenBeamMany } from "@/lib/physics/screening/beam-cone";
import { angleBetweenRad, subtract } from "@/lib/physics/vector";
import type { Interval } from "./interval";

/** Where an object stands over a station, and how far from the beam, at one time. */
export interface NearSample {
  readonly atMs: number;
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  readonly separationDeg: number;
}

/** An object that comes near the beam, over the stretch in which it is near. */
export interface NearStretch extends Interval {
  /** Its place in the list that was asked about. */
  readonly index: number;
  readonly minSeparationDeg: number;
  readonly minSeparationAtMs: number;
  readonly samples: readonly NearSample[];
}

/** Samples of one stretch, both ends and the nearest moment besides. */
const SAMPLES = 40;

/**
 * Objects that come within some angle (radians, one per object) of the line from a station through a
 * fragment, with their paths over the station; found by the screening itself, sampled on SGP4. `failed`
 * has the places of those that could not be looked at.
 */
export function nearBeam(args: {
  readonly frame: SiteFrame;
  readonly target: Orbit;
  readonly others: readonly { readonly orbit: Orbit; readonly withinRad: number }[];
  readonly fromMs: number;
  readonly toMs: number;
}): { readonly near: NearStretch[]; readonly failed: number[] } {
  const { frame, target, others, fromMs, toMs } = args;
  const screenings = screenBeamMany({
    frame,
    target,
    others: others.map(({ orbit, withinRad }) => ({ orbit, halfAngleRad: () => withinRad })),
    fromMs,
    toMs,
  });
  const near: NearStretch[] = [];
  const failed: number[] = [];
  for (const [index, screening] of screenings.entries()) {
    const orbit = others[index]?.orbit;
    if (!screening.ok || !orbit) {
      failed.push(index);
      continue;
    }
    for (const crossing of screening.crossings) {
      near.push({
        index,
        fromMs: crossing.fromMs,
        toMs: crossing.toMs,
        minSeparationDeg: crossing.minSeparationRad / DEG,
        minSeparationAtMs: crossing.minSeparationAtMs,
        samples: timesOf(crossing).flatMap((atMs) => sampleAt(frame, target, orbit, atMs)),
      });
    }
  }
  return { near, failed };
}

function timesOf(crossing: Interval & { minSeparationAtMs: number }): number[] {
  const { fromMs, toMs, minSeparationAtMs } = crossing;
  const times = Array.from({ length: SAMPLES + 1 }, (_, i) => fromMs + (i * (toMs - fromMs)) / SAMPLES);
  return [...new Set([...times, minSeparationAtMs])].sort((a, b) => a - b);
}

/** One sample; none where SGP4 fails, which the screening has told by then. */
function sampleAt(frame: SiteFrame, target: Orbit, other: Orbit, atMs: number): NearSample[] {
  const [a, b] = [target.stateAt(atMs), other.stateAt(atMs)];
  if (!a.ok || !b.ok) return [];
  const [beam, object] = [temeToEcef(a.state, atMs), temeToEcef(b.state, atMs)];
  const look = lookAngles(frame, object);
  const separationRad = angleBetweenRad(
    subtract(beam.rKm, frame.positionKm),
    subtract(object.rKm, frame.positionKm),
  );
  return [
    {
      atMs,
      azimuthDeg: look.azimuthRad / DEG,
      elevationDeg: look.elevationRad / DEG,
      separationDeg: separationRad / DEG,
    },
  ];
}
