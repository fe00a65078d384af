import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { geodeticFromEcef, lookAngles, makeSiteFrame, temeToEcef } from "@/lib/physics/frames/earth";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { elementsFromLines } from "../../fixtures/read-tle";

// Source: Skyfield's documentation, "Earth Satellites" (documentation/earth-satellites.rst): the ISS over
// Bluffton, Ohio. Events are printed to the second; elevation, azimuth and range at the events were computed
// with Debian's skyfield 1.45. Tolerances: 1 s, 0.1 degrees, 2 km (a second of range rate along the track).
const site = { latitudeDeg: 40.8939, longitudeDeg: -83.8917, altitudeM: 0 };
const line1 = "1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082";
const line2 = "2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473";

function iss(): Orbit {
  const made = makeOrbit(elementsFromLines(line1, line2));
  if (!made.ok) throw new Error(made.reason);
  return made.orbit;
}

describe("the published pass example", () => {
  const { passes, failure } = findPasses(
    iss(),
    [{ site, minElevationRad: 30 * DEG }],
    Date.parse("2014-01-23T00:00:00Z"),
    Date.parse("2014-01-24T00:00:00Z"),
  );

  it("finds exactly the two passes above 30 degrees", () => {
    expect(failure).toBeNull();
    expect(passes).toHaveLength(2);
  });

  it.each([
    [0, "06:25:37", "06:26:58", "06:28:19", 54.357, [203.222, 139.473, 75.945], 506.41],
    [1, "12:54:56", "12:56:27", "12:57:58", 85.746, [308.703, 36.372, 123.892], 420.56],
  ] as const)("pass %i", (i, rise, culminate, set, elevationDeg, [riseDeg, topDeg, setDeg], rangeKm) => {
    const pass = passes[i]?.pass;
    if (!pass) throw new Error("the pass is missing");
    for (const [got, want] of [
      [pass.riseMs, rise],
      [pass.culminateMs, culminate],
      [pass.setMs, set],
    ] as const) {
      expect(Math.abs(got - Date.parse(`2014-01-23T${want}Z`))).toBeLessThanOrEqual(1000);
    }
    expect(Math.abs(pass.maxElevationRad / DEG - elevationDeg)).toBeLessThan(0.1);
    expect(Math.abs(pass.riseAzimuthRad / DEG - riseDeg)).toBeLessThan(0.1);
    expect(Math.abs(pass.setAzimuthRad / DEG - setDeg)).toBeLessThan(0.1);
    // Four degrees from the zenith the azimuth runs 14 degrees in a second: compared by its arc on the sky.
    const arcDeg = Math.abs(pass.culminationAzimuthRad / DEG - topDeg) * Math.cos(pass.maxElevationRad);
    expect(arcDeg).toBeLessThan(0.6);
    expect(Math.abs(pass.minRangeKm - rangeKm)).toBeLessThan(2);
    expect([pass.underWayAtFrom, pass.underWayAtTo]).toEqual([false, false]);
  });

  it("stands where Skyfield puts it at 11:18:07 UTC (0.02 degrees, 1 km)", () => {
    // Published: altitude 16° 16' 32.6", azimuth 350° 15' 20.4", 1168.7 km; sub-point 50° 14' 37.4" N,
    // 86° 23' 23.3" W. Sidereal time alone agrees to some 0.01 degrees.
    const at = Date.parse("2014-01-23T11:18:07Z");
    const got = iss().stateAt(at);
    if (!got.ok) throw new Error(got.reason);
    const ecef = temeToEcef(got.state, at);
    const look = lookAngles(makeSiteFrame(site), ecef);
    expect(Math.abs(look.elevationRad / DEG - (16 + 16 / 60 + 32.6 / 3600))).toBeLessThan(0.02);
    expect(Math.abs(look.azimuthRad / DEG - (350 + 15 / 60 + 20.4 / 3600))).toBeLessThan(0.02);
    expect(Math.abs(look.rangeKm - 1168.7)).toBeLessThan(1);
    const below = geodeticFromEcef(ecef.rKm);
    expect(Math.abs(below.latitudeDeg - (50 + 14 / 60 + 37.4 / 3600))).toBeLessThan(0.02);
    expect(Math.abs(below.longitudeDeg + (86 + 23 / 60 + 23.3 / 3600))).toBeLessThan(0.02);
  });

  it.each([
    ["11:17", 1434.2, -4.74],
    ["11:18", 1190.5, -3.24],
    ["11:19", 1064.3, -0.84],
    ["11:20", 1097.3, 1.9],
    ["11:21", 1277.4, 3.95],
    ["11:22", 1553.6, 5.14],
  ])("has the published range and range rate at %s (0.3 km, 0.01 km/s)", (minute, rangeKm, rate) => {
    const at = Date.parse(`2014-01-23T${minute}:00Z`);
    const got = iss().stateAt(at);
    if (!got.ok) throw new Error(got.reason);
    const look = lookAngles(makeSiteFrame(site), temeToEcef(got.state, at));
    expect(Math.abs(look.rangeKm - rangeKm)).toBeLessThan(0.3);
    expect(Math.abs(look.rangeRateKmPerS - rate)).toBeLessThan(0.01);
  });
});
