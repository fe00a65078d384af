import { deviated } from "@/lib/physics/effect/accumulate";
import { fitElements } from "@/lib/physics/effect/fit-elements";
import { makeTrack } from "@/lib/physics/effect/track";
import type { SiteFrame } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { type CloseApproach, closeApproaches } from "@/lib/physics/screening/close-approach";
import { discProbability, encounterPlane } from "@/lib/physics/screening/collision-probability";
import {
  addCovariances,
  assumedRadiusM,
  covarianceOf,
  elementSetSigmas,
  fragmentRadiusM,
  nudgedSigmas,
  type Sigmas,
} from "./assumed-covariance";
import { nudgeOf } from "./dwell-nudge";
import { makeShots } from "./dwell-shots";
import { isUsableSet, type ProtectedClass } from "./keep-out";
import { bodyFault, type FragmentBody, laserFault, type PulsedLaser } from "./laser";

/** The two ways that a fragment may go after a dwell. */
export type AfterPath = "nudged" | "untouched";

/** A protected object as the days after a dwell are screened against it. */
export interface AfterObject {
  readonly id: string;
  readonly name: string;
  readonly class: ProtectedClass;
  readonly orbit: Orbit;
}

/** A protected object that comes nearer than the threshold. */
export interface AfterApproach {
  readonly objectId: string;
  readonly path: AfterPath;
  readonly atMs: number;
  readonly missKm: number;
  readonly relativeSpeedKmPerS: number;
  /** Under the assumed covariance; null where it gives no number. */
  readonly probability: number | null;
  readonly atEdge: boolean;
}

/** The fragment lased and left alone, both from the end of the dwell on. */
export interface AfterPaths {
  readonly dwellEndMs: number;
  /** By the element set fitted to the state that the dwell leaves. */
  readonly nudged: Orbit;
  /** By its own element set. */
  readonly untouched: Orbit;
}

/** Both ways of the fragment; refused with a sentence where the models don't cover the dwell. */
export function pathsAfter(args: {
  readonly orbit: Orbit;
  readonly frame: SiteFrame;
  readonly laser: PulsedLaser;
  readonly body: FragmentBody;
  readonly fromMs: number;
  readonly toMs: number;
}): { readonly ok: true; readonly paths: AfterPaths } | { readonly ok: false; readonly reason: string } {
  const { orbit, frame, laser, body, fromMs, toMs } = args;
  const fault = laserFault(laser) ?? bodyFault(body, laser.pulseWidthNs);
  if (fault) return { ok: false, reason: fault.reason };
  const made = makeTrack(orbit, frame, fromMs, toMs);
  if (!made.ok) return made;
  const nudge = nudgeOf(made.track, makeShots(laser, body), fromMs, toMs);
  if (!nudge) return { ok: false, reason: "The dwell is so strong that the orbit would open." };
  const end = orbit.stateAt(toMs);
  if (!end.ok) return end;
  const fit = fitElements(deviated(end.state, nudge.deviation), toMs, orbit.elements);
  if (!fit.ok) return fit;
  return { ok: true, paths: { dwellEndMs: toMs, nudged: fit.orbit, untouched: orbit } };
}

/**
 * Close approaches of both ways with each object within [from, to), with the 2-D collision probability under
 * the assumed covariance. `unseen` says of whom nothing could be found out, and why: never taken as far away.
 */
export function screenAfter(args: {
  readonly paths: AfterPaths;
  readonly objects: readonly AfterObject[];
  readonly fromMs: number;
  readonly toMs: number;
  readonly thresholdKm: number;
  readonly areaM2: number;
  /** Band of the semi-major axis after the dwell, km. */
  readonly axisBandKm: { readonly p10: number; readonly p90: number };
}): { readonly approaches: AfterApproach[]; readonly unseen: string[] } {
  const { paths, fromMs, toMs, thresholdKm } = args;
  const approaches: AfterApproach[] = [];
  const unseen = new Map<string, string>();
  const usable = args.objects.filter(({ name, orbit }) => {
    const fit = isUsableSet(orbit.elements.epochMs, toMs);
    if (!fit) unseen.set(name, "its newest element set is too old");
    return fit;
  });
  for (const path of ["nudged", "untouched"] as const) {
    const others = usable.map(({ orbit }) => orbit);
    const screenings = closeApproaches({ primary: paths[path], others, fromMs, toMs, thresholdKm });
    for (const [i, screening] of screenings.entries()) {
      const object = usable[i];
      if (!object) continue;
      if (!screening.ok) unseen.set(object.name, screening.reason);
      else approaches.push(...screening.approaches.map((near) => judged(args, path, object, near)));
    }
  }
  approaches.sort((a, b) => a.atMs - b.atMs);
  return { approaches, unseen: [...unseen].map(([name, why]) => `${name}: ${why}`) };
}

function judged(
  args: Parameters<typeof screenAfter>[0],
  path: AfterPath,
  object: AfterObject,
  near: CloseApproach,
): AfterApproach {
  const { atMs, missKm, relativeSpeedKmPerS, atEdge } = near;
  const probability = probabilityOf(args, path, object, near);
  return { objectId: object.id, path, atMs, missKm, relativeSpeedKmPerS, probability, atEdge };
}

function probabilityOf(
  args: Parameters<typeof screenAfter>[0],
  path: AfterPath,
  object: AfterObject,
  near: CloseApproach,
): number | null {
  const { paths, areaM2 } = args;
  const [own, other] = [paths[path].stateAt(near.atMs), object.orbit.stateAt(near.atMs)];
  // At an end of the time the objects are not at their nearest: the plane has no meaning there.
  if (!own.ok || !other.ok || near.atEdge) return null;
  const covariance = addCovariances(
    covarianceOf(own.state, fragmentSigmas(args, path, near.atMs)),
    covarianceOf(other.state, elementSetSigmas(object.orbit.elements.epochMs, near.atMs)),
  );
  const radiusKm = (fragmentRadiusM(areaM2) + assumedRadiusM(object.class)) / 1000;
  const probability = discProbability(
    encounterPlane(near.relativeKm, near.relativeKmPerS, covariance, radiusKm),
  );
  return Number.isFinite(probability) ? probability : null;
}

function fragmentSigmas(args: Parameters<typeof screenAfter>[0], path: AfterPath, atMs: number): Sigmas {
  const { paths, axisBandKm } = args;
  // The fitted set is as old as the set it came from.
  const { epochMs } = paths.untouched.elements;
  if (path === "untouched") return elementSetSigmas(epochMs, atMs);
  const { periodS } = paths.nudged;
  return nudgedSigmas({ epochMs, atMs, dwellEndMs: paths.dwellEndMs, periodS, axisBandKm });
}
