import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { DEG, EARTH_RADIUS_KM } from "@/lib/physics/constants";
import { footprintRadiusRad, groundPoints } from "@/lib/physics/frames/ground";
import { makeOrbit } from "@/lib/physics/orbit/propagate";

// The documented example of python-skyfield (documentation/earth-satellites.rst).
const LINES = `1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082
2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473`;

function exampleOrbit() {
  const [set] = parseElementSets(LINES).accepted;
  const made = set ? makeOrbit(set.elements) : null;
  if (!made?.ok) throw new Error("the example must give an orbit");
  return made.orbit;
}

describe("groundPoints", () => {
  it("stands over the sub-point that Skyfield documents", () => {
    const track = groundPoints(exampleOrbit(), [Date.parse("2014-01-23T11:18:07Z")]);
    if (!track.ok) throw new Error(track.reason);
    // 50° 14' 37.4" N, 86° 23' 23.3" W; sidereal time alone, and UT1 taken as UTC, agree to 0.01°.
    expect(Math.abs((track.points[0]?.latitudeDeg ?? 0) - 50.24372)).toBeLessThan(0.01);
    expect(Math.abs((track.points[0]?.longitudeDeg ?? 0) + 86.38981)).toBeLessThan(0.01);
  });

  it("says why there is no track where SGP4 fails", () => {
    const track = groundPoints(exampleOrbit(), [Date.parse("2114-01-23T11:18:07Z")]);
    expect(track).toMatchObject({ ok: false, reason: expect.stringMatching(/^Propagation fails at 2114/) });
  });
});

describe("footprintRadiusRad", () => {
  it("is the angle at which a station sees the object at that elevation", () => {
    for (const [heightKm, elevationDeg] of [
      [400, 25],
      [780, 10],
      [1500, 60],
      [20_000, 5],
    ] as const) {
      const angle = footprintRadiusRad(heightKm, elevationDeg * DEG);
      // The same triangle by plain vectors: the station on the x axis, the object an angle away.
      const up = (EARTH_RADIUS_KM + heightKm) * Math.cos(angle) - EARTH_RADIUS_KM;
      const level = (EARTH_RADIUS_KM + heightKm) * Math.sin(angle);
      expect(Math.atan2(up, level) / DEG).toBeCloseTo(elevationDeg, 9);
    }
  });

  it("reaches 81.3° from below a geostationary satellite, and nowhere but the zenith at 90°", () => {
    // Textbook figure for 0° elevation at 35,786 km (from memory).
    expect(footprintRadiusRad(35_786, 0) / DEG).toBeCloseTo(81.3, 1);
    expect(footprintRadiusRad(800, 90 * DEG)).toBeCloseTo(0, 12);
  });
});
