import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import {
  geodeticFromEcef,
  gmstRad,
  lookAngles,
  makeSiteFrame,
  type SiteFrame,
  siteStateTeme,
  temeToEcef,
} from "@/lib/physics/frames/earth";
import type { Site } from "@/lib/physics/orbit/elements";
import { msFromJulianDate } from "@/lib/physics/time";
import { norm, scale, subtract, type Vec3 } from "@/lib/physics/vector";

// "Vallado" is Vallado, Fundamentals of Astrodynamics and Applications, with its published worked examples;
// "Meeus" is Meeus, Astronomical Algorithms, 2nd edition 1998.

const SECONDS_TO_RAD = (15 / 3600) * DEG;

function hms(hours: number, minutes: number, seconds: number): number {
  return (hours * 3600 + minutes * 60 + seconds) * SECONDS_TO_RAD;
}

function expectNear(got: Vec3, want: Vec3, tolerance: number): void {
  expect(norm(subtract(got, want))).toBeLessThan(tolerance);
}

/**
 * The examples with a station take 6378.1363 km for the equatorial radius (JGM-2), 0.7 m less than WGS-84:
 * the part of the position that lies on the ellipsoid shrinks in proportion.
 */
function onValladosEarth(site: Site): SiteFrame {
  const frame = makeSiteFrame(site);
  const surface = makeSiteFrame({ ...site, altitudeM: 0 }).positionKm;
  return { ...frame, positionKm: subtract(frame.positionKm, scale(surface, 1 - 6378.1363 / 6378.137)) };
}

describe("sidereal time", () => {
  it.each([
    ["Vallado, example 3-5", "1992-08-20T12:14:00Z", 152.5788 * DEG, 1e-4 * DEG],
    ["Meeus, example 12.a", "1987-04-10T00:00:00Z", hms(13, 10, 46.3668), 1e-4 * SECONDS_TO_RAD],
    ["Meeus, example 12.b", "1987-04-10T19:21:00Z", hms(8, 34, 57.0896), 1e-4 * SECONDS_TO_RAD],
  ])("%s", (_source, at, wantRad, toleranceRad) => {
    expect(Math.abs(gmstRad(Date.parse(at)) - wantRad)).toBeLessThan(toleranceRad);
  });

  it("agrees with SOFA's 1982 model at JD 2453736.5 (recomputed with python3-erfa 2.0.0.1), 1e-12 rad", () => {
    expect(gmstRad(msFromJulianDate(2453736.5))).toBeCloseTo(1.754174981860675, 11);
  });

  it("holds microseconds at the epoch of Vallado's example 3-15 (recomputed with erfa), 1e-7 degrees", () => {
    const ut1Ms = Date.UTC(2004, 3, 6, 7, 51, 27) + 946.0471;
    expect(Math.abs(gmstRad(ut1Ms) / DEG - 312.8098942)).toBeLessThan(1e-7);
  });
});

