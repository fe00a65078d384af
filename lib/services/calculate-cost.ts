import type { BeamScreenInput, PassSearchInput } from "@/lib/contracts/calculations";
import { refused } from "@/lib/engagement/refusal";

const DAY_MS = 86_400_000;

/** Reading and checking one element set, measured on one core of 2026. */
const READ_MS = 0.25;

/** One object-day of a pass search, and one object-hour of a beam screening, measured likewise. */
const SEARCH_DAY_MS = 0.08;
const SCREEN_HOUR_MS = 0.07;

/** Longest span of a pass search or a beam screening, days. */
const MOST_DAYS = 31;

/** Object-days that one pass search takes: some 10 s. */
const MOST_SEARCH_DAYS = 140_000;

/** Object-hours that one beam screening takes: some 15 s. */
const MOST_SCREEN_HOURS = 240_000;

/** The asked span in days; 422 unless it runs forward and is not too long. */
export function spanDays(span: { from: string; to: string }): number {
  const days = (Date.parse(span.to) - Date.parse(span.from)) / DAY_MS;
  if (!(days > 0))
    throw refused("The span is empty.", [{ path: "to", message: "to must be later than from" }]);
  if (days > MOST_DAYS) {
    const message = `at most ${MOST_DAYS} days are taken at once`;
    throw refused("The span is too long.", [{ path: "to", message }]);
  }
  return days;
}

/** Estimated milliseconds of a pass search on one core; 422 when it asks for too much at once. */
export function passSearchMs(input: PassSearchInput): number {
  const days = spanDays(input);
  const objectDays = input.elementSets.length * days;
  if (objectDays > MOST_SEARCH_DAYS) {
    throw tooMuch("elementSets", `${MOST_SEARCH_DAYS.toLocaleString("en")} object-days`);
  }
  return READ_MS * input.elementSets.length + SEARCH_DAY_MS * objectDays;
}

/** Estimated milliseconds of a beam screening on one core; 422 when it asks for too much at once. */
export function beamScreenMs(input: BeamScreenInput): number {
  const objectHours = input.protected.length * spanDays(input) * 24;
  if (objectHours > MOST_SCREEN_HOURS) {
    throw tooMuch("protected", `${MOST_SCREEN_HOURS.toLocaleString("en")} object-hours`);
  }
  return READ_MS * input.protected.length + SCREEN_HOUR_MS * objectHours;
}

function tooMuch(path: string, limit: string) {
  return refused("That is too much at once.", [{ path, message: `at most ${limit} are taken at once` }]);
}
