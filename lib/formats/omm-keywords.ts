import type { Elements } from "@/lib/physics/orbit/elements";

/**
 * Keywords of CCSDS 502.0-B-3 that hold a number of an element set. SGP4 does not
 * use the two derivatives of the mean motion; sets that leave them out get zero.
 */
export const NUMBER_KEYWORDS = [
  { keyword: "MEAN_MOTION", key: "meanMotionRevPerDay", required: true, unit: "rev/day" },
  { keyword: "ECCENTRICITY", key: "eccentricity", required: true, unit: null },
  { keyword: "INCLINATION", key: "inclinationDeg", required: true, unit: "deg" },
  { keyword: "RA_OF_ASC_NODE", key: "raanDeg", required: true, unit: "deg" },
  { keyword: "ARG_OF_PERICENTER", key: "argPericenterDeg", required: true, unit: "deg" },
  { keyword: "MEAN_ANOMALY", key: "meanAnomalyDeg", required: true, unit: "deg" },
  { keyword: "BSTAR", key: "bstar", required: true, unit: "1/ER" },
  { keyword: "MEAN_MOTION_DOT", key: "meanMotionDot", required: false, unit: "rev/day**2" },
  { keyword: "MEAN_MOTION_DDOT", key: "meanMotionDdot", required: false, unit: "rev/day**3" },
] as const satisfies readonly {
  keyword: string;
  key: keyof Elements;
  required: boolean;
  unit: string | null;
}[];

/** Keywords that, where present, must say what SGP4 needs; anything else is refused by name. */
export const FIXED_KEYWORDS: readonly { keyword: string; allowed: readonly string[] }[] = [
  { keyword: "CENTER_NAME", allowed: ["EARTH"] },
  { keyword: "REF_FRAME", allowed: ["TEME"] },
  { keyword: "TIME_SYSTEM", allowed: ["UTC"] },
  { keyword: "MEAN_ELEMENT_THEORY", allowed: ["SGP4", "SGP/SGP4"] },
  { keyword: "EPHEMERIS_TYPE", allowed: ["0"] },
];

/** Major versions of the message that are read; the keywords above mean the same in both. */
export const READ_VERSIONS = /^[23]\.\d+$/;

/** Every keyword that is read; the others are let be. */
export const READ_KEYWORDS: ReadonlySet<string> = new Set([
  "CCSDS_OMM_VERS",
  "OBJECT_NAME",
  "OBJECT_ID",
  "EPOCH",
  "NORAD_CAT_ID",
  ...NUMBER_KEYWORDS.map((n) => n.keyword),
  ...FIXED_KEYWORDS.map((f) => f.keyword),
]);