describe("TEME to Earth-fixed", () => {
  // Source: AIAA 2006-6753, appendix C (UTC 2004-04-06 07:51:28.386009, UT1 - UTC -0.4399619 s). The product
  // neglects UT1 - UTC and polar motion, so the test hands in UT1 and undoes the polar motion.
  const ut1Ms = Date.UTC(2004, 3, 6, 7, 51, 27) + 946.0471;
  const [xp, yp] = [(-0.140682 / 3600) * DEG, (0.333309 / 3600) * DEG];
  const withoutPolarMotion = (r: Vec3): Vec3 => ({
    x: r.x - xp * r.z,
    y: r.y + yp * r.z,
    z: r.z + xp * r.x - yp * r.y,
  });
  const rItrf = { x: -1033.479383, y: 7901.2952754, z: 6380.3565958 };
  const vItrf = { x: -3.22563652, y: -2.87245145, z: 5.531924446 };

  // Two pairs are published for this epoch, 71 mm apart (with and without the two small kinematic terms of
  // the equation of the equinoxes). Sidereal time alone, checked above against erfa, meets the second to
  // 9 mm: that is 15 microseconds, less than a whole Julian date resolves. Both within 0.1 m.
  it.each([
    [
      "AIAA 2006-6753",
      { x: 5094.1801072, y: 6127.6447052, z: 6380.3445327 },
      { x: -4.746131494, y: 0.785817998, z: 5.531931288 },
      1e-4,
    ],
    [
      "Vallado 2013, example 3-15",
      { x: 5094.1801621, y: 6127.6446595, z: 6380.3445327 },
      { x: -4.746131487, y: 0.785818041, z: 5.531931288 },
      1e-5,
    ],
  ])("reproduces the published states of %s", (_source, rKm, vKmPerS, toleranceKm) => {
    const got = temeToEcef({ rKm, vKmPerS }, ut1Ms);
    expectNear(got.rKm, withoutPolarMotion(rItrf), toleranceKm);
    expectNear(got.vKmPerS, withoutPolarMotion(vItrf), 1e-7);
  });

  it("keeps polar motion under the stated 10 m when it is neglected", () => {
    const moved = norm(subtract(withoutPolarMotion(rItrf), rItrf));
    expect(moved).toBeGreaterThan(0.001);
    expect(moved).toBeLessThan(0.02);
  });
});

describe("geodesy on WGS-84", () => {
  it("Vallado, example 3-3: position to latitude, longitude, height (1e-4 degrees, 1 m)", () => {
    const got = geodeticFromEcef({ x: 6524.834, y: 6862.875, z: 6448.296 });
    expect(Math.abs(got.latitudeDeg - 34.352495)).toBeLessThan(1e-4);
    expect(Math.abs(got.longitudeDeg - 46.4464)).toBeLessThan(1e-4);
    expect(Math.abs(got.altitudeKm - 5085.2194)).toBeLessThan(1e-3);
  });

  it("SOFA's test case for position to geodetic (1e-10 rad, 1e-6 m)", () => {
    const got = geodeticFromEcef({ x: 2000, y: 3000, z: 5244 });
    expect(Math.abs(got.longitudeDeg * DEG - 0.982793723247329)).toBeLessThan(1e-10);
    expect(Math.abs(got.latitudeDeg * DEG - 0.971601848190755)).toBeLessThan(1e-10);
    expect(Math.abs(got.altitudeKm - 0.3314172461)).toBeLessThan(1e-9);
  });

  it("SOFA's test case for geodetic to position (1e-4 m)", () => {
    const frame = makeSiteFrame({ latitudeDeg: -0.5 / DEG, longitudeDeg: 3.1 / DEG, altitudeM: 2500 });
    expectNear(frame.positionKm, { x: -5599.0005577, y: 233.0116722, z: -3040.9094707 }, 1e-7);
  });

  it("Vallado, example 4-2: site vector (1e-5 km)", () => {
    const frame = onValladosEarth({ latitudeDeg: 39.007, longitudeDeg: -104.883, altitudeM: 2194.56 });
    expectNear(frame.positionKm, { x: -1275.12327899, y: -4797.99417809, z: 3994.30177136 }, 1e-5);
  });

  it("gives the height over a pole", () => {
    // The polar radius follows from the definition a (1 - f) = 6356.752314 km (NIMA TR8350.2).
    const got = geodeticFromEcef({ x: 0, y: 0, z: -(6356.752314245 + 700) });
    expect(got.latitudeDeg).toBeCloseTo(-90, 9);
    expect(got.altitudeKm).toBeCloseTo(700, 6);
  });
});

