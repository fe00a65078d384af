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
