import { DEG } from "@/lib/physics/constants";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { placeVolume, stationMap, type VolumeShape } from "@/lib/planning/airspace";
import type { FragmentBody, PulsedLaser } from "@/lib/planning/laser";
import { type ElevationLimits, measurePass } from "@/lib/planning/measure-pass";

/** An invented station, fragment and laser, with one real pass between them. */
const EPOCH = Date.UTC(2031, 3, 5, 18);

export const MAP = stationMap({ latitudeDeg: 46.5, longitudeDeg: 8.2, altitudeM: 1400 });

const made = makeOrbit({
  catalogNumber: 88_001,
  objectName: null,
  objectId: null,
  epochMs: EPOCH,
  meanMotionRevPerDay: 14.4,
  eccentricity: 0.004,
  inclinationDeg: 74,
  raanDeg: 120,
  argPericenterDeg: 80,
  meanAnomalyDeg: 20,
  bstar: 0.0002,
  meanMotionDot: 0.000_01,
  meanMotionDdot: 0,
});
if (!made.ok) throw new Error(made.reason);
export const ORBIT = made.orbit;

export const LASER: PulsedLaser = {
  mode: "pulsed",
  wavelengthNm: 1064,
  pulseEnergyJ: 20_000,
  pulseWidthNs: 5,
  repetitionRateHz: 10,
  apertureM: 8,
  beamQuality: 1.5,
  zenithTransmission: 0.8,
  strehl: 0.6,
  jitterUrad: 0.1,
  spotConvention: "gaussian",
};

export const BODY: FragmentBody = {
  massKg: 0.8,
  areaM2: 0.02,
  material: "aluminium",
  couplingNPerW: null,
  shape: "plate",
  spinRateHz: null,
};

export const LIMITS = { version: 1, minElevationDeg: 20, maxElevationDeg: 88 };

const site = MAP.frame.site;
const found = findPasses(
  ORBIT,
  [{ site, minElevationRad: LIMITS.minElevationDeg * DEG }],
  EPOCH,
  EPOCH + 72 * 3_600_000,
);

/** Every pass of three days that lasts four minutes or more. */
export const PASSES = found.passes
  .map(({ pass }) => ({ ...pass, maxElevationDeg: pass.maxElevationRad / DEG }))
  .filter((pass) => pass.setMs - pass.riseMs > 240_000);

/** A pass measured against a ceiling and volumes. Throws where the orbit gives none. */
export function measured(
  pass: (typeof PASSES)[number],
  limits: ElevationLimits,
  volumes: readonly VolumeShape[],
) {
  const placed = volumes.map((volume) => placeVolume(MAP, volume));
  const result = measurePass({
    orbit: ORBIT,
    elementSetId: "set-1",
    map: MAP,
    limits,
    volumes: placed,
    pass,
  });
  if (!result.ok) throw new Error(result.reason);
  return result.geometry;
}
