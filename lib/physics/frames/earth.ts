import {
  DEG,
  EARTH_FLATTENING,
  EARTH_RADIUS_KM,
  EARTH_ROTATION_RAD_PER_S,
  TWO_PI,
} from "@/lib/physics/constants";
import type { Site } from "@/lib/physics/orbit/elements";
import type { OrbitState } from "@/lib/physics/orbit/propagate";
import { daysSinceJ2000 } from "@/lib/physics/time";
import { dot, subtract, type Vec3 } from "@/lib/physics/vector";

/** A station with its local axes, all in the Earth-fixed frame (km and unit vectors). */
export interface SiteFrame {
  readonly site: Site;
  readonly positionKm: Vec3;
  readonly east: Vec3;
  readonly north: Vec3;
  readonly up: Vec3;
}

/** Where an object stands as seen from a station; azimuth from north over east, geometric elevation. */
export interface LookAngles {
  readonly azimuthRad: number;
  readonly elevationRad: number;
  readonly rangeKm: number;
  readonly rangeRateKmPerS: number;
  readonly azimuthRateRadPerS: number;
  readonly elevationRateRadPerS: number;
}

const E2 = EARTH_FLATTENING * (2 - EARTH_FLATTENING);

/**
 * Greenwich mean sidereal time in radians, 0 to 2π (IAU 1982; Vallado et al. 2006, AIAA 2006-6753).
 * UT1 is taken as UTC: at most 0.9 s, that is 0.004 degrees or 0.4 km on the ground.
 */
export function gmstRad(atMs: number): number {
  const days = daysSinceJ2000(atMs);
  const t = days / 36525;
  // 876600 h per century are one turn a day: taken as a fraction of a day no digits are lost.
  const seconds =
    67310.54841 + 86400 * (days - Math.floor(days)) + t * (8640184.812866 + t * (0.093104 - 6.2e-6 * t));
  const turns = seconds / 86400;
  return TWO_PI * (turns - Math.floor(turns));
}

/** TEME to Earth-fixed by sidereal time alone: polar motion (under 10 m) is left out. km and km/s. */
export function temeToEcef(state: OrbitState, atMs: number): OrbitState {
  const angle = gmstRad(atMs);
  const r = rotateZ(state.rKm, angle);
  const v = rotateZ(state.vKmPerS, angle);
  const w = EARTH_ROTATION_RAD_PER_S;
  return { rKm: r, vKmPerS: { x: v.x + w * r.y, y: v.y - w * r.x, z: v.z } };
}

/** Components of a vector in axes turned by an angle about z. */
function rotateZ(a: Vec3, angleRad: number): Vec3 {
  const c = Math.cos(angleRad);
  const s = Math.sin(angleRad);
  return { x: c * a.x + s * a.y, y: c * a.y - s * a.x, z: a.z };
}

/** Earth-fixed position (km) and local axes of a geodetic WGS-84 site. */
export function makeSiteFrame(site: Site): SiteFrame {
  const lat = site.latitudeDeg * DEG;
  const lon = site.longitudeDeg * DEG;
  const [sinLat, cosLat, sinLon, cosLon] = [Math.sin(lat), Math.cos(lat), Math.sin(lon), Math.cos(lon)];
  const curvatureKm = EARTH_RADIUS_KM / Math.sqrt(1 - E2 * sinLat * sinLat);
  const heightKm = site.altitudeM / 1000;
  const rhoKm = (curvatureKm + heightKm) * cosLat;
  return {
    site,
    positionKm: { x: rhoKm * cosLon, y: rhoKm * sinLon, z: (curvatureKm * (1 - E2) + heightKm) * sinLat },
    east: { x: -sinLon, y: cosLon, z: 0 },
    north: { x: -sinLat * cosLon, y: -sinLat * sinLon, z: cosLat },
    up: { x: cosLat * cosLon, y: cosLat * sinLon, z: sinLat },
  };
}

/**
 * Azimuth, elevation, range and their rates of an Earth-fixed state, without refraction. At the exact
 * zenith azimuth and its rate are 0 and the elevation rate is the way down.
 */
export function lookAngles(frame: SiteFrame, ecef: OrbitState): LookAngles {
  const d = subtract(ecef.rKm, frame.positionKm);
  const [e, n, u] = [dot(d, frame.east), dot(d, frame.north), dot(d, frame.up)];
  const v = ecef.vKmPerS;
  const [eRate, nRate, uRate] = [dot(v, frame.east), dot(v, frame.north), dot(v, frame.up)];
  const level2 = e * e + n * n;
  const level = Math.sqrt(level2);
  const rangeKm = Math.sqrt(level2 + u * u);
  const rangeRateKmPerS = (e * eRate + n * nRate + u * uRate) / rangeKm;
  const azimuth = Math.atan2(e, n);
  return {
    azimuthRad: azimuth < 0 ? azimuth + TWO_PI : azimuth,
    elevationRad: Math.atan2(u, level),
    rangeKm,
    rangeRateKmPerS,
    azimuthRateRadPerS: level2 > 0 ? (eRate * n - nRate * e) / level2 : 0,
    elevationRateRadPerS:
      level > 0 ? (uRate - (rangeRateKmPerS * u) / rangeKm) / level : -Math.hypot(eRate, nRate) / rangeKm,
  };
}

/** Position (km) and velocity (km/s) of a station in TEME at a Unix time in milliseconds. */
export function siteStateTeme(frame: SiteFrame, atMs: number): OrbitState {
  const r = rotateZ(frame.positionKm, -gmstRad(atMs));
  const w = EARTH_ROTATION_RAD_PER_S;
  return { rKm: r, vKmPerS: { x: -w * r.y, y: w * r.x, z: 0 } };
}

/**
 * Geodetic WGS-84 latitude and longitude (degrees, longitude from -180 to 180) and altitude (km) of an
 * Earth-fixed position, by the iteration on latitude (Vallado, algorithm 12); good outside the Earth's core.
 */
export function geodeticFromEcef(rKm: Vec3): {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly altitudeKm: number;
} {
  const rho = Math.hypot(rKm.x, rKm.y);
  let lat = Math.atan2(rKm.z, rho * (1 - E2));
  for (let i = 0; i < 10; i++) {
    const sinLat = Math.sin(lat);
    const next = Math.atan2(rKm.z + (EARTH_RADIUS_KM * E2 * sinLat) / Math.sqrt(1 - E2 * sinLat ** 2), rho);
    const change = Math.abs(next - lat);
    lat = next;
    if (change < 1e-14) break;
  }
  const sinLat = Math.sin(lat);
  // This form of the altitude holds at the poles, where rho / cos(lat) does not.
  const altitudeKm =
    rho * Math.cos(lat) + rKm.z * sinLat - EARTH_RADIUS_KM * Math.sqrt(1 - E2 * sinLat * sinLat);
  return { latitudeDeg: lat / DEG, longitudeDeg: Math.atan2(rKm.y, rKm.x) / DEG, altitudeKm };
}
