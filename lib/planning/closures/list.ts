import type { Closure } from "../closure";
import type { PassFacts } from "../pass-facts";
import type { PassGeometry } from "../pass-geometry";
import { airspace } from "./airspace";
import { authorityAnswers } from "./authority-answers";
import { elementSetAge } from "./element-set-age";
import { firedUpon } from "./fired-upon";
import { otherEngagements } from "./other-engagements";
import { protectedObjects } from "./protected-objects";
import type { Rule } from "./rule";
import { stationHours } from "./station-hours";
import { timePassed } from "./time-passed";
import { visibility } from "./visibility";

/** Every rule. Adding one is adding its file and its line here; its name goes into closure.ts. */
export const RULES: readonly Rule[] = [
  visibility,
  stationHours,
  protectedObjects,
  airspace,
  elementSetAge,
  otherEngagements,
  authorityAnswers,
  firedUpon,
  timePassed,
];

/** Rules whose findings rest on geometry and settings alone: a stored plan is made under these. */
export const STANDING_RULES: readonly Rule[] = [visibility, stationHours, protectedObjects, airspace];

/**
 * Everything that the rules do not leave open in a pass, cut to the pass (with a dwell: to pass and dwell
 * together), in the order of the rules and then of time.
 */
export function closuresOf(pass: PassGeometry, facts: PassFacts, rules: readonly Rule[] = RULES): Closure[] {
  const fromMs = Math.min(pass.riseMs, facts.dwell?.fromMs ?? pass.riseMs);
  const toMs = Math.max(pass.setMs, facts.dwell?.toMs ?? pass.setMs);
  const closures: Closure[] = [];
  for (const rule of rules) {
    const found = rule(pass, facts)
      .map((c) => ({ ...c, fromMs: Math.max(c.fromMs, fromMs), toMs: Math.min(c.toMs, toMs) }))
      .filter((c) => c.fromMs < c.toMs)
      .sort((a, b) => a.fromMs - b.fromMs);
    closures.push(...found);
  }
  return closures;
}
