import { makeSiteFrame, type SiteFrame } from "../frames/earth";
import type { EarthFixedNode } from "../orbit/earth-fixed";
import type { Site } from "../orbit/elements";
import { norm, scale, type Vec3 } from "../vector";

/** A station made ready for many sightings: numbers only, Earth-fixed, km. */
export interface Sight {
  readonly frame: SiteFrame;
  /** Distance from the Earth's centre, km, and direction from there. */
  readonly radiusKm: number;
  readonly direction: Vec3;
  readonly sinMin: number;
  readonly minElevationRad: number;
}

/** What one sighting gives; every quantity is smooth, also through the zenith. */
export interface Sighting {
  /** Height over the cone of the elevation limit, km: positive exactly when above the limit. */
  overKm: number;
  /** Its rate, km/s. */
  overRate: number;
  /** Sine of the elevation. */
  sinElevation: number;
  /** Has the sign of the elevation rate (km³/s). */
  climb: number;
  /** Range times range rate, km²/s: its sign is the sign of the range rate. */
  receding: number;
  rangeKm: number;
}

/** Prepares a station; the elevation limit is geometric, in radians. */
export function makeSight(site: Site, minElevationRad: number): Sight {
  const frame = makeSiteFrame(site);
  const radiusKm = norm(frame.positionKm);
  const direction = scale(frame.positionKm, 1 / radiusKm);
  return { frame, radiusKm, direction, sinMin: Math.sin(minElevationRad), minElevationRad };
}

/** An empty sighting to be filled again and again. */
export function blankSighting(): Sighting {
  return { overKm: 0, overRate: 0, sinElevation: 0, climb: 0, receding: 0, rangeKm: 0 };
}

/** Sights an object at Earth-fixed position (km) and velocity (km/s) into `out`. */
export function sightAt(
  sight: Sight,
  x: number,
  y: number,
  z: number,
  vx: number,
  vy: number,
  vz: number,
  out: Sighting,
): void {
  const { positionKm: p, up } = sight.frame;
  const dx = x - p.x;
  const dy = y - p.y;
  const dz = z - p.z;
  const high = dx * up.x + dy * up.y + dz * up.z;
  const highRate = vx * up.x + vy * up.y + vz * up.z;
  const range2 = dx * dx + dy * dy + dz * dz;
  const range = Math.sqrt(range2);
  const receding = dx * vx + dy * vy + dz * vz;
  out.overKm = high - sight.sinMin * range;
  out.overRate = highRate - (sight.sinMin * receding) / range;
  out.sinElevation = high / range;
  out.climb = highRate * range2 - high * receding;
  out.receding = receding;
  out.rangeKm = range;
}

/** Sights a node. */
export function sightNode(sight: Sight, n: EarthFixedNode, out: Sighting): void {
  sightAt(sight, n.x, n.y, n.z, n.vx, n.vy, n.vz, out);
}

/** Rate of `climb` at a node, by its acceleration (km³/s²): for Newton's method on the culmination. */
export function climbRate(sight: Sight, n: EarthFixedNode): number {
  const { positionKm: p, up } = sight.frame;
  const dx = n.x - p.x;
  const dy = n.y - p.y;
  const dz = n.z - p.z;
  const high = dx * up.x + dy * up.y + dz * up.z;
  const highRate = n.vx * up.x + n.vy * up.y + n.vz * up.z;
  const highPull = n.ax * up.x + n.ay * up.y + n.az * up.z;
  const receding = dx * n.vx + dy * n.vy + dz * n.vz;
  const speed2 = n.vx * n.vx + n.vy * n.vy + n.vz * n.vz;
  const pulled = dx * n.ax + dy * n.ay + dz * n.az;
  return highPull * (dx * dx + dy * dy + dz * dz) + highRate * receding - high * (speed2 + pulled);
}
