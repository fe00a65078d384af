import { describe, expect, it } from "vitest";
import { drawGlobe, GLOBE_SIZE } from "@/app/_components/ground-track/globe";
import type { GroundBody } from "@/lib/contracts/pass-surroundings";

const at = (minute: number): string => new Date(Date.UTC(2031, 3, 6, 3, minute)).toISOString();

/** A track along the meridian of 8° E, 4° a minute northwards, over a station at 46° N 8° E. */
const GROUND: GroundBody = {
  points: Array.from({ length: 21 }, (_, i) => {
    return { at: at(i), latitudeDeg: 6 + 4 * i, longitudeDeg: 8, heightKm: 700 };
  }),
  heightKm: 700,
  stations: [
    { id: "own", name: "Own", latitudeDeg: 46, longitudeDeg: 8, minElevationDeg: 25, footprintDeg: 10 },
    { id: "far", name: "Far", latitudeDeg: -46, longitudeDeg: -172, minElevationDeg: 25, footprintDeg: 10 },
  ],
  midnight: { latitudeDeg: 0, longitudeDeg: 8 },
};
const PASS = { from: at(8), to: at(12) };

/** All points of path data made of M, L and Z. */
function pointsOf(path: string): [number, number][] {
  return [...path.matchAll(/(-?[\d.]+),(-?[\d.]+)/g)].map((m) => [Number(m[1]), Number(m[2])]);
}

describe("drawGlobe", () => {
  const globe = drawGlobe(GROUND, "own", PASS, { from: at(9), to: at(11) });
  const middle = GLOBE_SIZE / 2;

  it("has the station in the middle and leaves out what lies behind the Earth", () => {
    expect(globe.stations.map(({ id }) => id)).toEqual(["own"]);
    expect(globe.stations[0]?.place.x).toBeCloseTo(middle, 9);
    expect(globe.stations[0]?.place.y).toBeCloseTo(middle, 9);
  });

  it("draws the circle of the footprint to scale: the sine of its angle on the globe's radius", () => {
    const radius = 172;
    for (const [x, y] of pointsOf(globe.stations[0]?.footprint ?? "")) {
      expect(Math.hypot(x - middle, y - middle)).toBeCloseTo(radius * Math.sin((10 * Math.PI) / 180), 0);
    }
    expect(pointsOf(globe.stations[0]?.footprint ?? "").length).toBeGreaterThan(50);
  });

  it("parts the track at rise and set, northwards being up", () => {
    const [first, last] = [pointsOf(globe.pass)[0], pointsOf(globe.pass).at(-1)];
    expect(globe.rise?.x).toBeCloseTo(middle, 6);
    expect(first?.[1]).toBeCloseTo(globe.rise?.y ?? 0, 0);
    expect(last?.[1]).toBeCloseTo(globe.set?.y ?? 0, 0);
    expect(globe.rise?.y).toBeGreaterThan(globe.set?.y ?? 0);
    // 8° south of the middle at rise.
    expect((globe.rise?.y ?? 0) - middle).toBeCloseTo(172 * Math.sin((8 * Math.PI) / 180), 6);
    expect(pointsOf(globe.before).at(-1)).toEqual(first);
    expect(pointsOf(globe.after)[0]).toEqual(last);
    expect(pointsOf(globe.dwell).length).toBeGreaterThan(2);
  });

  it("carries the coastline, within the globe", () => {
    const land = pointsOf(globe.land);
    expect(land.length).toBeGreaterThan(500);
    for (const [x, y] of land) expect(Math.hypot(x - middle, y - middle)).toBeLessThan(172.2);
  });
});
