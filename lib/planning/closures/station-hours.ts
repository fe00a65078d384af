import { DAY_MS } from "@/lib/physics/time";
import { type Interval, subtract } from "../interval";
import type { StationFacts } from "../pass-facts";
import { clockWords } from "../words";
import { type Rule, wholePass } from "./rule";

const MINUTE_MS = 60_000;

/** Daily opening hours in UTC. A station without hours on record is closed at all times. */
export const stationHours: Rule = (pass, facts) => {
  const { station } = facts;
  const hours = station.openingHours
    .map((span) => `${clockWords(span.fromMin)} to ${clockWords(span.toMin)}`)
    .join(" and ");
  const cause = hours
    ? `${station.name} is open from ${hours} UTC only.`
    : `${station.name} has no opening hours on record.`;
  return subtract(wholePass(pass), openSpans(station, pass.riseMs, pass.setMs)).map((span) => ({
    ...span,
    rule: "station hours",
    verdict: "closed",
    cause,
    label: "station closed",
    input: `station ${station.name}, version ${station.version}`,
    liftedBy: "other opening hours in the station's settings",
    overridable: false,
  }));
};

/** The spans of every day that may touch the pass; one from the day before may still run. */
function openSpans(station: StationFacts, fromMs: number, toMs: number): Interval[] {
  const spans: Interval[] = [];
  const firstDay = Math.floor(fromMs / DAY_MS) - 1;
  const lastDay = Math.floor(toMs / DAY_MS);
  for (let day = firstDay; day <= lastDay; day++) {
    for (const { fromMin, toMin } of station.openingHours) {
      const endMin = toMin >= fromMin ? toMin : toMin + 1440;
      spans.push({ fromMs: day * DAY_MS + fromMin * MINUTE_MS, toMs: day * DAY_MS + endMin * MINUTE_MS });
    }
  }
  return spans;
}
