/** The newest element set of an object. */
export interface NewestSetBody {
  readonly id: string;
  readonly epochAt: string;
  readonly ageH: number;
  readonly source: string;
  readonly importedAt: string;
}

/** A fragment in a list: GET /api/fragments. */
export interface FragmentBody {
  readonly id: string;
  readonly name: string;
  readonly catalogNumber: number | null;
  readonly localNumber: string | null;
  readonly massKg: number;
  readonly areaM2: number;
  readonly material: string;
  readonly shape: string;
  readonly couplingNPerW: number | null;
  readonly spinRateHz: number | null;
  readonly bodySource: string;
  readonly version: number;
  readonly newestSet: NewestSetBody | null;
  readonly elementSetCount: number;
  readonly nextPassAt: string | null;
  readonly passesAhead: number;
  readonly engagementCount: number;
  /** Last end of lasing, and whether its orbit has been seen anew since. */
  readonly lastFiredAt: string | null;
  readonly awaitsNewElements: boolean;
}

/** Mean elements of a fragment's newest set, with the heights they mean. */
export interface OrbitBody {
  readonly meanMotionRevPerDay: number;
  readonly periodMin: number;
  readonly eccentricity: number;
  readonly inclinationDeg: number;
  readonly raanDeg: number;
  readonly argPericenterDeg: number;
  readonly meanAnomalyDeg: number;
  readonly bstar: number;
  /** From the mean motion by Kepler's law, above the equatorial radius. */
  readonly semiMajorAxisKm: number;
  readonly perigeeKm: number;
  readonly apogeeKm: number;
}

/** One element set of the history, newest first. */
export interface ElementSetLineBody {
  readonly id: string;
  readonly epochAt: string;
  readonly importedAt: string;
  readonly source: string;
  readonly format: string;
  readonly raw: string;
}

/** One fragment in full: GET /api/fragments/:id. */
export interface FragmentSheetBody extends FragmentBody {
  readonly orbit: OrbitBody | null;
  readonly elementSets: readonly ElementSetLineBody[];
  readonly engagements: readonly {
    readonly id: string;
    readonly number: number;
    readonly state: string;
    readonly stationName: string;
    readonly from: string;
    readonly to: string;
    readonly outcome: string | null;
  }[];
}
