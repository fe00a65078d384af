import type { SiteFrame } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { chooseDwell, type DwellLimits } from "./choose-dwell";
import type { Closure } from "./closure";
import { type Effect, effectOnTrack } from "./effect";
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

/** Of the time to melting only this share is used: the worth curve samples the heat coarsely. */
const MELT_SHARE = 0.95;

/**
 * A planned dwell keeps so much more from rise and from every edge than it must: the next element set
 * moves the edges by some tenths of a second, and a booked engagement should not fall for that, s.
 */
const ACQUISITION_ALLOWANCE_S = 2;
const EDGE_ALLOWANCE_S = 1;

/**
 * Works out the strip and the best dwell of a pass. Pure: services that have a database use
 * `replanPasses` (lib/services/replan-passes.ts), which gathers the arguments and stores the result.
 */
export function planPass(args: PlanArgs): StoredPlan {
  const { orbit, frame, pass, laser, body, aim, limits } = args;
  const base = {
    elementSetId: pass.elementSetId,
    laserSettingVersion: args.laserVersion,
    inputs: planInputs(args.laserVersion, body, limits, aim),
    geometry: storedGeometry(pass),
  };
  const span = { fromMs: pass.riseMs, toMs: pass.setMs };
  const profiled = buildProfile({ orbit, frame, laser, body, ...span, stepS: PROFILE_STEP_S, aim });
  if (!profiled.ok) return { ...base, ...nothing(aim), refusal: profiled.reason };
  const { profile } = profiled;
  const planned = { ...base, aim: profile.aim, aimUnit: profile.aimUnit, strip: stripOf(profile) };
  const meltS = profile.meltOnsetS === null ? null : profile.meltOnsetS * MELT_SHARE;
  if (meltS !== null && meltS < limits.minDwellS) {
    return { ...planned, dwell: null, refusal: meltRefusal(meltS, limits) };
  }
  const chosen = chooseDwell({
    profile,
    riseMs: pass.riseMs,
    openings: openingsOf(pass, args.closures),
    limits: {
      ...limits,
      acquisitionS: limits.acquisitionS + ACQUISITION_ALLOWANCE_S,
      guardS: limits.guardS + EDGE_ALLOWANCE_S,
      maxHeatingS: least(limits.maxHeatingS, meltS),
    },
  });
  return { ...planned, dwell: chosen ? plannedDwell(profile, chosen) : null, refusal: null };
}

function nothing(aim: Aim): Pick<StoredPlan, "aim" | "aimUnit" | "strip" | "dwell"> {
  return { aim, aimUnit: "", strip: { elevationDeg: [], worthPerS: [] }, dwell: null };
}

function meltRefusal(meltS: number, limits: DwellLimits): string {
  return `The fragment may reach its melting point after ${meltS.toFixed(1)} s of lasing, and the shortest dwell is ${limits.minDwellS} s.`;
}

function least(a: number | null, b: number | null): number | null {
  if (a === null) return b;
  return b === null ? a : Math.min(a, b);
}

/** The chosen stretch with what it does to the orbit; null when the effect can't be worked out. */
function plannedDwell(
  profile: Profile,
  chosen: { fromMs: number; toMs: number; gain: number },
): PlannedDwell | null {
  const { laser, body } = profile;
  const worked = effectOnTrack(profile.track, { laser, body, fromMs: chosen.fromMs, toMs: chosen.toMs });
  return worked.ok ? { ...chosen, ...dropsOf(worked.effect) } : null;
}

/** How far perigee and semi-major axis come down, metres, with the smallest and largest drop of the band. */
export function dropsOf(
  effect: Pick<
    Effect,
    "perigeeBeforeKm" | "perigeeAfterKm" | "semiMajorAxisBeforeKm" | "semiMajorAxisAfterKm"
  >,
): Pick<PlannedDwell, "perigeeDropM" | "semiMajorAxisDropM" | "perigeeDropBandM" | "semiMajorAxisDropBandM"> {
  const perigeeM = (afterKm: number) => rounded((effect.perigeeBeforeKm - afterKm) * 1000, 3);
  const axisM = (afterKm: number) => rounded((effect.semiMajorAxisBeforeKm - afterKm) * 1000, 3);
  const { perigeeAfterKm, semiMajorAxisAfterKm } = effect;
  return {
    perigeeDropM: perigeeM(perigeeAfterKm.p50),
    semiMajorAxisDropM: axisM(semiMajorAxisAfterKm.p50),
    perigeeDropBandM: [perigeeM(perigeeAfterKm.p90), perigeeM(perigeeAfterKm.p10)],
    semiMajorAxisDropBandM: [axisM(semiMajorAxisAfterKm.p90), axisM(semiMajorAxisAfterKm.p10)],
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
  const {
    stationVersion,
    belowFloor,
    aboveCeiling,
    belowMask = [],
    tooFast = [],
    airspaceKey,
    volumes,
  } = pass;
  return { stationVersion, belowFloor, aboveCeiling, belowMask, tooFast, airspaceKey, volumes };
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
