import type { Closure } from "../closure";
import type { EngagementFacts, PassFacts } from "../pass-facts";
import { timeWords } from "../words";
import type { Rule } from "./rule";

/**
 * What live engagements hold: at the same station their dwell with slew and cool-down on both sides, and
 * the bare dwell of the same fragment elsewhere. The database holds the same two exclusions.
 */
export const otherEngagements: Rule = (_pass, facts) =>
  facts.engagements
    .filter((engagement) => engagement.id !== facts.own?.engagementId)
    .flatMap((engagement) => {
      const closures: Closure[] = [];
      if (engagement.stationId === facts.station.id) closures.push(sameStation(engagement, facts));
      else if (engagement.fragmentId === facts.fragmentId) closures.push(sameFragment(engagement));
      return closures;
    });

function common(
  engagement: EngagementFacts,
): Pick<Closure, "rule" | "verdict" | "label" | "input" | "liftedBy" | "overridable"> {
  const number = `E-${engagement.number}`;
  return {
    rule: "other engagements",
    verdict: "closed",
    label: `${number} (${engagement.state})`,
    input: `engagement ${number}, version ${engagement.version}`,
    liftedBy: `scrubbing or moving ${number}`,
    overridable: false,
  };
}

/** A dwell here needs its own cool-down before the other's slew and its own slew after its cool-down. */
function sameStation(engagement: EngagementFacts, facts: PassFacts): Closure {
  const { station } = facts;
  const dwell = `${timeWords(engagement.dwell.fromMs)} to ${timeWords(engagement.dwell.toMs)}`;
  return {
    ...common(engagement),
    fromMs: engagement.hold.fromMs - station.coolDownS * 1000,
    toMs: engagement.hold.toMs + station.slewS * 1000,
    cause: `E-${engagement.number} of ${engagement.plannerName} holds ${station.name} for its dwell from ${dwell}, with ${station.slewS} s slew and ${station.coolDownS} s cool-down.`,
  };
}

function sameFragment(engagement: EngagementFacts): Closure {
  return {
    ...common(engagement),
    ...engagement.dwell,
    cause: `E-${engagement.number} of ${engagement.plannerName} lases the same fragment from ${engagement.stationName} at that time.`,
  };
}
