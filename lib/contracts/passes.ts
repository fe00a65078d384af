import { z } from "zod";
import { identifierText, instantText, type SpanBody } from "./common";
import type { GroundBody } from "./pass-surroundings";

export const passQuery = z.strictObject({
  station: identifierText.optional(),
  fragment: identifierText.optional(),
  from: instantText.optional(),
  to: instantText.optional(),
});

/** A dwell to be judged without booking it. */
export const judgementQuery = z.strictObject({ from: instantText, to: instantText });

export type Verdict = "closed" | "pending" | "not checked";

/** A closure as screens and scripts see it. */
export interface ClosureBody extends SpanBody {
  readonly rule: string;
  readonly verdict: Verdict;
  readonly cause: string;
  /** Two to four words for the strip: "payload QS-88, 1.9°". */
  readonly label: string;
  /** Which record, and which version of it, says so. */
  readonly input: string;
  readonly liftedBy: string;
  /** For "not checked": a person's attested word may stand in. Never for crewed spacecraft. */
  readonly overridable: boolean;
}

export interface OpeningBody extends SpanBody {
  /** What is still awaited in this stretch, in words. */
  readonly pending: readonly string[];
}

export interface DwellBody extends SpanBody {
  readonly perigeeDropM: number;
  readonly semiMajorAxisDropM: number;
  /** Smallest and largest drop of the band (P10 to P90 of the resulting altitude, turned into drops). */
  readonly perigeeDropBandM: readonly [number, number];
  readonly semiMajorAxisDropBandM: readonly [number, number];
}

/** A pass in a list: GET /api/passes. */
export interface PassBody {
  readonly id: string;
  readonly stationId: string;
  readonly stationName: string;
  readonly fragmentId: string;
  readonly fragmentName: string;
  readonly catalogNumber: number | null;
  readonly riseAt: string;
  readonly culminateAt: string;
  readonly setAt: string;
  readonly maxElevationDeg: number;
  readonly minRangeKm: number;
  readonly openings: readonly OpeningBody[];
  /** The best dwell that may be booked now; null with noDwellReason, and while an engagement holds the pass. */
  readonly dwell: DwellBody | null;
  readonly engagementId: string | null;
  readonly engagementState: string | null;
  /** The dwell of that engagement. */
  readonly booked: SpanBody | null;
  /** The closures merged by verdict, for the small strip. */
  readonly closures: readonly ClosureBody[];
  readonly strip: { readonly elevationDeg: readonly number[]; readonly worthPerS: readonly number[] };
  readonly elementSetAgeH: number;
  /** Why there is no dwell, in words, or null. */
  readonly noDwellReason: string | null;
}

export interface SampleBody {
  readonly at: string;
  readonly elevationDeg: number;
  readonly azimuthDeg: number;
  readonly rangeKm: number;
  readonly transmission: number;
  readonly spotDiameterM: number;
  readonly fluenceJPerM2: number;
  readonly couplingNPerW: number;
  readonly deltaVMPerS: number;
  readonly worthPerS: number;
  /** How the Sun shines on the fragment: sunlit, penumbra or umbra; null without a state. */
  readonly sunlight: "sunlit" | "penumbra" | "umbra" | null;
}

/** One pass in full: GET /api/passes/:id. */
export interface PassSheetBody extends PassBody {
  readonly station: {
    readonly id: string;
    readonly name: string;
    readonly timeZone: string;
    readonly latitudeDeg: number;
    readonly longitudeDeg: number;
    readonly altitudeM: number;
    readonly minElevationDeg: number;
    readonly maxElevationDeg: number;
    /** Horizon in steps: from each azimuth on, clockwise, up to the next. */
    readonly horizonMask: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[];
    readonly maxAzimuthRateDegPerS: number | null;
    readonly acquisitionS: number;
    readonly guardS: number;
    readonly minDwellS: number;
    readonly maxDwellS: number;
  };
  readonly laser: {
    readonly id: string;
    readonly name: string;
    readonly summary: string;
    readonly version: number;
  };
  readonly riseAzimuthDeg: number;
  readonly culminationAzimuthDeg: number;
  readonly setAzimuthDeg: number;
  readonly underWayAtFrom: boolean;
  readonly underWayAtTo: boolean;
  readonly elementSet: {
    readonly id: string;
    readonly epochAt: string;
    readonly source: string;
    readonly alongTrackKm: number;
  };
  readonly aim: string;
  readonly aimUnit: string;
  readonly samples: readonly SampleBody[];
  /** Figures of the offered dwell, or of the booked one when there is an engagement. */
  readonly estimate: EstimateBody | null;
  /** Who would be sent what when the dwell is proposed. */
  readonly concerned: readonly {
    readonly authorityId: string;
    readonly name: string;
    readonly kind: string;
    readonly because: string;
    readonly leadTimeMin: number;
  }[];
  /** What the figures assume, each with where it comes from. */
  readonly assumptions: readonly { readonly text: string; readonly source: string }[];
  /** Protected objects that come near the beam, with their keep-out angle. */
  readonly crossings: readonly {
    readonly name: string;
    readonly class: string;
    readonly from: string;
    readonly to: string;
    readonly minSeparationDeg: number;
    readonly halfAngleDeg: number;
    readonly addedDeg: number;
    readonly timingGuardS: number;
  }[];
  /** Where it goes over the Earth; null where the element set gives no state around the pass. */
  readonly ground: GroundBody | null;
}

export interface BandBody {
  readonly p10: number;
  readonly p50: number;
  readonly p90: number;
}

/** What a dwell does to the orbit. */
export interface EstimateBody extends SpanBody {
  readonly pulses: number;
  readonly energyJ: number;
  readonly deltaV: {
    readonly radialMPerS: number;
    readonly transverseMPerS: number;
    readonly normalMPerS: number;
  };
  readonly semiMajorAxisBeforeKm: number;
  readonly semiMajorAxisAfterKm: BandBody;
  readonly perigeeBeforeKm: number;
  readonly perigeeAfterKm: BandBody;
}

/** What booking a dwell would meet: GET /api/passes/:id/judgement. */
export interface JudgementBody extends SpanBody {
  /** Every reason for which it would be refused; empty when it may be proposed. */
  readonly refusals: readonly { readonly path: string; readonly message: string }[];
  readonly pending: readonly ClosureBody[];
  readonly notChecked: readonly ClosureBody[];
  readonly estimate: EstimateBody | null;
  readonly concerned: PassSheetBody["concerned"];
}
