import type { PlacedVolume, StationMap } from "./airspace";
import { type BeamTrack, beamTrack, groundDistanceKm, sweptInRing } from "./airspace-beam";
import { type Interval, merge } from "./interval";

/** Where the beam points at one time; geometric angles, refraction left out. */
export interface Pointing {
  readonly atMs: number;
  readonly azimuthRad: number;
  readonly elevationRad: number;
}

/** A stretch is known to this, ms; it is always a little too long, never too short. */
const EDGE_MS = 100;

/**
 * Where the beam runs through a volume. Between two samples the whole area that the beam sweeps is looked
 * at and halved until the edges stand to 0.1 s, so no corner is cut unseen; a gap of under one sample
 * counts as inside. `pointingAt` gives the pointing between samples.
 */
export function volumeSpans(args: {
  readonly map: StationMap;
  readonly volume: PlacedVolume;
  readonly samples: readonly Pointing[];
  readonly pointingAt: (atMs: number) => Pointing;
}): Interval[] {
  const { map, volume, samples, pointingAt } = args;
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
 * The volumes that a beam from the station can reach at all above an elevation: the others need no look.
 * `volume.ring` has its corners at most a quarter of a degree apart, so the nearest corner tells.
 */
export function withinReach(map: StationMap, volume: PlacedVolume, minElevationRad: number): boolean {
  const reachKm = groundDistanceKm({
    sphereKm: map.sphereKm,
    stationKm: map.frame.site.altitudeM / 1000,
    elevationRad: minElevationRad,
    heightKm: volume.ceilingKm,
  });
  if (reachKm === null) return false;
  const cornerSpacingKm = 30;
  const nearestKm = Math.min(...volume.ring.map((corner) => Math.hypot(corner.eastKm, corner.northKm)));
  const origin = { eastKm: 0, northKm: 0 };
  return (
    nearestKm <= reachKm + cornerSpacingKm ||
    sweptInRing({ near: origin, far: origin }, { near: origin, far: origin }, volume.ring)
  );
}
