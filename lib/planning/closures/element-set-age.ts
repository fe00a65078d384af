import type { Closure } from "../closure";
import { subtract } from "../interval";
import { alongTrackErrorKm } from "../keep-out";
import { spanWords, timeWords, trimmed } from "../words";
import { type Rule, wholePass } from "./rule";

const HOUR_MS = 3_600_000;

/**
 * The element set must be fresh at the dwell: past the station's limit it is pending, since a fresher one
 * can still come; past twice the limit its error is not known well enough and the rule reads not checked.
 */
export const elementSetAge: Rule = (pass, facts) => {
  const { station, elements } = facts;
  const limitMs = station.elementAgeLimitH * HOUR_MS;
  const whole = wholePass(pass);
  const around = (spanMs: number) => ({
    fromMs: elements.usedEpochMs - spanMs,
    toMs: elements.usedEpochMs + spanMs + 1,
  });
  const stale = subtract(whole, [around(limitMs)]);
  const common = {
    rule: "element-set age",
    input: `element set of ${timeWords(elements.usedEpochMs)}, ${elements.usedSource}`,
    liftedBy: `a fresher element set of ${elements.fragmentName}`,
  } as const;
  const age = spanWords(pass.culminateMs - elements.usedEpochMs);
  const errorKm = trimmed(alongTrackErrorKm(elements.usedEpochMs, pass.culminateMs), 1);
  const limits = `${station.name} takes ${spanWords(limitMs)}`;
  const closures: Closure[] = [];
  if (elements.newestEpochMs > elements.usedEpochMs) {
    closures.push({
      ...common,
      ...whole,
      verdict: "pending",
      cause: `A newer element set of ${timeWords(elements.newestEpochMs)} has come in; the pass still rests on the one of ${timeWords(elements.usedEpochMs)}.`,
      label: "newer element set",
      liftedBy: "the sweep that is under way",
      overridable: false,
    });
  }
  for (const span of stale.flatMap((part) => subtract(part, subtract(whole, [around(2 * limitMs)])))) {
    closures.push({
      ...common,
      ...span,
      verdict: "pending",
      cause: `The element set is ${age} old at this pass (${limits}); some ${errorKm} km along the track.`,
      label: `element set ${age} old`,
      overridable: false,
    });
  }
  for (const span of subtract(whole, [around(2 * limitMs)])) {
    closures.push({
      ...common,
      ...span,
      verdict: "not checked",
      cause: `The element set is ${age} old at this pass, more than twice the ${spanWords(limitMs)} that ${station.name} takes.`,
      label: `element set ${age} old`,
      overridable: true,
    });
  }
  return closures;
};