describe("look angles", () => {
  it("reproduces Vallado's published range, azimuth, elevation and rates (1e-9 relative)", () => {
    // Source: CelesTrak/fundamentals-of-astrodynamics, tests/astro/twobody/test_frame_conversions.py.
    const frame = onValladosEarth({ latitudeDeg: 39.007, longitudeDeg: -104.883, altitudeM: 2102 });
    const got = lookAngles(frame, {
      rKm: { x: -5225.545532658, y: -3070.986596961, z: 3501.815987085 },
      vKmPerS: { x: -5.373672578, y: -3.302103863, z: 4.020523711 },
    });
    expect(got.rangeKm / 4339.444884045).toBeCloseTo(1, 9);
    expect(got.azimuthRad - 2 * Math.PI).toBeCloseTo(-1.5639427896, 9);
    expect(got.elevationRad).toBeCloseTo(-0.1897354023, 9);
    expect(got.rangeRateKmPerS).toBeCloseTo(3.1216042513, 9);
    // The rates are printed with five digits.
    expect(got.azimuthRateRadPerS).toBeCloseTo(5.0931e-5, 8);
    expect(got.elevationRateRadPerS).toBeCloseTo(1.56555e-3, 8);
  });

  it("Meeus, example 13.b: Venus over Washington (0.002 degrees)", () => {
    // The example uses apparent sidereal time; the mean one is 0.24 s (0.001 degrees) later.
    const at = Date.parse("1987-04-10T19:21:00Z");
    const ra = hms(23, 9, 16.641);
    const dec = -(6 + 43 / 60 + 11.61 / 3600) * DEG;
    const far = 1e9;
    const toVenus = { x: Math.cos(dec) * Math.cos(ra), y: Math.cos(dec) * Math.sin(ra), z: Math.sin(dec) };
    const ecef = temeToEcef({ rKm: scale(toVenus, far), vKmPerS: { x: 0, y: 0, z: 0 } }, at);
    const washington = makeSiteFrame({
      latitudeDeg: 38 + 55 / 60 + 17 / 3600,
      longitudeDeg: -(77 + 3 / 60 + 56 / 3600),
      altitudeM: 0,
    });
    const got = lookAngles(washington, ecef);
    expect(Math.abs(got.azimuthRad / DEG - 248.034)).toBeLessThan(2e-3);
    expect(Math.abs(got.elevationRad / DEG - 15.125)).toBeLessThan(2e-3);
  });

  it("agrees with the difference quotients of a moving object, and of the station's own motion", () => {
    // Check of the rates by their definition: central differences over 0.1 s.
    const frame = makeSiteFrame({ latitudeDeg: -33.4, longitudeDeg: 149.1, altitudeM: 770 });
    const at = Date.UTC(2031, 3, 6, 3, 12, 45);
    const r0 = { x: -4850.2, y: 2890.7, z: -4120.3 };
    const v0 = { x: -5.1, y: -3.9, z: 3.8 };
    const atSeconds = (s: number) => ({
      rKm: { x: r0.x + v0.x * s, y: r0.y + v0.y * s, z: r0.z + v0.z * s },
      vKmPerS: v0,
    });
    const [before, now, after] = [-0.05, 0, 0.05].map((s) => lookAngles(frame, atSeconds(s)));
    if (!before || !now || !after) throw new Error("three samples were made");
    expect(now.elevationRateRadPerS).toBeCloseTo((after.elevationRad - before.elevationRad) / 0.1, 8);
    expect(now.azimuthRateRadPerS).toBeCloseTo((after.azimuthRad - before.azimuthRad) / 0.1, 8);
    expect(now.rangeRateKmPerS).toBeCloseTo((after.rangeKm - before.rangeKm) / 0.1, 4);

    const [siteBefore, siteNow, siteAfter] = [-1000, 0, 1000].map((ms) => siteStateTeme(frame, at + ms));
    if (!siteBefore || !siteNow || !siteAfter) throw new Error("three samples were made");
    expectNear(siteNow.vKmPerS, scale(subtract(siteAfter.rKm, siteBefore.rKm), 0.5), 1e-7);
    expectNear(temeToEcef(siteNow, at).rKm, frame.positionKm, 1e-9);
    expect(norm(temeToEcef(siteNow, at).vKmPerS)).toBeLessThan(1e-12);
  });
});
