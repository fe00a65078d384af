/** Why a notice goes out. */
export type NoticeKind = "request" | "revised request" | "cancellation" | "completion";

/** Where the beam points at one moment. */
export interface BeamPoint {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
  readonly rangeKm: number;
}

/** The beam over a dwell. */
export interface BeamSpan {
  readonly start: BeamPoint;
  readonly end: BeamPoint;
  readonly minElevationDeg: number;
  readonly maxElevationDeg: number;
}

/** What was fired, for a completion. */
export interface FiredFacts {
  readonly outcome: "fired" | "in part" | "not fired";
  readonly openedMs: number | null;
  readonly closedMs: number | null;
  readonly pulses: number;
}

/** Everything that a notice may say; the composers add words, never figures. */
export interface NoticeFacts {
  readonly kind: NoticeKind;
  readonly engagementId: string;
  readonly engagementNumber: number;
  readonly sequence: number;
  readonly authority: { readonly name: string; readonly email: string; readonly timeZone: string };
  /** Why this authority hears of it. */
  readonly because: string;
  readonly station: {
    readonly name: string;
    readonly latitudeDeg: number;
    readonly longitudeDeg: number;
    readonly altitudeM: number;
  };
  readonly fragment: { readonly name: string; readonly number: string };
  readonly laser: {
    readonly wavelengthNm: number;
    readonly pulseEnergyJ: number;
    readonly pulseWidthNs: number;
    readonly repetitionRateHz: number;
    readonly apertureM: number;
  };
  readonly dwellFromMs: number;
  readonly dwellToMs: number;
  /** The times that this notice replaces, when they changed. */
  readonly formerFromMs: number | null;
  readonly formerToMs: number | null;
  /** Null when the orbit gives no direction; the notice says so. */
  readonly beam: BeamSpan | null;
  readonly planner: { readonly name: string; readonly email: string };
  /** What a revised request changes, in words. */
  readonly change: string | null;
  /** Reason of a scrub or lapse. */
  readonly reason: string | null;
  readonly fired: FiredFacts | null;
  /** Null when nothing is asked. */
  readonly answerByMs: number | null;
  /** Where to answer; null when nothing is asked. */
  readonly link: string | null;
  /** The engagement's own page, for people who can sign in. */
  readonly engagementUrl: string;
}
