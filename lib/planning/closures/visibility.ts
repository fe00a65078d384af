import type { Closure } from "../closure";
import { subtract } from "../interval";
import type { PassFacts } from "../pass-facts";
import type { PassGeometry } from "../pass-geometry";
import { degreeWords, timeWords } from "../words";
import { type Rule, wholePass } from "./rule";

/** Elevation floor and ceiling of the station, its horizon mask and its mount; nothing outside rise and set; nothing for a vanished pass. */
export const visibility: Rule = (pass, facts) => {
  const { station } = facts;
  const common = {
    rule: "visibility",
    input: `station ${station.name}, version ${station.version}`,
    overridable: false,
  } as const;
  if (facts.vanishedAtMs !== null) {
    return [
      {
        ...common,
        ...(facts.dwell ?? wholePass(pass)),
        verdict: "closed",
        cause: `Since ${timeWords(facts.vanishedAtMs)} the newest element set shows no such pass.`,
        label: "no such pass",
        input: `element set of ${timeWords(facts.elements.newestEpochMs)}, ${facts.elements.newestSource}`,
        liftedBy: "an element set that shows the pass again",
      },
    ];
  }
  const closures: Closure[] = [];
  if (pass.stationVersion !== station.version) {
    closures.push({
      ...common,
      ...wholePass(pass),
      verdict: "not checked",
      cause: `The elevation limits of ${station.name} changed and the pass has not been measured against them.`,
      label: "not measured",
      liftedBy: "the next sweep of the fragment",
    });
  }
  const floor = degreeWords(station.minElevationDeg);
  const outside = facts.dwell ? subtract(facts.dwell, [wholePass(pass)]) : [];
  for (const span of [...outside, ...pass.belowFloor]) {
    closures.push({
      ...common,
      ...span,
      verdict: "closed",
      cause: `The fragment stands below ${floor}, the elevation floor of ${station.name}.`,
      label: `below ${floor}`,
      liftedBy: "a lower elevation floor in the station's settings",
    });
  }
  const ceiling = degreeWords(station.maxElevationDeg);
  for (const span of pass.aboveCeiling) {
    closures.push({
      ...common,
      ...span,
      verdict: "closed",
      cause: `The fragment stands above ${ceiling}, the elevation ceiling of ${station.name}.`,
      label: `above ${ceiling}`,
      liftedBy: "a higher elevation ceiling in the station's settings",
    });
  }
  return [...closures, ...masked(pass, facts)];
};

/** What stands behind the horizon mask, or moves too fast for the mount. */
function masked(pass: PassGeometry, { station }: PassFacts): Closure[] {
  const common = {
    rule: "visibility",
    verdict: "closed",
    input: `station ${station.name}, version ${station.version}`,
    overridable: false,
  } as const;
  const behind = (pass.belowMask ?? []).map((span) => ({
    ...common,
    ...span,
    cause: `The fragment stands below the horizon mask of ${station.name}.`,
    label: "below horizon mask",
    liftedBy: "another horizon mask in the station's settings",
  }));
  const fast = (pass.tooFast ?? []).map((span) => ({
    ...common,
    ...span,
    cause: `Near the zenith the mount of ${station.name} would have to turn faster than ${degreeWords(station.maxAzimuthRateDegPerS ?? 0)} a second in azimuth.`,
    label: "too fast near zenith",
    liftedBy: "a faster mount in the station's settings",
  }));
  return [...behind, ...fast];
}
