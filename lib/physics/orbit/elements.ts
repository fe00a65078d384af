/**
 * One SGP4 mean element set, whatever the file form it came in (TLE or OMM).
 * Frame TEME, time scale UTC, as both forms define it.
 */
export interface Elements {
  /** Catalogue number, 1 to 9 digits. */
  readonly catalogNumber: number;
  readonly objectName: string | null;
  /** International designator such as 1998-067A, or null. */
  readonly objectId: string | null;
  /** Epoch in Unix milliseconds with a fraction (microseconds survive). */
  readonly epochMs: number;
  readonly meanMotionRevPerDay: number;
  readonly eccentricity: number;
  readonly inclinationDeg: number;
  readonly raanDeg: number;
  readonly argPericenterDeg: number;
  readonly meanAnomalyDeg: number;
  /** Drag term, per Earth radius. */
  readonly bstar: number;
  /** First derivative of mean motion as printed (already halved), rev/day². */
  readonly meanMotionDot: number;
  /** Second derivative of mean motion as printed (already divided by six), rev/day³. */
  readonly meanMotionDdot: number;
}

/** Geodetic position of a station on WGS-84. */
export interface Site {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly altitudeM: number;
}
