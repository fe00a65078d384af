import { boolean, doublePrecision, index, integer, jsonb, pgTable, text, uuid } from "drizzle-orm/pg-core";
import { identifier } from "../columns";

/** A laser site. Limits are its own settings; every change raises the version. */
export const stations = pgTable("stations", {
  id: identifier(),
  name: text("name").notNull().unique(),
  latitudeDeg: doublePrecision("latitude_deg").notNull(),
  longitudeDeg: doublePrecision("longitude_deg").notNull(),
  altitudeM: doublePrecision("altitude_m").notNull(),
  timeZone: text("time_zone").notNull(),
  minElevationDeg: doublePrecision("min_elevation_deg").notNull(),
  maxElevationDeg: doublePrecision("max_elevation_deg").notNull(),
  /** Horizon in steps: from each azimuth on, clockwise, nothing below the elevation is seen. */
  horizonMask: jsonb("horizon_mask")
    .$type<{ azimuthDeg: number; elevationDeg: number }[]>()
    .notNull()
    .default([]),
  /** The mount can't turn faster in azimuth, which shuts it out near the zenith; null: no limit. */
  maxAzimuthRateDegPerS: doublePrecision("max_azimuth_rate_deg_per_s"),
  /** Daily opening hours in UTC as minutes of the day, [from, to); from > to runs over midnight. */
  openingHours: jsonb("opening_hours").$type<{ fromMin: number; toMin: number }[]>().notNull(),
  /** Time from rise to a confirmed identity of the target. */
  acquisitionS: integer("acquisition_s").notNull(),
  /** Kept free at both edges of every opening: clock and shutter latency. */
  guardS: integer("guard_s").notNull(),
  slewS: integer("slew_s").notNull(),
  coolDownS: integer("cool_down_s").notNull(),
  minDwellS: integer("min_dwell_s").notNull(),
  maxDwellS: integer("max_dwell_s").notNull(),
  maxPulses: integer("max_pulses"),
  maxEnergyJ: doublePrecision("max_energy_j"),
  /** An element set older than this at the dwell leaves the pass pending; twice as old is not checked. */
  elementAgeLimitH: doublePrecision("element_age_limit_h").notNull(),
  version: integer("version").notNull().default(1),
});

/** One configuration of a station's laser. */
export const laserSettings = pgTable(
  "laser_settings",
  {
    id: identifier(),
    stationId: uuid("station_id")
      .notNull()
      .references(() => stations.id),
    name: text("name").notNull(),
    /** Only "pulsed" is modelled so far; the check constraint says so. */
    mode: text("mode").notNull(),
    wavelengthNm: doublePrecision("wavelength_nm").notNull(),
    pulseEnergyJ: doublePrecision("pulse_energy_j").notNull(),
    pulseWidthNs: doublePrecision("pulse_width_ns").notNull(),
    repetitionRateHz: doublePrecision("repetition_rate_hz").notNull(),
    apertureM: doublePrecision("aperture_m").notNull(),
    beamQuality: doublePrecision("beam_quality").notNull(),
    zenithTransmission: doublePrecision("zenith_transmission").notNull(),
    strehl: doublePrecision("strehl").notNull(),
    jitterUrad: doublePrecision("jitter_urad").notNull(),
    /** "gaussian", "airy" or a number as text. */
    spotConvention: text("spot_convention").notNull(),
    wallPlugEfficiency: doublePrecision("wall_plug_efficiency").notNull(),
    active: boolean("active").notNull().default(true),
    version: integer("version").notNull().default(1),
  },
  (t) => [index("laser_settings_station").on(t.stationId)],
);
