import { z } from "zod";
import { instantText, type SpanBody } from "./common";
import type { BandBody } from "./passes";

/** A station of a calculation: geodetic, WGS-84. */
const place = {
  latitudeDeg: z.number().min(-90).max(90),
  longitudeDeg: z.number().min(-180).max(360),
  altitudeM: z.number().min(-500).max(10_000),
};

const floor = z.number().min(-5).lt(90);

/**
 * An element set: two TLE lines, with or without a name, or an OMM as JSON. Its inside is judged by the
 * reader of files, so that each bad one is refused by its index while the rest goes on.
 */
const elementSet = z.record(z.string(), z.unknown(), {
  error: "expected an object with line1 and line2, or an OMM",
});
export type ElementSetInput = z.infer<typeof elementSet>;

/** Element sets that one calculation takes. */
export const MAX_CALCULATION_SETS = 10_000;

const manySets = z.array(elementSet).min(1).max(MAX_CALCULATION_SETS);

export const passSearchInput = z.strictObject({
  station: z.strictObject({ ...place, minElevationDeg: floor }),
  elementSets: manySets,
  from: instantText,
  to: instantText,
});
export type PassSearchInput = z.infer<typeof passSearchInput>;

export const beamScreenInput = z.strictObject({
  /** The elevation floor plays no part here: a beam is a beam at any elevation. */
  station: z.strictObject({ ...place, minElevationDeg: floor.optional() }),
  target: elementSet,
  protected: manySets,
  from: instantText,
  to: instantText,
  halfAngleDeg: z.number().gt(0).max(45),
});
export type BeamScreenInput = z.infer<typeof beamScreenInput>;

const pulsedLaser = z.strictObject({
  mode: z.literal("pulsed"),
  wavelengthNm: z.number(),
  pulseEnergyJ: z.number(),
  pulseWidthNs: z.number(),
  repetitionRateHz: z.number(),
  apertureM: z.number(),
  beamQuality: z.number(),
  zenithTransmission: z.number(),
  strehl: z.number(),
  jitterUrad: z.number(),
  spotConvention: z.union([z.enum(["gaussian", "airy"]), z.number()]).default("gaussian"),
});

/** Readable, so that it is refused by name and not as a mistake of form. */
const continuousLaser = z.looseObject({ mode: z.literal("continuous"), powerW: z.number() });

export const impulseEstimateInput = z.strictObject({
  station: z.strictObject({ ...place, minElevationDeg: floor.optional() }),
  laser: z.discriminatedUnion("mode", [pulsedLaser, continuousLaser]),
  fragment: z.strictObject({
    massKg: z.number(),
    areaM2: z.number(),
    material: z.string(),
    couplingNPerW: z.number().nullish(),
    shape: z.string().nullish(),
    spinRateHz: z.number().nullish(),
  }),
  elementSet,
  from: instantText,
  to: instantText,
  aim: z.enum(["decay", "perigee", "energy", "lifetime"]).default("decay"),
});
export type ImpulseEstimateInput = z.infer<typeof impulseEstimateInput>;

/** An item that was left out, by its place in the list (from 0). */
export interface RefusedItem {
  readonly index: number;
  readonly reason: string;
}

/** POST /api/pass-search. */
export interface PassSearchBody {
  readonly passes: readonly {
    readonly catalogNumber: number;
    readonly riseAt: string;
    readonly culminateAt: string;
    readonly setAt: string;
    readonly maxElevationDeg: number;
    readonly riseAzimuthDeg: number;
    readonly culminationAzimuthDeg: number;
    readonly setAzimuthDeg: number;
    readonly minRangeKm: number;
    /** The pass was under way when the asked time began or ended: cut there. */
    readonly underWayAtFrom: boolean;
    readonly underWayAtTo: boolean;
  }[];
  readonly refused: readonly RefusedItem[];
}

/** POST /api/beam-screen. */
export interface BeamScreenBody {
  readonly closures: readonly (SpanBody & {
    readonly catalogNumber: number;
    readonly minSeparationDeg: number;
  })[];
  readonly refused: readonly RefusedItem[];
}

/** POST /api/impulse-estimate. */
export interface ImpulseEstimateBody {
  readonly samples: readonly {
    readonly at: string;
    readonly elevationDeg: number;
    readonly rangeKm: number;
    readonly transmission: number;
    readonly spotDiameterM: number;
    readonly fluenceJPerM2: number;
    readonly couplingNPerW: number;
    readonly deltaVMPerS: number;
  }[];
  readonly deltaV: {
    readonly radialMPerS: number;
    readonly transverseMPerS: number;
    readonly normalMPerS: number;
  };
  readonly semiMajorAxisBeforeKm: number;
  readonly semiMajorAxisAfterKm: BandBody;
  readonly perigeeBeforeKm: number;
  readonly perigeeAfterKm: BandBody;
  readonly best: SpanBody | null;
}
