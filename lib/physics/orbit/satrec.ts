import { json2satrec, type SatRec } from "satellite.js";
import type { Elements } from "./elements";

/** Fields that hold an angle and may jump by a full turn between two neighbouring epochs. */
const WRAPPING: ReadonlySet<string> = new Set(["gsto", "xlamo", "xli", "zmol", "zmos"]);

/**
 * The library's record for an element set, initialised for WGS-72 in the improved mode (the mode that
 * reproduces the published verification file). Values must have been checked before.
 *
 * The library reads the epoch in whole milliseconds. Deep-space sets take the Moon, the Sun and the
 * sidereal angle from it, and half a millisecond moves case 23333 of the verification file by 35 mm; so
 * for them the records of both neighbouring milliseconds are blended, every field being smooth in time.
 * Minutes since epoch are always computed by the callers from the exact epoch.
 */
export function satrecOf(elements: Elements): SatRec {
  const floorMs = Math.floor(elements.epochMs);
  const before = recordAt(elements, floorMs);
  const share = elements.epochMs - floorMs;
  if (before.method !== "d" || share === 0) return before;
  return blend(before, recordAt(elements, floorMs + 1), share);
}

function blend(before: SatRec, after: SatRec, share: number): SatRec {
  const blended: Record<string, unknown> = { ...before };
  const later = new Map<string, unknown>(Object.entries(after));
  for (const [name, from] of Object.entries(before)) {
    const to = later.get(name);
    if (typeof from !== "number" || typeof to !== "number" || from === to) continue;
    const jumped = WRAPPING.has(name) && Math.abs(to - from) > Math.PI;
    if (!jumped) blended[name] = from + share * (to - from);
  }
  return { ...before, ...blended };
}

function recordAt(elements: Elements, epochMs: number): SatRec {
  return json2satrec({
    NORAD_CAT_ID: String(elements.catalogNumber),
    EPOCH: new Date(epochMs).toISOString(),
    MEAN_MOTION: elements.meanMotionRevPerDay,
    ECCENTRICITY: elements.eccentricity,
    INCLINATION: elements.inclinationDeg,
    RA_OF_ASC_NODE: elements.raanDeg,
    ARG_OF_PERICENTER: elements.argPericenterDeg,
    MEAN_ANOMALY: elements.meanAnomalyDeg,
    BSTAR: elements.bstar,
    MEAN_MOTION_DOT: elements.meanMotionDot,
    MEAN_MOTION_DDOT: elements.meanMotionDdot,
    OBJECT_NAME: elements.objectName ?? "",
    OBJECT_ID: elements.objectId ?? "",
    CLASSIFICATION_TYPE: "U",
    ELEMENT_SET_NO: 0,
    EPHEMERIS_TYPE: 0,
    REV_AT_EPOCH: 0,
  });
}
