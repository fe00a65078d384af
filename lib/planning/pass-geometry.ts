import type { Interval } from "./interval";

/** Where the beam runs inside one airspace volume, whatever the volume's hours are. */
export interface VolumeStretches {
  readonly volumeId: string;
  readonly spans: readonly Interval[];
}

/**
 * What the rules need of a pass that comes from geometry alone. It is measured once and stored with the
 * versions of its inputs; see {@link measurePass} in measure-pass.ts.
 */
export interface PassGeometry extends StoredGeometry {
  readonly elementSetId: string;
  readonly riseMs: number;
  readonly culminateMs: number;
  readonly setMs: number;
  readonly maxElevationDeg: number;
}

/** The part of the geometry that is kept with the plan. */
export interface StoredGeometry {
  /** Version of the station whose elevation limits were applied. */
  readonly stationVersion: number;
  /** Stretches under the station's elevation floor or over its ceiling; rise and set lie at the floor. */
  readonly belowFloor: readonly Interval[];
  readonly aboveCeiling: readonly Interval[];
  /** Stretches behind the station's horizon mask, and those too fast for its mount in azimuth. */
  readonly belowMask?: readonly Interval[];
  readonly tooFast?: readonly Interval[];
  /** Which volumes were examined, with their versions; see {@link airspaceKey} in airspace.ts. */
  readonly airspaceKey: string;
  /** Volumes that the beam runs through. */
  readonly volumes: readonly VolumeStretches[];
}
