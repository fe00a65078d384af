/** One configuration of a station's laser. */
export interface LaserSettingBody {
  readonly id: string;
  readonly name: string;
  readonly version: number;
  readonly active: boolean;
  readonly mode: string;
  readonly wavelengthNm: number;
  readonly pulseEnergyJ: number;
  readonly pulseWidthNs: number;
  readonly repetitionRateHz: number;
  readonly meanPowerW: number;
  readonly apertureM: number;
  readonly beamQuality: number;
  readonly zenithTransmission: number;
  readonly strehl: number;
  readonly jitterUrad: number;
  readonly spotConvention: string;
  readonly wallPlugEfficiency: number;
}

/** A station with its limits, its laser settings and what lies ahead: GET /api/stations. */
export interface StationBody {
  readonly id: string;
  readonly name: string;
  readonly version: number;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly altitudeM: number;
  readonly timeZone: string;
  readonly minElevationDeg: number;
  readonly maxElevationDeg: number;
  /** Horizon in steps: from each azimuth on, clockwise, nothing below the elevation is seen. */
  readonly horizonMask: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[];
  /** The mount's limit, which shuts it out near the zenith; null: none. */
  readonly maxAzimuthRateDegPerS: number | null;
  /** Minutes of the UTC day, [from, to); from > to runs over midnight. */
  readonly openingHours: readonly { readonly fromMin: number; readonly toMin: number }[];
  readonly acquisitionS: number;
  readonly guardS: number;
  readonly slewS: number;
  readonly coolDownS: number;
  readonly minDwellS: number;
  readonly maxDwellS: number;
  readonly maxPulses: number | null;
  readonly maxEnergyJ: number | null;
  readonly elementAgeLimitH: number;
  readonly lasers: readonly LaserSettingBody[];
  /** Authorities that every engagement of the station concerns. */
  readonly authorities: readonly { readonly id: string; readonly name: string; readonly kind: string }[];
  readonly nextPassAt: string | null;
  readonly passesAhead: number;
  readonly liveEngagements: number;
}
