import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { groundPoint, placeVolume, stationMap, type VolumeShape } from "@/lib/planning/airspace";
import { beamTrack, groundDistanceKm, insideRing, segmentInRing } from "@/lib/planning/airspace-beam";
import { type Pointing, volumeSpans, withinReach } from "@/lib/planning/airspace-stretches";

const EQUATOR = stationMap({ latitudeDeg: 0, longitudeDeg: 10, altitudeM: 0 });

function volume(amend: Partial<VolumeShape>): VolumeShape {
  const ring: [number, number][] = [
    [10.2, -0.1],
    [10.3, -0.1],
    [10.3, 0.1],
    [10.2, 0.1],
    [10.2, -0.1],
  ];
  return { id: "v", version: 1, ring, floorM: 3000, ceilingM: 9000, ...amend };
}

function trackAt(azimuthDeg: number, elevationDeg: number, shape: VolumeShape, map = EQUATOR) {
  const placed = placeVolume(map, shape);
  const track = beamTrack({
    sphereKm: map.sphereKm,
    stationKm: map.frame.site.altitudeM / 1000,
    azimuthRad: azimuthDeg * DEG,
    elevationRad: elevationDeg * DEG,
    volume: placed,
  });
  return { placed, track };
}

function hits(azimuthDeg: number, elevationDeg: number, shape: VolumeShape, map = EQUATOR): boolean {
  const { placed, track } = trackAt(azimuthDeg, elevationDeg, shape, map);
  return track !== null && segmentInRing(track.near, track.far, placed.ring);
}

describe("beam height over the ground", () => {
  it("is a right triangle where the Earth is as good as flat", () => {
    // tan 45° = 1: 10 km up is 10 km along; by hand, on a sphere so large that it is flat.
    const args = { sphereKm: 1e9, stationKm: 0, elevationRad: 45 * DEG };
    expect(groundDistanceKm({ ...args, heightKm: 10 })).toBeCloseTo(10, 6);
    // tan 60° = √3.
    expect(groundDistanceKm({ ...args, elevationRad: 60 * DEG, heightKm: 10 })).toBeCloseTo(
      10 / Math.sqrt(3),
      6,
    );
  });

  it("is Pythagoras for a level beam on a curved Earth", () => {
    // A tangent of the sphere reaches height h at the central angle acos(R / (R + h)).
    const expected = 6371 * Math.acos(6371 / 6471);
    const found = groundDistanceKm({ sphereKm: 6371, stationKm: 0, elevationRad: 0, heightKm: 100 });
    expect(found).toBeCloseTo(expected, 6);
  });

  it("obeys the law of sines in the triangle of Earth's centre, station and beam", () => {
    const [sphereKm, stationKm, heightKm, elevationDeg] = [6371, 2, 30, 12];
    const found = groundDistanceKm({ sphereKm, stationKm, elevationRad: elevationDeg * DEG, heightKm }) ?? 0;
    // sin(angle at the beam) / r₀ = sin(90° + E) / r₁; the angles sum to 180°.
    const atBeam = Math.asin(((sphereKm + stationKm) * Math.cos(elevationDeg * DEG)) / (sphereKm + heightKm));
    expect(found).toBeCloseTo(sphereKm * (Math.PI / 2 - elevationDeg * DEG - atBeam), 6);
  });

  it("is nothing straight up, and unknown under the station", () => {
    const args = { sphereKm: 6371, stationKm: 2, elevationRad: 90 * DEG };
    expect(groundDistanceKm({ ...args, heightKm: 12 })).toBeCloseTo(0, 9);
    expect(groundDistanceKm({ ...args, heightKm: 1 })).toBeNull();
  });
});

