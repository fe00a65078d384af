import type { Closure } from "../closure";
import { USABLE_SET_DAYS } from "../keep-out";
import type { CrossingFacts, PassFacts, ProtectedFacts } from "../pass-facts";
import { degreeWords, spanWords, timeWords, trimmed } from "../words";
import { type Rule, wholePass } from "./rule";

/**
 * The keep-out cones of protected objects along the beam, at any range. What was not screened is never
 * taken as free; a crewed spacecraft that can't be screened closes the whole pass, and nobody lifts that.
 */
export const protectedObjects: Rule = (pass, facts) => {
  const whole = wholePass(pass);
  const closures: Closure[] = unscreened(facts).map((finding) => ({
    ...whole,
    rule: "protected objects",
    verdict: "not checked",
    overridable: false,
    ...finding,
  }));
  for (const object of facts.screening.gaps) closures.push({ ...whole, ...gap(object) });
  for (const crossing of facts.screening.crossings) closures.push(crossed(crossing, facts));
  return closures;
};

/** Why the screening as a whole says nothing, or nothing any more; empty when it holds. */
function unscreened(facts: PassFacts): Pick<Closure, "cause" | "label" | "input" | "liftedBy">[] {
  const { screenedAtMs, catalogueChangedAtMs, crewedCount } = facts.screening;
  const input = screenedAtMs === null ? "no screening" : `screening of ${timeWords(screenedAtMs)}`;
  const findings: Pick<Closure, "cause" | "label" | "input" | "liftedBy">[] = [];
  if (screenedAtMs === null) {
    const cause = "The pass has not been screened against the protected objects.";
    findings.push({ cause, label: "not screened", input, liftedBy: "the screening that a sweep does" });
  } else if (catalogueChangedAtMs !== null && catalogueChangedAtMs > screenedAtMs) {
    const cause = `The protected objects changed at ${timeWords(catalogueChangedAtMs)}, after the screening of ${timeWords(screenedAtMs)}.`;
    findings.push({ cause, label: "screening outdated", input, liftedBy: "the next screening" });
  }
  if (crewedCount === 0) {
    const cause = "No crewed spacecraft is on record, so none could be screened.";
    const liftedBy = "importing the element sets of the crewed spacecraft";
    findings.push({ cause, label: "no crewed list", input: "protected objects, class crewed", liftedBy });
  }
  return findings;
}

/** An object without a usable element set. */
function gap(object: ProtectedFacts): Omit<Closure, "fromMs" | "toMs"> {
  const common = {
    rule: "protected objects",
    input: `protected object ${object.name}, version ${object.version}`,
    label: `${object.class} ${object.name}, no orbit`,
    liftedBy: `an element set of ${object.name} within ${USABLE_SET_DAYS} d of the pass`,
  } as const;
  if (object.class === "crewed") {
    const cause = `The crewed spacecraft ${object.name} has no element set within ${USABLE_SET_DAYS} d of the pass, so its place is unknown.`;
    return { ...common, verdict: "closed", cause, overridable: false };
  }
  const cause = `${capital(object.class)} ${object.name} has no element set within ${USABLE_SET_DAYS} d of the pass and was not screened.`;
  return { ...common, verdict: "not checked", cause, overridable: true };
}

/** A crossing with its separation and what is kept free. */
function crossed(crossing: CrossingFacts, facts: PassFacts): Closure {
  const { object, minSeparationDeg, halfAngleDeg, addedDeg } = crossing;
  const targetAge = spanWords(crossing.fromMs - facts.elements.usedEpochMs);
  const objectAge = spanWords(crossing.fromMs - crossing.objectEpochMs);
  const separation = degreeWords(minSeparationDeg);
  const kept = `keeps ${degreeWords(halfAngleDeg)} + ${trimmed(addedDeg, 2)}° for element sets of ${targetAge} and ${objectAge}`;
  return {
    fromMs: crossing.fromMs,
    toMs: crossing.toMs,
    rule: "protected objects",
    verdict: "closed",
    cause: `${capital(object.class)} ${object.name} comes within ${separation} of the beam (${kept}).`,
    label: `${object.class} ${object.name}, ${separation}`,
    input: `protected object ${object.name}, version ${object.version}, element set of ${timeWords(crossing.objectEpochMs)}`,
    liftedBy:
      object.class === "crewed"
        ? "nothing: crewed spacecraft are never lifted"
        : "an element set that moves the crossing elsewhere",
    overridable: false,
  };
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
