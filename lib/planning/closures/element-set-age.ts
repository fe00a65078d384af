import type { Closure } from "../closure";
import { intersect, subtract } from "../interval";
import { alongTrackErrorKm } from "../keep-out";
import type { PassFacts } from "../pass-facts";
import type { PassGeometry } from "../pass-geometry";
import { spanWords, timeWords, trimmed } from "../words";
import { type Rule, wholePass } from "./rule";

const HOUR_MS = 3_600_000;

/**
 * The element set must be fresh at the dwell: past the station's limit it is pending, since a fresher one
 * can still come; past twice the limit its error is not known well enough and the rule reads not checked.
 */
export const elementSetAge: Rule = (pass, facts) => {
  const limitMs = facts.station.elementAgeLimitH * HOUR_MS;
  const { usedEpochMs } = facts.elements;
  const fresh = { fromMs: usedEpochMs - limitMs, toMs: usedEpochMs + limitMs + 1 };
  const near = { fromMs: usedEpochMs - 2 * limitMs, toMs: usedEpochMs + 2 * limitMs + 1 };
  const pending = subtract(wholePass(pass), [fresh]).flatMap((stale) => intersect(stale, near) ?? []);
  const unknown = subtract(wholePass(pass), [near]);
  return [
    ...replaced(pass, facts),
    ...pending.map((span) => ({ ...span, ...aged(pass, facts, "pending") })),
    ...unknown.map((span) => ({ ...span, ...aged(pass, facts, "not checked") })),
  ];
};

function common({ elements }: PassFacts): Pick<Closure, "rule" | "input" | "liftedBy"> {
  return {
    rule: "element-set age",
    input: `element set of ${timeWords(elements.usedEpochMs)}, ${elements.usedSource}`,
    liftedBy: `a fresher element set of ${elements.fragmentName}`,
  };
}

/** The pass rests on a set that is no longer the newest: the sweep that follows an import mends it. */
function replaced(pass: PassGeometry, facts: PassFacts): Closure[] {
  const { newestEpochMs, usedEpochMs } = facts.elements;
  if (newestEpochMs <= usedEpochMs) return [];
  return [
    {
      ...common(facts),
      ...wholePass(pass),
      verdict: "pending",
      cause: `A newer element set of ${timeWords(newestEpochMs)} has come in; the pass still rests on the one of ${timeWords(usedEpochMs)}.`,
      label: "newer element set",
      liftedBy: "the sweep that is under way",
      overridable: false,
    },
  ];
}

function aged(
  pass: PassGeometry,
  facts: PassFacts,
  verdict: "pending" | "not checked",
): Omit<Closure, "fromMs" | "toMs"> {
  const { station, elements } = facts;
  const age = spanWords(pass.culminateMs - elements.usedEpochMs);
  const limit = spanWords(station.elementAgeLimitH * HOUR_MS);
  const errorKm = trimmed(alongTrackErrorKm(elements.usedEpochMs, pass.culminateMs), 1);
  const cause =
    verdict === "pending"
      ? `The element set is ${age} old at this pass (${station.name} takes ${limit}); some ${errorKm} km along the track.`
      : `The element set is ${age} old at this pass, more than twice the ${limit} that ${station.name} takes.`;
  const label = `element set ${age} old`;
  return { ...common(facts), verdict, cause, label, overridable: verdict === "not checked" };
}