describe("a station's map", () => {
  it("keeps distances on the ellipsoid", () => {
    // One degree of longitude on the equator is 2π·6378.137 / 360 = 111.3195 km.
    const east = groundPoint(EQUATOR, 10.5, 0);
    expect(east.northKm).toBeCloseTo(0, 9);
    expect(Math.abs(east.eastKm - 111.3195 / 2)).toBeLessThan(0.005);
    // One degree of latitude from the equator is 110.574 km on WGS-84 (NIMA TR8350.2 ellipsoid).
    const north = groundPoint(EQUATOR, 10, 0.5);
    expect(Math.abs(north.northKm - 110.574 / 2)).toBeLessThan(0.005);
  });

  it("does not see the antimeridian or the pole", () => {
    const fiji = stationMap({ latitudeDeg: -17, longitudeDeg: 179.9, altitudeM: 0 });
    const across = groundPoint(fiji, -179.9, -17);
    // 0.2° of a circle of latitude: 0.2 · π/180 · 6378.137 · cos 17° / √(1 − e² sin² 17°) = 21.296 km.
    expect(Math.abs(across.eastKm - 21.296)).toBeLessThan(0.01);
    const pole = stationMap({ latitudeDeg: 89.9, longitudeDeg: 0, altitudeM: 0 });
    // Over the pole: 0.2° of the meridian, some 22.34 km at 111.694 km per degree there.
    expect(Math.abs(groundPoint(pole, 180, 89.9).northKm - 22.339)).toBeLessThan(0.01);
  });
});

describe("beam and volume", () => {
  // The volume lies 22.26 to 33.40 km east, from 3 to 9 km up: seen under atan(3 / 33.4) = 5.1° to
  // atan(9 / 22.26) = 22.0°, both some tenths less for the curve of the Earth.
  it.each([
    [90, 15, true, "through the middle"],
    [90, 5.6, true, "in at the ceiling's far corner from below"],
    [90, 4.4, false, "under it: 2.6 km up at its far edge"],
    [90, 21, true, "just in at the near edge under the ceiling"],
    [90, 23, false, "over it: 9.4 km up at its near edge"],
    [0, 15, false, "away from it"],
    [270, 15, false, "on the other side"],
  ])("azimuth %d°, elevation %d°: %s (%s)", (azimuth, elevation, expected) => {
    expect(hits(azimuth, elevation, volume({}))).toBe(expected);
  });

  it("crosses a ring without an end in it", () => {
    // A slice 1 km wide that the beam passes at 5 km height, 27.8 km out.
    const slice = volume({
      ring: [
        [10.25, -0.1],
        [10.259, -0.1],
        [10.259, 0.1],
        [10.25, 0.1],
        [10.25, -0.1],
      ],
    });
    const { placed, track } = trackAt(90, 10, slice);
    expect(track && insideRing(track.near, placed.ring)).toBe(false);
    expect(track && insideRing(track.far, placed.ring)).toBe(false);
    expect(hits(90, 10, slice)).toBe(true);
  });

  it("hits what stands overhead, and only up to the station's own height", () => {
    const above = volume({
      ring: [
        [9.9, -0.1],
        [10.1, -0.1],
        [10.1, 0.1],
        [9.9, 0.1],
        [9.9, -0.1],
      ],
    });
    expect(hits(0, 90, above)).toBe(true);
    expect(hits(0, 90, volume({}))).toBe(false);
    const high = stationMap({ latitudeDeg: 0, longitudeDeg: 10, altitudeM: 4000 });
    expect(hits(0, 90, above, high)).toBe(true);
    expect(hits(0, 90, { ...above, ceilingM: 3500 }, high)).toBe(false);
  });

  it("works across the antimeridian", () => {
    const map = stationMap({ latitudeDeg: -17, longitudeDeg: 179.9, altitudeM: 0 });
    const across = volume({
      ring: [
        [-179.98, -17.1],
        [-179.88, -17.1],
        [-179.88, -16.9],
        [-179.98, -16.9],
        [-179.98, -17.1],
      ],
    });
    expect(hits(90, 20, across, map)).toBe(true);
    expect(hits(270, 20, across, map)).toBe(false);
    const over = volume({
      ring: [
        [179.95, -17.1],
        [-179.95, -17.1],
        [-179.95, -16.9],
        [179.95, -16.9],
        [179.95, -17.1],
      ],
    });
    expect(hits(90, 45, over, map)).toBe(true);
  });

  it("knows which volumes a station can reach", () => {
    const near = placeVolume(EQUATOR, volume({}));
    expect(withinReach(EQUATOR, near, 20 * DEG)).toBe(true);
    const far = placeVolume(EQUATOR, volume({ ring: volume({}).ring.map(([lon, lat]) => [lon + 5, lat]) }));
    expect(withinReach(EQUATOR, far, 20 * DEG)).toBe(false);
    const around = placeVolume(
      EQUATOR,
      volume({
        ring: [
          [-10, -20],
          [30, -20],
          [30, 20],
          [-10, 20],
          [-10, -20],
        ],
      }),
    );
    expect(withinReach(EQUATOR, around, 20 * DEG)).toBe(true);
  });
});

