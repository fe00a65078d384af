import type { laserSettings, stations } from "@/db/schema/stations";

type StationRow = typeof stations.$inferInsert;
type LaserRow = Omit<typeof laserSettings.$inferInsert, "stationId">;

/** An invented station with its one active laser setting. */
export interface InventedStation {
  readonly station: StationRow & { name: string };
  readonly laser: LaserRow;
}

const LIMITS = {
  maxElevationDeg: 86,
  maxAzimuthRateDegPerS: 4,
  acquisitionS: 30,
  guardS: 2,
  slewS: 45,
  coolDownS: 90,
  minDwellS: 8,
  maxDwellS: 180,
  maxPulses: null,
  maxEnergyJ: null,
  elementAgeLimitH: 72,
} as const;

const ALL_DAY = [{ fromMin: 0, toMin: 1440 }];

const LASER = {
  mode: "pulsed",
  pulseWidthNs: 5,
  beamQuality: 1.6,
  strehl: 0.7,
  jitterUrad: 0.05,
  spotConvention: "gaussian",
  wallPlugEfficiency: 0.12,
} as const;

/** Four invented stations on four continents; figures of the size that published station studies use. */
export const INVENTED_STATIONS: readonly InventedStation[] = [
  {
    station: {
      ...LIMITS,
      name: "Corvane Ridge",
      horizonMask: [
        { azimuthDeg: 0, elevationDeg: 12 },
        { azimuthDeg: 35, elevationDeg: 31 },
        { azimuthDeg: 75, elevationDeg: 18 },
        { azimuthDeg: 140, elevationDeg: 8 },
        { azimuthDeg: 250, elevationDeg: 28 },
        { azimuthDeg: 290, elevationDeg: 15 },
      ],
      latitudeDeg: 37.214,
      longitudeDeg: -2.546,
      altitudeM: 2168,
      timeZone: "Europe/Madrid",
      minElevationDeg: 25,
      openingHours: ALL_DAY,
    },
    laser: {
      ...LASER,
      name: "Corvane 1.06 µm, 7 kJ",
      wavelengthNm: 1064,
      pulseEnergyJ: 7000,
      repetitionRateHz: 10,
      apertureM: 12,
      zenithTransmission: 0.86,
    },
  },
  {
    station: {
      ...LIMITS,
      name: "Tessaly Downs",
      horizonMask: [
        { azimuthDeg: 0, elevationDeg: 4 },
        { azimuthDeg: 200, elevationDeg: 29 },
        { azimuthDeg: 230, elevationDeg: 6 },
      ],
      latitudeDeg: -31.482,
      longitudeDeg: 117.915,
      altitudeM: 412,
      timeZone: "Australia/Perth",
      minElevationDeg: 25,
      openingHours: ALL_DAY,
    },
    laser: {
      ...LASER,
      name: "Tessaly 532 nm, 4 kJ",
      wavelengthNm: 532,
      pulseEnergyJ: 4000,
      repetitionRateHz: 10,
      apertureM: 8,
      zenithTransmission: 0.74,
    },
  },
  {
    station: {
      ...LIMITS,
      name: "Île Marrec",
      horizonMask: [
        { azimuthDeg: 0, elevationDeg: 10 },
        { azimuthDeg: 80, elevationDeg: 36 },
        { azimuthDeg: 130, elevationDeg: 14 },
        { azimuthDeg: 300, elevationDeg: 33 },
        { azimuthDeg: 330, elevationDeg: 10 },
      ],
      latitudeDeg: -21.108,
      longitudeDeg: 55.712,
      altitudeM: 2240,
      timeZone: "Indian/Reunion",
      minElevationDeg: 30,
      openingHours: [{ fromMin: 13 * 60, toMin: 11 * 60 }],
    },
    laser: {
      ...LASER,
      name: "Marrec 1.03 µm, 9 kJ",
      wavelengthNm: 1030,
      pulseEnergyJ: 9000,
      repetitionRateHz: 8,
      apertureM: 13,
      zenithTransmission: 0.88,
    },
  },
  {
    station: {
      ...LIMITS,
      name: "Salt Pan North",
      horizonMask: [
        { azimuthDeg: 0, elevationDeg: 5 },
        { azimuthDeg: 60, elevationDeg: 27 },
        { azimuthDeg: 120, elevationDeg: 9 },
      ],
      latitudeDeg: -23.874,
      longitudeDeg: -67.921,
      altitudeM: 2655,
      timeZone: "America/Santiago",
      minElevationDeg: 20,
      openingHours: ALL_DAY,
    },
    laser: {
      ...LASER,
      name: "Salt Pan 1.06 µm, 7.5 kJ",
      wavelengthNm: 1064,
      pulseEnergyJ: 7500,
      repetitionRateHz: 11,
      apertureM: 13,
      zenithTransmission: 0.9,
    },
  },
];
