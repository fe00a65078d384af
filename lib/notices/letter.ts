import { timeWords } from "@/lib/planning/words";
import type { FiredFacts, NoticeFacts } from "./notice-facts";
import {
  clockInZone,
  grouped,
  laserWords,
  oneLine,
  placeWords,
  pointWords,
  spanInUtc,
  spanInZone,
} from "./words";

/** A notice before it is text or HTML: the same words for both. */
export interface Letter {
  readonly subject: string;
  readonly heading: string;
  readonly opening: readonly string[];
  readonly rows: readonly (readonly [label: string, value: string])[];
  /** What is asked, and where; null when nothing is. */
  readonly ask: { readonly words: string; readonly by: string; readonly link: string } | null;
  readonly cautions: readonly string[];
}

/** Composes the letter of a notice from its facts. */
export function composeLetter(facts: NoticeFacts): Letter {
  return {
    subject: subjectOf(facts),
    heading: headingOf(facts),
    opening: openingOf(facts).map(oneLine),
    rows: rowsOf(facts),
    ask: askOf(facts),
    cautions: cautionsOf(facts),
  };
}

/** E-1042, as people say it. */
export function engagementLabel(number: number): string {
  return `E-${number}`;
}

function subjectOf(facts: NoticeFacts): string {
  const label = engagementLabel(facts.engagementNumber);
  const what = `laser dwell at ${facts.station.name}, ${timeWords(facts.dwellFromMs)}`;
  const lead = {
    request: `${label}: ${what}`,
    "revised request": `${label} revised: ${what}`,
    cancellation: `${label} cancelled: ${what}`,
    completion: `${label} complete: ${what}`,
  }[facts.kind];
  const by = facts.answerByMs === null ? "" : ` (answer by ${timeWords(facts.answerByMs)})`;
  return oneLine(`${lead}${by}`);
}

function headingOf(facts: NoticeFacts): string {
  const label = engagementLabel(facts.engagementNumber);
  return {
    request: `${label}: a laser dwell is proposed`,
    "revised request": `${label}: the proposed laser dwell has changed`,
    cancellation: `${label}: the laser dwell is cancelled`,
    completion: `${label}: the laser dwell is complete`,
  }[facts.kind];
}

function openingOf(facts: NoticeFacts): string[] {
  const where = `${facts.station.name} proposes to point a pulsed laser at a piece of orbital debris`;
  switch (facts.kind) {
    case "request":
      return [
        `${where} for ${lengthS(facts)} s.`,
        `${facts.authority.name} is concerned because ${facts.because}.`,
      ];
    case "revised request":
      return [
        `What has changed: ${facts.change ?? "the request as a whole"}.`,
        "The request you had for this dwell no longer holds. Any answer to it is void: please answer again.",
        `${facts.authority.name} is concerned because ${facts.because}.`,
      ];
    case "cancellation":
      return [
        "No laser will be fired for this engagement. You need not do anything.",
        `Reason: ${facts.reason ?? "none was given"}`,
      ];
    case "completion":
      return [firedSentence(facts.fired), "The beam is off. This ends the engagement."];
  }
}

function firedSentence(fired: FiredFacts | null): string {
  if (fired === null || fired.openedMs === null || fired.closedMs === null) {
    return "Nothing was fired: the shutter stayed shut.";
  }
  const span = spanInUtc(fired.openedMs, fired.closedMs);
  const part = fired.outcome === "in part" ? " Only part of the dwell was used." : "";
  return `The shutter was open from ${span}; ${grouped(fired.pulses)} pulses were fired.${part}`;
}

function lengthS(facts: NoticeFacts): number {
  return Math.round((facts.dwellToMs - facts.dwellFromMs) / 1000);
}

function rowsOf(facts: NoticeFacts): Letter["rows"] {
  const rows: [string, string][] = [["Dwell, UTC", spanInUtc(facts.dwellFromMs, facts.dwellToMs)]];
  const local = spanInZone(facts.dwellFromMs, facts.dwellToMs, facts.authority.timeZone);
  if (local !== null) rows.push(["Dwell, your clocks", local]);
  if (facts.formerFromMs !== null && facts.formerToMs !== null) {
    rows.push(["Before, UTC", `${spanInUtc(facts.formerFromMs, facts.formerToMs)}, no longer planned`]);
  }
  rows.push(["Station", `${facts.station.name}: ${placeWords(facts.station)}`]);
  rows.push(["Fragment", `${facts.fragment.name} (${facts.fragment.number})`]);
  if (facts.kind === "request" || facts.kind === "revised request") rows.push(...beamRows(facts));
  rows.push(["Planner", `${facts.planner.name}, ${facts.planner.email}`]);
  return rows.map(([label, value]) => [label, oneLine(value)]);
}

function beamRows(facts: NoticeFacts): [string, string][] {
  const laser: [string, string] = ["Laser", laserWords(facts.laser)];
  if (facts.beam === null) return [["Beam", "no direction could be worked out from the orbit"], laser];
  const { start, end, minElevationDeg, maxElevationDeg } = facts.beam;
  return [
    ["Beam at the start", pointWords(start)],
    ["Beam at the end", pointWords(end)],
    [
      "Elevation range",
      `${minElevationDeg.toFixed(1)}° to ${maxElevationDeg.toFixed(1)}°, ground to unlimited`,
    ],
    laser,
  ];
}

function askOf(facts: NoticeFacts): Letter["ask"] {
  if (facts.answerByMs === null || facts.link === null) return null;
  const local = clockInZone(facts.answerByMs, facts.authority.timeZone);
  const zone = local === null ? "" : ` (${local}, ${facts.authority.timeZone})`;
  return {
    words:
      "Please say whether you have no objection, no objection with conditions, or an objection with its reasons.",
    by: `${timeWords(facts.answerByMs)}${zone}`,
    link: facts.link,
  };
}

function cautionsOf(facts: NoticeFacts): string[] {
  if (facts.link === null) return ["This is a record of planning. It is not a NOTAM and cancels none."];
  return [
    "This notice is not a NOTAM and does not ask for one; nor is it a clearance. No answer is not consent: " +
      "without your answer the laser is not fired.",
    "The link is meant for you alone. Opening it changes nothing; only the form on its page does.",
  ];
}