describe("stretches of a moving beam", () => {
  /** A beam at 15° elevation that turns by the given rate from azimuth 45° at time 0. */
  function turning(degPerS: number): (atMs: number) => Pointing {
    return (atMs) => ({
      atMs,
      azimuthRad: (45 + (degPerS * atMs) / 1000) * DEG,
      elevationRad: 15 * DEG,
    });
  }

  function spans(pointingAt: (atMs: number) => Pointing, seconds: number, shape: VolumeShape) {
    const samples = Array.from({ length: seconds + 1 }, (_, i) => pointingAt(i * 1000));
    return volumeSpans({ map: EQUATOR, volume: placeVolume(EQUATOR, shape), samples, pointingAt });
  }

  it("stand to 0.1 s, on the safe side", () => {
    const found = spans(turning(1), 90, volume({}));
    expect(found).toHaveLength(1);
    // At 15° the beam is between 3 and 9 km from 11.2 to 33.3 km out. The near corners lie 22.26 km east
    // and 11.06 km north and south, so the beam meets them at azimuths 90° ∓ atan(11.06 / 22.26) = 26.42°.
    const [enterS, leaveS] = [90 - 26.42 - 45, 90 + 26.42 - 45];
    const [first] = found;
    expect((first?.fromMs ?? 0) / 1000).toBeLessThanOrEqual(enterS + 0.02);
    expect((first?.fromMs ?? 0) / 1000).toBeGreaterThan(enterS - 0.15);
    expect((first?.toMs ?? 0) / 1000).toBeGreaterThanOrEqual(leaveS - 0.02);
    expect((first?.toMs ?? 0) / 1000).toBeLessThan(leaveS + 0.15);
  });

  it("does not miss what a fast beam sweeps over between two samples", () => {
    const sliver = volume({
      ring: [
        [10.2, 0.0],
        [10.3, 0.0],
        [10.3, 0.005],
        [10.2, 0.005],
        [10.2, 0.0],
      ],
    });
    // 30° a second: at whole seconds the beam stands at azimuths 45°, 75°, 105° and never in the sliver.
    const found = spans(turning(30), 3, sliver);
    expect(found).toHaveLength(1);
    expect(found[0]?.fromMs).toBeGreaterThan(1300);
    expect(found[0]?.toMs).toBeLessThan(1700);
    expect((found[0]?.toMs ?? 0) - (found[0]?.fromMs ?? 0)).toBeLessThanOrEqual(200);
  });

  it("are the whole span for a volume whose ring can't be read", () => {
    for (const ring of [
      [],
      [[10, 0]],
      [
        [10, 0],
        [10, Number.NaN],
        [11, 0],
      ],
    ] as [number, number][][]) {
      const unreadable = volume({ ring });
      expect(withinReach(EQUATOR, placeVolume(EQUATOR, unreadable), 20 * DEG)).toBe(true);
      expect(spans(turning(1), 10, unreadable)).toEqual([{ fromMs: 0, toMs: 10_000 }]);
    }
  });

  it("are empty when the beam never comes near", () => {
    expect(spans(turning(1), 10, volume({}))).toEqual([]);
  });
});
