import type { PlacedVolume, StationMap } from "./airspace";
import { type BeamTrack, beamTrack, groundDistanceKm, insideRing, sweptInRing } from "./airspace-beam";
import { type Interval, merge } from "./interval";

/** Where the beam points at one time; geometric angles, refraction left out. */
export interface Pointing {
  readonly atMs: number;
  readonly azimuthRad: number;
  readonly elevationRad: number;
}

/** Farther than any two neighbouring corners of a placed ring, which stand a quarter of a degree apart. */
const CORNER_SPACING_KM = 30;

/** A stretch is known to this, ms; it is always a little too long, never too short. */
const EDGE_MS = 100;

/**
 * Where the beam runs through a volume. Between two samples the whole area that the beam sweeps is looked
 * at and halved until the edges stand to 0.1 s, so no corner is cut unseen; a gap of under one sample
 * counts as inside. A volume that may be anywhere is everywhere. `pointingAt` gives the pointing between
 * samples.
 */
export function volumeSpans(args: {
  readonly map: StationMap;
  readonly volume: PlacedVolume;
  readonly samples: readonly Pointing[];
  readonly pointingAt: (atMs: number) => Pointing;
}): Interval[] {
  const { map, volume, samples, pointingAt } = args;
  const [first, last] = [samples[0], samples.at(-1)];
  if (volume.ring.length === 0 && first && last) return [{ fromMs: first.atMs, toMs: last.atMs }];
  const trackOf = (pointing: Pointing): BeamTrack | null =>
    beamTrack({
      sphereKm: map.sphereKm,
      stationKm: map.frame.site.altitudeM / 1000,
      azimuthRad: pointing.azimuthRad,
      elevationRad: pointing.elevationRad,
      volume,
    });
  const spans: Interval[] = [];
  const collect = (from: Pointing, to: Pointing, wholeStep: boolean): void => {
    const [a, b] = [trackOf(from), trackOf(to)];
    if (!a || !b || !sweptInRing(a, b, volume.ring)) return;
    const inAtBothEnds = wholeStep && sweptInRing(a, a, volume.ring) && sweptInRing(b, b, volume.ring);
    if (inAtBothEnds || to.atMs - from.atMs <= EDGE_MS) {
      spans.push({ fromMs: from.atMs, toMs: to.atMs });
      return;
    }
    const middle = pointingAt((from.atMs + to.atMs) / 2);
    collect(from, middle, false);
    collect(middle, to, false);
  };
  for (const [i, to] of samples.entries()) {
    const from = samples[i - 1];
    if (from) collect(from, to, true);
  }
  return merge(spans);
}

/**
 * True when a beam from the station above an elevation can reach the volume at all: others need no look.
 */
export function withinReach(map: StationMap, volume: PlacedVolume, minElevationRad: number): boolean {
  const reachKm = groundDistanceKm({
    sphereKm: map.sphereKm,
    stationKm: map.frame.site.altitudeM / 1000,
    elevationRad: minElevationRad,
    heightKm: volume.ceilingKm,
  });
  if (volume.ring.length === 0) return true;
  if (reachKm === null) return false;
  const nearestKm = Math.min(...volume.ring.map((corner) => Math.hypot(corner.eastKm, corner.northKm)));
  return nearestKm <= reachKm + CORNER_SPACING_KM || insideRing({ eastKm: 0, northKm: 0 }, volume.ring);
}
