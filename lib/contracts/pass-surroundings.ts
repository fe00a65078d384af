import type { SpanBody } from "./common";

/** A point under the fragment. */
export interface GroundPointBody {
  readonly at: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly heightKm: number;
}

/** A station on the map, with the circle within which the fragment would stand over its elevation floor. */
export interface GroundStationBody {
  readonly id: string;
  readonly name: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly minElevationDeg: number;
  /** Radius of that circle as an angle at the Earth's centre. */
  readonly footprintDeg: number;
}

/** The ground under a pass: a quarter of an orbit before culmination to a quarter after. */
export interface GroundBody {
  readonly points: readonly GroundPointBody[];
  /** Height of the fragment at culmination, for which the circles are drawn. */
  readonly heightKm: number;
  readonly stations: readonly GroundStationBody[];
  /** Where it is deepest night at culmination: the point opposite the Sun. */
  readonly midnight: { readonly latitudeDeg: number; readonly longitudeDeg: number };
}

/** A protected object near the beam: its way over the station while it is near. */
export interface NearObjectBody extends SpanBody {
  readonly name: string;
  readonly class: string;
  readonly minSeparationDeg: number;
  readonly minSeparationAt: string;
  /** Half-angle of the cone that is kept free of it, and what the age of both element sets adds. */
  readonly halfAngleDeg: number;
  readonly addedDeg: number;
  readonly samples: readonly {
    readonly at: string;
    readonly azimuthDeg: number;
    readonly elevationDeg: number;
    readonly separationDeg: number;
  }[];
}

/** What else stands in the sky during a pass: GET /api/passes/:id/sky. Geometric, without refraction. */
export interface PassSkyBody {
  /** Culmination, for which Sun, Moon and darkness are told. */
  readonly at: string;
  readonly sun: { readonly azimuthDeg: number; readonly elevationDeg: number };
  readonly moon: {
    readonly azimuthDeg: number;
    readonly elevationDeg: number;
    /** Share of the Moon's disc that is lit, 0 to 1. */
    readonly litShare: number;
  };
  /** day, civil twilight, nautical twilight, astronomical twilight or night, at the station. */
  readonly darkness: string;
  /** How the Sun shines on the fragment; empty where its element set gives no state. */
  readonly sunlight: readonly (SpanBody & { readonly sunlight: "sunlit" | "penumbra" | "umbra" })[];
  /** When the pass was screened; null: not yet, and then no object is shown. */
  readonly screenedAt: string | null;
  /** Objects that come within this angle of the beam, or within their own cone, count as near. */
  readonly withinDeg: number;
  /** The most pressing of them, by least separation over the kept angle. */
  readonly near: readonly NearObjectBody[];
  /** How many there are in all. */
  readonly nearCount: number;
  /** Protected objects that could not be looked at: no usable element set. */
  readonly unseen: readonly string[];
}
