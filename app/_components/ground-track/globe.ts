import { geoCircle, geoGraticule10, geoOrthographic, geoPath } from "d3-geo";
import type { GroundBody, GroundPointBody } from "@/lib/contracts/pass-surroundings";
import { coastline } from "./coastline";

/** Edge of the square picture, and radius of the globe in it. */
export const GLOBE_SIZE = 360;
const RADIUS = 172;

/** A place in the picture. */
export interface Place {
  readonly x: number;
  readonly y: number;
}

/** Everything that is drawn, as path data and places; outlines behind the Earth are empty. */
export interface Globe {
  readonly sphere: string;
  readonly graticule: string;
  readonly land: string;
  readonly night: string;
  readonly before: string;
  readonly pass: string;
  readonly after: string;
  readonly dwell: string;
  readonly stations: readonly {
    readonly id: string;
    readonly name: string;
    readonly footprint: string;
    readonly place: Place;
  }[];
  readonly rise: Place | null;
  readonly set: Place | null;
}

interface Span {
  readonly from: string;
  readonly to: string;
}

/**
 * The Earth as seen from far above a station, north up (orthographic): half of it, which is just what an
 * orbit covers from a quarter of a revolution before culmination to a quarter after.
 */
export function drawGlobe(ground: GroundBody, stationId: string, pass: Span, dwell: Span | null): Globe {
  const centre = ground.stations.find(({ id }) => id === stationId);
  const projection = geoOrthographic()
    .rotate([-(centre?.longitudeDeg ?? 0), -(centre?.latitudeDeg ?? 0)])
    .translate([GLOBE_SIZE / 2, GLOBE_SIZE / 2])
    .scale(RADIUS)
    .clipAngle(90);
  const path = geoPath(projection).digits(1);
  const circle = (longitudeDeg: number, latitudeDeg: number, radiusDeg: number): string =>
    path(geoCircle().center([longitudeDeg, latitudeDeg]).radius(radiusDeg).precision(3)()) ?? "";
  const line = (points: readonly GroundPointBody[]): string =>
    points.length < 2 ? "" : (path({ type: "LineString", coordinates: points.map(lonLat) }) ?? "");
  // A point that is just behind the limb has no path; only what has one is marked.
  const placeOf = (longitudeDeg: number, latitudeDeg: number): Place | null => {
    if (!path({ type: "Point", coordinates: [longitudeDeg, latitudeDeg] })) return null;
    const [x, y] = projection([longitudeDeg, latitudeDeg]) ?? [Number.NaN, Number.NaN];
    return { x, y };
  };
  const placeAt = (at: string): Place | null => {
    const point = ground.points.find((p) => p.at === at);
    return point ? placeOf(point.longitudeDeg, point.latitudeDeg) : null;
  };
  return {
    sphere: path({ type: "Sphere" }) ?? "",
    graticule: path(geoGraticule10()) ?? "",
    land: path(coastline()) ?? "",
    night: circle(ground.midnight.longitudeDeg, ground.midnight.latitudeDeg, 90),
    before: line(ground.points.filter(({ at }) => at <= pass.from)),
    pass: line(between(ground.points, pass)),
    after: line(ground.points.filter(({ at }) => at >= pass.to)),
    dwell: dwell ? line(between(ground.points, dwell)) : "",
    stations: ground.stations.flatMap(({ id, name, longitudeDeg, latitudeDeg, footprintDeg }) => {
      const place = placeOf(longitudeDeg, latitudeDeg);
      const footprint = circle(longitudeDeg, latitudeDeg, footprintDeg);
      return place ? [{ id, name, footprint, place }] : [];
    }),
    rise: placeAt(pass.from),
    set: placeAt(pass.to),
  };
}

const lonLat = (point: GroundPointBody): [number, number] => [point.longitudeDeg, point.latitudeDeg];

/** The points of a span, its ends included; times on the wire sort as text. */
function between(points: readonly GroundPointBody[], span: Span): GroundPointBody[] {
  return points.filter(({ at }) => at >= span.from && at <= span.to);
}
