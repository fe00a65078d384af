import type { Closure } from "@/lib/planning/closure";
import type { PassFacts } from "@/lib/planning/pass-facts";
import type { PassGeometry } from "@/lib/planning/pass-geometry";

/** Invented figures for the rules' tests: a pass of ten minutes in the first hour of a day. */
export const RISE = Date.UTC(2031, 3, 6, 0, 30, 0);
export const SET = RISE + 600_000;
export const MINUTE = 60_000;
export const HOUR = 3_600_000;
export const DAY = 24 * HOUR;

/** seconds after rise as Unix milliseconds. */
export function riseAnd(seconds: number): number {
  return RISE + seconds * 1000;
}

/** A span in seconds after rise. */
export function span(fromS: number, toS: number) {
  return { fromMs: riseAnd(fromS), toMs: riseAnd(toS) };
}

export const PASS: PassGeometry = {
  elementSetId: "set-1",
  riseMs: RISE,
  culminateMs: riseAnd(300),
  setMs: SET,
  maxElevationDeg: 62,
  stationVersion: 3,
  belowFloor: [],
  aboveCeiling: [],
  airspaceKey: "",
  volumes: [],
};

/** Facts under which every rule leaves the whole pass open. */
export const OPEN: PassFacts = {
  nowMs: RISE - 3 * HOUR,
  station: {
    id: "station-1",
    name: "Hollin Fell",
    version: 3,
    minElevationDeg: 20,
    maxElevationDeg: 86,
    openingHours: [{ fromMin: 0, toMin: 1440 }],
    slewS: 60,
    coolDownS: 120,
    elementAgeLimitH: 72,
  },
  fragmentId: "fragment-1",
  elements: {
    fragmentName: "Fragment 70001",
    usedEpochMs: RISE - 9 * HOUR,
    usedSource: "upload",
    newestEpochMs: RISE - 9 * HOUR,
    newestSource: "upload",
  },
  vanishedAtMs: null,
  screening: {
    screenedAtMs: RISE - 4 * HOUR,
    catalogueChangedAtMs: RISE - 5 * HOUR,
    crewedCount: 1,
    crossings: [],
    gaps: [],
  },
  volumes: [],
  airspaceKey: "",
  authorities: [],
  stationAuthorityIds: [],
  engagements: [],
  firings: [],
  own: null,
  dwell: null,
};

/** Verdict and span in seconds after rise, as tests compare them. */
export function brief(closures: readonly Closure[]): [string, number, number][] {
  return closures.map((c) => [c.verdict, (c.fromMs - RISE) / 1000, (c.toMs - RISE) / 1000]);
}
