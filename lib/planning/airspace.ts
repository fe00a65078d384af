import { DEG, EARTH_FLATTENING, EARTH_RADIUS_KM } from "@/lib/physics/constants";
import { makeSiteFrame, type SiteFrame } from "@/lib/physics/frames/earth";
import type { Site } from "@/lib/physics/orbit/elements";
import { dot, subtract } from "@/lib/physics/vector";

/** The shape of an airspace volume: a closed ring of [longitudeDeg, latitudeDeg] and heights in metres. */
export interface VolumeShape {
  readonly id: string;
  readonly version: number;
  readonly ring: readonly (readonly [number, number])[];
  readonly floorM: number;
  readonly ceilingM: number;
}

/** A point of the ground as seen from a station, km: along the surface towards east and towards north. */
export interface GroundPoint {
  readonly eastKm: number;
  readonly northKm: number;
}

/** A station as the centre of its own map, on a sphere that fits the ellipsoid there. */
export interface StationMap {
  readonly frame: SiteFrame;
  readonly sphereKm: number;
}

/** A volume with its ring on the map of one station; an empty ring means that it may be anywhere. */
export interface PlacedVolume {
  readonly id: string;
  readonly version: number;
  readonly floorKm: number;
  readonly ceilingKm: number;
  readonly ring: readonly GroundPoint[];
}

/** Ring edges are straight in longitude and latitude (RFC 7946); longer ones are cut, degrees. */
const LONGEST_EDGE_DEG = 0.25;

/**
 * The map of a station: ground distance and direction kept from the centre (azimuthal equidistant), so
 * that the track under a beam is a straight line from the origin. The sphere has the Gaussian mean radius
 * √(MN) at the station's latitude.
 */
export function stationMap(site: Site): StationMap {
  const e2 = EARTH_FLATTENING * (2 - EARTH_FLATTENING);
  const sinLat = Math.sin(site.latitudeDeg * DEG);
  const sphereKm = (EARTH_RADIUS_KM * Math.sqrt(1 - e2)) / (1 - e2 * sinLat * sinLat);
  return { frame: makeSiteFrame(site), sphereKm };
}

/** Where a point of the ground lies on a station's map. */
export function groundPoint(map: StationMap, longitudeDeg: number, latitudeDeg: number): GroundPoint {
  const ground = makeSiteFrame({ longitudeDeg, latitudeDeg, altitudeM: 0 }).positionKm;
  const d = subtract(ground, map.frame.positionKm);
  const east = dot(d, map.frame.east);
  const north = dot(d, map.frame.north);
  const level = Math.hypot(east, north);
  if (level === 0) return { eastKm: 0, northKm: 0 };
  const up = dot(d, map.frame.up) + map.frame.site.altitudeM / 1000;
  // Central angle from the chord's parts along and across the station's vertical; good past 90°.
  const distanceKm = map.sphereKm * Math.atan2(level, map.sphereKm + up);
  return { eastKm: (east / level) * distanceKm, northKm: (north / level) * distanceKm };
}

/**
 * A volume on the map of a station. Crossing the antimeridian or a pole makes no difference there. A ring
 * that encloses nothing or holds something that is no number is kept as empty: it may be anywhere.
 */
export function placeVolume(map: StationMap, shape: VolumeShape): PlacedVolume {
  const isReadable = shape.ring.every(([longitude, latitude]) => Number.isFinite(longitude + latitude));
  const dense = isReadable ? denseRing(shape.ring) : [];
  const ring = dense.length < 3 ? [] : dense.map(([lon, lat]) => groundPoint(map, lon, lat));
  const { id, version, floorM, ceilingM } = shape;
  return { id, version, floorKm: floorM / 1000, ceilingKm: ceilingM / 1000, ring };
}

/** The ring as an open list of corners with long edges cut; the shorter way round in longitude is taken. */
function denseRing(ring: readonly (readonly [number, number])[]): [number, number][] {
  const dense: [number, number][] = [];
  for (const [i, from] of ring.entries()) {
    const to = ring[(i + 1) % ring.length] ?? from;
    const dLongitude = ((((to[0] - from[0] + 180) % 360) + 360) % 360) - 180;
    const dLatitude = to[1] - from[1];
    const parts = Math.max(1, Math.ceil(Math.hypot(dLongitude, dLatitude) / LONGEST_EDGE_DEG));
    if (dLongitude === 0 && dLatitude === 0) continue;
    for (let k = 0; k < parts; k++) {
      dense.push([from[0] + (dLongitude * k) / parts, from[1] + (dLatitude * k) / parts]);
    }
  }
  return dense;
}

/** Ids and versions of volumes as one text: a stored geometry with another key is out of date. */
export function airspaceKey(volumes: readonly { readonly id: string; readonly version: number }[]): string {
  return volumes
    .map((volume) => `${volume.id}:${volume.version}`)
    .sort()
    .join(" ");
}
