import type { Elements } from "@/lib/physics/orbit/elements";
import { writeOmmEpoch } from "./omm-epoch";

/** An OMM as a JSON object: CCSDS 502.0-B-3 keywords, numbers as numbers, in the order of the book. */
export interface OmmObject {
  readonly CCSDS_OMM_VERS: "3.0";
  readonly CREATION_DATE?: string;
  readonly ORIGINATOR?: string;
  readonly OBJECT_NAME?: string;
  readonly OBJECT_ID?: string;
  readonly CENTER_NAME: "EARTH";
  readonly REF_FRAME: "TEME";
  readonly TIME_SYSTEM: "UTC";
  readonly MEAN_ELEMENT_THEORY: "SGP4";
  readonly EPOCH: string;
  readonly MEAN_MOTION: number;
  readonly ECCENTRICITY: number;
  readonly INCLINATION: number;
  readonly RA_OF_ASC_NODE: number;
  readonly ARG_OF_PERICENTER: number;
  readonly MEAN_ANOMALY: number;
  readonly EPHEMERIS_TYPE: 0;
  readonly NORAD_CAT_ID: number;
  readonly BSTAR: number;
  readonly MEAN_MOTION_DOT: number;
  readonly MEAN_MOTION_DDOT: number;
}

/** Who made the message and when; the header of an OMM asks for both, stored sets need neither. */
export interface OmmHeader {
  readonly createdAtMs: number;
  readonly originator: string;
}

/**
 * The element set as an OMM in JSON, for storage and export. Every number is kept
 * as it is and the epoch to the microsecond, so that reading it back gives the same
 * elements. Names that are null are left out. Throws a RangeError for an epoch
 * outside 1957 to 2199.
 */
export function elementsToOmm(elements: Elements, header: OmmHeader | null = null): OmmObject {
  return {
    CCSDS_OMM_VERS: "3.0",
    ...(header && { CREATION_DATE: writeOmmEpoch(header.createdAtMs), ORIGINATOR: header.originator }),
    ...(elements.objectName !== null && { OBJECT_NAME: elements.objectName }),
    ...(elements.objectId !== null && { OBJECT_ID: elements.objectId }),
    CENTER_NAME: "EARTH",
    REF_FRAME: "TEME",
    TIME_SYSTEM: "UTC",
    MEAN_ELEMENT_THEORY: "SGP4",
    EPOCH: writeOmmEpoch(elements.epochMs),
    MEAN_MOTION: elements.meanMotionRevPerDay,
    ECCENTRICITY: elements.eccentricity,
    INCLINATION: elements.inclinationDeg,
    RA_OF_ASC_NODE: elements.raanDeg,
    ARG_OF_PERICENTER: elements.argPericenterDeg,
    MEAN_ANOMALY: elements.meanAnomalyDeg,
    EPHEMERIS_TYPE: 0,
    NORAD_CAT_ID: elements.catalogNumber,
    BSTAR: elements.bstar,
    MEAN_MOTION_DOT: elements.meanMotionDot,
    MEAN_MOTION_DDOT: elements.meanMotionDdot,
  };
}
