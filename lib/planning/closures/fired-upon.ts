import { timeWords } from "../words";
import type { Rule } from "./rule";

/** After a firing the old orbit no longer holds: later seconds wait for an element set with a later epoch. */
export const firedUpon: Rule = (pass, facts) => {
  const { elements } = facts;
  const last = facts.firings.reduce<(typeof facts.firings)[number] | null>(
    (latest, next) => (latest && latest.closedMs >= next.closedMs ? latest : next),
    null,
  );
  if (!last || elements.newestEpochMs > last.closedMs || pass.setMs <= last.closedMs) return [];
  return [
    {
      fromMs: Math.max(pass.riseMs, last.closedMs),
      toMs: pass.setMs,
      rule: "fired upon",
      verdict: "pending",
      cause: `${elements.fragmentName} was lased until ${timeWords(last.closedMs)} (E-${last.engagementNumber}, ${last.outcome}); its newest element set of ${timeWords(elements.newestEpochMs)} is from before.`,
      label: "fired upon",
      input: `firing record of E-${last.engagementNumber}`,
      liftedBy: `an element set with an epoch after ${timeWords(last.closedMs)}`,
      overridable: false,
    },
  ];
};
