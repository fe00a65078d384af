import type { StoredGeometry } from "./pass-geometry";

/** The best dwell under the closures of geometry, with what it does; drops are positive downwards. */
export interface PlannedDwell {
  readonly fromMs: number;
  readonly toMs: number;
  readonly perigeeDropM: number;
  readonly semiMajorAxisDropM: number;
  /** Smallest and largest drop (P90 and P10 of the resulting altitude). */
  readonly perigeeDropBandM: readonly [number, number];
  readonly semiMajorAxisDropBandM: readonly [number, number];
  /** Gain in the aim, in the aim's unit. */
  readonly gain: number;
}

/** What a worker worked out for a pass: enough to draw it in a list without propagating again. */
export interface StoredPlan {
  readonly elementSetId: string;
  readonly laserSettingVersion: number;
  /** Every other figure the plan rests on, as one text to compare; see {@link planInputs}. */
  readonly inputs: string;
  readonly geometry: StoredGeometry;
  readonly aim: string;
  readonly aimUnit: string;
  /** Points of the small strip, evenly spaced from rise to set. */
  readonly strip: { readonly elevationDeg: number[]; readonly worthPerS: number[] };
  /** Read again through the rules before it is offered. */
  readonly dwell: PlannedDwell | null;
  /** Why nothing could be worked out, when that is so. */
  readonly refusal: string | null;
}
