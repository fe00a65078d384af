import type { SiteFrame } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { chooseDwell, type DwellLimits } from "./choose-dwell";
import type { Closure } from "./closure";
import { effectOfDwell } from "./effect";
import type { Aim, FragmentBody, PulsedLaser } from "./laser";
import { openingsOf } from "./openings";
import type { PassGeometry, StoredGeometry } from "./pass-geometry";
import { buildProfile, type Profile } from "./profile";
import type { PlannedDwell, StoredPlan } from "./stored-plan";

/** Everything that decides what a pass is worth and which stretch of it is best. */
export interface PlanArgs {
  readonly orbit: Orbit;
  readonly frame: SiteFrame;
  readonly pass: PassGeometry;
  readonly laser: PulsedLaser;
  readonly laserVersion: number;
  readonly body: FragmentBody;
  readonly closures: readonly Closure[];
  readonly limits: DwellLimits;
  readonly aim: Aim;
}

/** Points of the small strip. */
const STRIP_POINTS = 32;

/** Seconds between two points of the worth curve the dwell is chosen on. */
const PROFILE_STEP_S = 2;

/**
 * Works out the strip and the best dwell of a pass. Pure: services that have a database use
 * `replanPasses` (lib/services/replan-passes.ts), which gathers the arguments and stores the result.
 */
export function planPass(args: PlanArgs): StoredPlan {
  const { orbit, frame, pass, laser, body, aim } = args;
  const profiled = buildProfile({
    orbit,
    frame,
    laser,
    body,
    fromMs: pass.riseMs,
    toMs: pass.setMs,
    stepS: PROFILE_STEP_S,
    aim,
  });
  const base = {
    elementSetId: pass.elementSetId,
    laserSettingVersion: args.laserVersion,
    inputs: planInputs(args.laserVersion, body, args.limits, aim),
    geometry: storedGeometry(pass),
  };
  if (!profiled.ok) {
    const strip = { elevationDeg: [], worthPerS: [] };
    return { ...base, aim, aimUnit: "", strip, dwell: null, refusal: profiled.reason };
  }
  const { profile } = profiled;
  const chosen = chooseDwell({
    profile,
    riseMs: pass.riseMs,
    openings: openingsOf(pass, args.closures),
    limits: args.limits,
  });
  const dwell = chosen ? plannedDwell(args, chosen) : null;
  return {
    ...base,
    aim: profile.aim,
    aimUnit: profile.aimUnit,
    strip: stripOf(profile),
    dwell,
    refusal: null,
  };
}

/** The chosen stretch with what it does to the orbit; null when the effect can't be worked out. */
export function plannedDwell(
  args: Pick<PlanArgs, "orbit" | "frame" | "laser" | "body">,
  chosen: { fromMs: number; toMs: number; gain: number },
): PlannedDwell | null {
  const { orbit, frame, laser, body } = args;
  const worked = effectOfDwell({ orbit, frame, laser, body, fromMs: chosen.fromMs, toMs: chosen.toMs });
  if (!worked.ok) return null;
  const { effect } = worked;
  const perigeeM = (afterKm: number) => rounded((effect.perigeeBeforeKm - afterKm) * 1000, 3);
  const axisM = (afterKm: number) => rounded((effect.semiMajorAxisBeforeKm - afterKm) * 1000, 3);
  return {
    fromMs: chosen.fromMs,
    toMs: chosen.toMs,
    perigeeDropM: perigeeM(effect.perigeeAfterKm.p50),
    semiMajorAxisDropM: axisM(effect.semiMajorAxisAfterKm.p50),
    perigeeDropBandM: [perigeeM(effect.perigeeAfterKm.p90), perigeeM(effect.perigeeAfterKm.p10)],
    semiMajorAxisDropBandM: [axisM(effect.semiMajorAxisAfterKm.p90), axisM(effect.semiMajorAxisAfterKm.p10)],
    gain: chosen.gain,
  };
}

/** Everything but the orbit that a plan rests on, as one text: a plan with another text is out of date. */
export function planInputs(laserVersion: number, body: FragmentBody, limits: DwellLimits, aim: Aim): string {
  const { massKg, areaM2, material, couplingNPerW, shape, spinRateHz } = body;
  const { acquisitionS, guardS, minDwellS, maxDwellS, maxPulses, maxEnergyJ, maxHeatingS } = limits;
  return [
    ...[laserVersion, aim, massKg, areaM2, material, couplingNPerW, shape, spinRateHz],
    ...[acquisitionS, guardS, minDwellS, maxDwellS, maxPulses, maxEnergyJ, maxHeatingS],
  ].join("|");
}

function storedGeometry(pass: PassGeometry): StoredGeometry {
  const { stationVersion, belowFloor, aboveCeiling, airspaceKey, volumes } = pass;
  return { stationVersion, belowFloor, aboveCeiling, airspaceKey, volumes };
}

/** Evenly spaced points of the profile, rounded to what a picture shows. */
function stripOf(profile: Profile): StoredPlan["strip"] {
  const { samples } = profile;
  const last = samples.length - 1;
  const elevationDeg: number[] = [];
  const worthPerS: number[] = [];
  for (let i = 0; i < STRIP_POINTS; i++) {
    const sample = samples[Math.round((i * last) / (STRIP_POINTS - 1))];
    if (!sample) continue;
    elevationDeg.push(rounded(sample.elevationDeg, 1));
    worthPerS.push(Number(sample.worthPerS.toPrecision(4)));
  }
  return { elevationDeg, worthPerS };
}

function rounded(value: number, digits: number): number {
  return Number(value.toFixed(digits));
}
