import type { GroundPoint, PlacedVolume } from "./airspace";

/** The ground track of the part of a beam between two heights; both ends the same for an upright beam. */
export interface BeamTrack {
  readonly near: GroundPoint;
  readonly far: GroundPoint;
}

/**
 * Distance along the ground at which a straight beam stands at a height, km. The station stands at
 * stationKm on a sphere of the given radius; from r² = r₀² + s² + 2 r₀ s sin E for the slant range s.
 * Null when the height lies under the station.
 */
export function groundDistanceKm(args: {
  readonly sphereKm: number;
  readonly stationKm: number;
  readonly elevationRad: number;
  readonly heightKm: number;
}): number | null {
  if (args.heightKm < args.stationKm) return null;
  const r0 = args.sphereKm + args.stationKm;
  const r1 = args.sphereKm + args.heightKm;
  const [sinE, cosE] = [Math.sin(args.elevationRad), Math.cos(args.elevationRad)];
  // (r1 − r0)(r1 + r0) keeps the digits that r1² − r0² would lose.
  const slantKm = Math.sqrt(r0 * r0 * sinE * sinE + (r1 - r0) * (r1 + r0)) - r0 * sinE;
  return args.sphereKm * Math.atan2(slantKm * cosE, r0 + slantKm * sinE);
}

/** The part of the beam between a volume's floor and ceiling; null when the beam starts above it. */
export function beamTrack(args: {
  readonly sphereKm: number;
  readonly stationKm: number;
  readonly azimuthRad: number;
  readonly elevationRad: number;
  readonly volume: Pick<PlacedVolume, "floorKm" | "ceilingKm">;
}): BeamTrack | null {
  const { sphereKm, stationKm, elevationRad, volume } = args;
  const farKm = groundDistanceKm({ sphereKm, stationKm, elevationRad, heightKm: volume.ceilingKm });
  if (farKm === null) return null;
  const nearKm = groundDistanceKm({ sphereKm, stationKm, elevationRad, heightKm: volume.floorKm }) ?? 0;
  const [sinA, cosA] = [Math.sin(args.azimuthRad), Math.cos(args.azimuthRad)];
  return {
    near: { eastKm: nearKm * sinA, northKm: nearKm * cosA },
    far: { eastKm: farKm * sinA, northKm: farKm * cosA },
  };
}

/** True when the point lies inside the ring (even-odd rule). */
export function insideRing(point: GroundPoint, ring: readonly GroundPoint[]): boolean {
  let inside = false;
  let previous = ring.at(-1);
  for (const corner of ring) {
    if (previous && corner.northKm > point.northKm !== previous.northKm > point.northKm) {
      const share = (point.northKm - corner.northKm) / (previous.northKm - corner.northKm);
      if (point.eastKm < corner.eastKm + share * (previous.eastKm - corner.eastKm)) inside = !inside;
    }
    previous = corner;
  }
  return inside;
}

/** True when two closed segments share a point; touching counts. */
export function segmentsMeet(a: GroundPoint, b: GroundPoint, c: GroundPoint, d: GroundPoint): boolean {
  const [abc, abd] = [turn(a, b, c), turn(a, b, d)];
  const [cda, cdb] = [turn(c, d, a), turn(c, d, b)];
  if (abc * abd < 0 && cda * cdb < 0) return true;
  return (
    (abc === 0 && between(a, b, c)) ||
    (abd === 0 && between(a, b, d)) ||
    (cda === 0 && between(c, d, a)) ||
    (cdb === 0 && between(c, d, b))
  );
}

/** Twice the area of the triangle, positive when a → b → c turns left. */
function turn(a: GroundPoint, b: GroundPoint, c: GroundPoint): number {
  return (b.eastKm - a.eastKm) * (c.northKm - a.northKm) - (b.northKm - a.northKm) * (c.eastKm - a.eastKm);
}

/** For a point on the line through a and b: true when it lies on the segment. */
function between(a: GroundPoint, b: GroundPoint, p: GroundPoint): boolean {
  return (
    Math.min(a.eastKm, b.eastKm) <= p.eastKm &&
    p.eastKm <= Math.max(a.eastKm, b.eastKm) &&
    Math.min(a.northKm, b.northKm) <= p.northKm &&
    p.northKm <= Math.max(a.northKm, b.northKm)
  );
}

/** True when the segment runs through the ring or lies inside it. */
export function segmentInRing(a: GroundPoint, b: GroundPoint, ring: readonly GroundPoint[]): boolean {
  if (insideRing(a, ring)) return true;
  let previous = ring.at(-1);
  for (const corner of ring) {
    if (previous && segmentsMeet(a, b, previous, corner)) return true;
    previous = corner;
  }
  return false;
}

/**
 * True when the area that the track sweeps from one position to the next meets the ring: one of the four
 * sides does, or the ring lies wholly inside. Nothing slips through between two samples.
 */
export function sweptInRing(from: BeamTrack, to: BeamTrack, ring: readonly GroundPoint[]): boolean {
  if (segmentInRing(from.near, from.far, ring) || segmentInRing(to.near, to.far, ring)) return true;
  if (segmentInRing(from.near, to.near, ring) || segmentInRing(from.far, to.far, ring)) return true;
  const first = ring[0];
  return first !== undefined && insideRing(first, [from.near, from.far, to.far, to.near]);
}
