import type { MaskStep } from "./horizon-mask";
import type { Interval } from "./interval";
import type { ProtectedClass } from "./keep-out";

/** A record by its name and version, as closures quote it. */
export interface Named {
  readonly id: string;
  readonly name: string;
}

/** What the rules read of a station. */
export interface StationFacts extends Named {
  readonly version: number;
  readonly minElevationDeg: number;
  readonly maxElevationDeg: number;
  readonly horizonMask?: readonly MaskStep[];
  readonly maxAzimuthRateDegPerS?: number | null;
  /** Minutes of the UTC day, [from, to); from > to runs over midnight. */
  readonly openingHours: readonly { readonly fromMin: number; readonly toMin: number }[];
  readonly slewS: number;
  readonly coolDownS: number;
  readonly elementAgeLimitH: number;
}

/** The element sets behind a pass: the one it was worked out from, and the newest of the fragment. */
export interface ElementFacts {
  readonly fragmentName: string;
  readonly usedEpochMs: number;
  readonly usedSource: string;
  readonly newestEpochMs: number;
  readonly newestSource: string;
}

/** One stored crossing of the beam's cone with a protected object; the timing guard is already in it. */
export interface CrossingFacts extends Interval {
  readonly object: ProtectedFacts;
  readonly minSeparationDeg: number;
  readonly halfAngleDeg: number;
  readonly addedDeg: number;
  /** Epochs behind the geometry, for the words about their ages. */
  readonly objectEpochMs: number;
}

/** A protected object as closures name it. */
export interface ProtectedFacts extends Named {
  readonly class: ProtectedClass;
  readonly version: number;
}

/** The state of the screening of one pass. */
export interface ScreeningFacts {
  /** When the whole protected catalogue was screened; null: never. */
  readonly screenedAtMs: number | null;
  /** When the protected catalogue last changed; null: it is empty. */
  readonly catalogueChangedAtMs: number | null;
  readonly crewedCount: number;
  readonly crossings: readonly CrossingFacts[];
  /** Objects that had no usable element set at the screening. */
  readonly gaps: readonly ProtectedFacts[];
}

/** An airspace volume with its hours. */
export interface VolumeFacts extends Named {
  readonly version: number;
  readonly authorityId: string | null;
  readonly floorText: string;
  readonly ceilingText: string;
  /** Spans in which it is active; an empty list: nobody told us. */
  readonly activeSpans: readonly Interval[];
  readonly scheduleKnownUntilMs: number;
  readonly liftable: boolean;
}

/** An authority as far as the rules need it. */
export interface AuthorityFacts extends Named {
  readonly kind: string;
  readonly leadTimeMin: number;
  readonly version: number;
}

/** A live engagement that may stand in the way. */
export interface EngagementFacts {
  readonly id: string;
  readonly number: number;
  readonly state: string;
  readonly version: number;
  readonly plannerName: string;
  readonly stationId: string;
  readonly stationName: string;
  readonly fragmentId: string;
  readonly dwell: Interval;
  readonly hold: Interval;
}

/** A firing on the fragment. */
export interface FiringFacts {
  readonly engagementNumber: number;
  readonly outcome: "fired" | "in part";
  readonly closedMs: number;
}

/** An answer in force. */
export interface AnswerFacts {
  readonly authorityId: string;
  readonly outcome: "no objection" | "no objection with conditions" | "objection";
  readonly conditions: string | null;
  readonly reasons: string | null;
  readonly answeredMs: number;
}

/** The engagement that is being judged: whom it has asked, and what they said. */
export interface OwnFacts {
  readonly engagementId: string;
  /** What the requests and answers are about; elsewhere in the pass they say nothing. */
  readonly dwell: Interval;
  readonly requestedOf: ReadonlySet<string>;
  readonly answers: readonly AnswerFacts[];
}

/** Everything the rules read besides the geometry of the pass. */
export interface PassFacts {
  readonly nowMs: number;
  readonly station: StationFacts;
  readonly fragmentId: string;
  readonly elements: ElementFacts;
  /** When the newest element set no longer showed this pass; null while it does. */
  readonly vanishedAtMs: number | null;
  readonly screening: ScreeningFacts;
  readonly volumes: readonly VolumeFacts[];
  /** Key of the volumes that the station can reach now; see airspaceKey. */
  readonly airspaceKey: string;
  /** Those of every engagement of the station, and those of the volumes. */
  readonly authorities: readonly AuthorityFacts[];
  readonly stationAuthorityIds: readonly string[];
  readonly engagements: readonly EngagementFacts[];
  readonly firings: readonly FiringFacts[];
  readonly own: OwnFacts | null;
  /** The dwell in question, or null while the whole pass is looked at. */
  readonly dwell: Interval | null;
}
