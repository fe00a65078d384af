import { describe, expect, it } from "vitest";
import { ASTRONOMICAL_UNIT_KM, DEG } from "@/lib/physics/constants";
import { makeSiteFrame } from "@/lib/physics/frames/earth";
import { moonLitShare, moonPositionKm } from "@/lib/physics/sky/moon";
import { obliquityRad, sunElevationRad, sunPositionKm } from "@/lib/physics/sky/sun";
import { darkness, SUNRISE_ELEVATION_RAD } from "@/lib/physics/sky/twilight";
import { centuriesSinceJ2000, msFromJulianDate } from "@/lib/physics/time";
import { norm, scale, subtract, type Vec3 } from "@/lib/physics/vector";

// "Vallado" is Vallado, Fundamentals of Astrodynamics and Applications; "Meeus" is Meeus, Astronomical
// Algorithms, 2nd edition 1998.

/** Ecliptic longitude and latitude, degrees. */
function ecliptic(r: Vec3, atMs: number): { longitudeDeg: number; latitudeDeg: number } {
  const e = obliquityRad(centuriesSinceJ2000(atMs));
  const y = Math.cos(e) * r.y + Math.sin(e) * r.z;
  const z = Math.cos(e) * r.z - Math.sin(e) * r.y;
  const longitudeDeg = (Math.atan2(y, r.x) / DEG + 360) % 360;
  return { longitudeDeg, latitudeDeg: Math.atan2(z, Math.hypot(r.x, y)) / DEG };
}

describe("the Sun", () => {
  it("Vallado, example 5-1: 2006-04-02 0 h (2e-6 au)", () => {
    const got = sunPositionKm(msFromJulianDate(2453827.5));
    const wantAu = { x: 0.9771945, y: 0.1924424, z: 0.0834308 };
    expect(norm(subtract(scale(got, 1 / ASTRONOMICAL_UNIT_KM), wantAu))).toBeLessThan(2e-6);
    // Published beside it in km, from constants with other last digits: 7e-6 au apart.
    const wantKm = { x: 146185999.57, y: 28789948.69, z: 12481485.21 };
    expect(norm(subtract(got, wantKm)) / ASTRONOMICAL_UNIT_KM).toBeLessThan(1e-5);
  });

  it("Meeus, example 25.a: 1992-10-13 0 h (0.01 degrees, 1e-4 au)", () => {
    const at = Date.parse("1992-10-13T00:00:00Z");
    const got = sunPositionKm(at);
    expect(Math.abs(ecliptic(got, at).longitudeDeg - 199.90987)).toBeLessThan(0.01);
    expect(Math.abs(norm(got) / ASTRONOMICAL_UNIT_KM - 0.99766)).toBeLessThan(1e-4);
  });
});

describe("the Moon", () => {
  it("Vallado, example 5-3: 1994-04-28 0 h, the same series (0.1 km)", () => {
    const got = moonPositionKm(Date.parse("1994-04-28T00:00:00Z"));
    const want = { x: -134240.626, y: -311571.59, z: -126693.785 };
    expect(norm(subtract(got, want))).toBeLessThan(0.1);
  });

  it("Meeus, example 47.a: 1992-04-12 0 h, the full theory (0.3 degrees, 0.5 %)", () => {
    const at = Date.parse("1992-04-12T00:00:00Z");
    const got = moonPositionKm(at);
    expect(Math.abs(ecliptic(got, at).longitudeDeg - 133.162655)).toBeLessThan(0.3);
    expect(Math.abs(ecliptic(got, at).latitudeDeg + 3.229126)).toBeLessThan(0.2);
    expect(Math.abs(norm(got) / 368409.7 - 1)).toBeLessThan(0.005);
  });

  it("Meeus, example 48.a: 1992-04-12, lit share 0.6775 (0.003 for a series good to 0.3 degrees)", () => {
    expect(Math.abs(moonLitShare(Date.parse("1992-04-12T00:00:00Z")) - 0.6775)).toBeLessThan(0.003);
  });
});

describe("sunrise, sunset and twilight", () => {
  // Source: Vallado, example 5-2 and test_sun.py beside it: 40° N, 0° E, 1996-03-23, hours UT. Another
  // algorithm, so within a minute.
  const frame = makeSiteFrame({ latitudeDeg: 40, longitudeDeg: 0, altitudeM: 0 });
  const midnight = Date.parse("1996-03-23T00:00:00Z");

  it.each([
    ["sunrise and sunset", SUNRISE_ELEVATION_RAD, 5.972755, 18.254906],
    ["civil", -6 * DEG, 5.521687, 18.706135],
    ["nautical", -12 * DEG, 4.99255, 19.235673],
    ["astronomical", -18 * DEG, 4.45269, 19.77622],
  ])("%s", (_name, limitRad, morningH, eveningH) => {
    for (const hours of [morningH, eveningH]) {
      const at = midnight + hours * 3_600_000;
      const before = sunElevationRad(frame, at - 60_000) - limitRad;
      const after = sunElevationRad(frame, at + 60_000) - limitRad;
      expect(before * after).toBeLessThan(0);
    }
  });

  it.each([
    [5.9, "civil twilight"],
    [5.2, "nautical twilight"],
    [4.7, "astronomical twilight"],
    [4.3, "night"],
    [12, "day"],
    [18.2, "day"],
    [18.4, "civil twilight"],
    [20, "night"],
  ] as const)("at %d h it is %s", (hours, name) => {
    expect(darkness(sunElevationRad(frame, midnight + hours * 3_600_000))).toBe(name);
  });
});
