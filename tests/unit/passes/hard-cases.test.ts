import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { geodeticFromEcef, temeToEcef } from "@/lib/physics/frames/earth";
import type { Elements } from "@/lib/physics/orbit/elements";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { findPasses, type PassEvent, type PassStation } from "@/lib/physics/passes/find-passes";
import { densePasses, elevationOf } from "../../fixtures/dense-passes";
import { mustOrbit, realOrbits, verificationOrbit } from "../../fixtures/orbits";

const DAY_MS = 86_400_000;
const site = { latitudeDeg: 47.3, longitudeDeg: 11.4, altitudeM: 1850 };

/** An invented fragment in a low orbit. */
const LOW: Elements = {
  catalogNumber: 990001,
  objectName: null,
  objectId: null,
  epochMs: Date.UTC(2031, 3, 6),
  meanMotionRevPerDay: 14.2,
  eccentricity: 0.004,
  inclinationDeg: 98.6,
  raanDeg: 120,
  argPericenterDeg: 80,
  meanAnomalyDeg: 10,
  bstar: 1e-4,
  meanMotionDot: 0,
  meanMotionDdot: 0,
};

function passesOf(orbit: Orbit, station: PassStation, fromMs: number, toMs: number): PassEvent[] {
  const { passes, failure } = findPasses(orbit, [station], fromMs, toMs);
  expect(failure).toBeNull();
  return passes.map((p) => p.pass);
}

describe("a pass under way at an end of the search", () => {
  const orbit = mustOrbit(LOW);
  const station = { site, minElevationRad: 10 * DEG };
  const [whole] = passesOf(orbit, station, LOW.epochMs, LOW.epochMs + DAY_MS);
  if (!whole) throw new Error("the orbit has a pass");

  it("is cut at the start and marked; after the culmination the start is the highest point", () => {
    const fromMs = (whole.culminateMs + whole.setMs) / 2;
    const [cut] = passesOf(orbit, station, fromMs, fromMs + DAY_MS / 4);
    expect(cut?.underWayAtFrom).toBe(true);
    expect([cut?.riseMs, cut?.culminateMs]).toEqual([fromMs, fromMs]);
    expect(cut?.setMs).toBeCloseTo(whole.setMs, -1);
    const elevation = elevationOf(orbit, station)(fromMs);
    expect(cut?.maxElevationRad).toBeCloseTo(elevation ?? Number.NaN, 9);
  });

  it("is cut at the end and marked; before the culmination the end is the highest point", () => {
    const toMs = (whole.riseMs + whole.culminateMs) / 2;
    const [cut] = passesOf(orbit, station, whole.riseMs - 600_000, toMs);
    expect([cut?.underWayAtFrom, cut?.underWayAtTo]).toEqual([false, true]);
    expect([cut?.culminateMs, cut?.setMs]).toEqual([toMs, toMs]);
    expect(cut?.riseMs).toBeCloseTo(whole.riseMs, -1);
  });

  it("is one pass marked twice when the search lies within it", () => {
    const [cut, ...rest] = passesOf(orbit, station, whole.culminateMs - 500, whole.culminateMs + 700);
    expect(rest).toEqual([]);
    expect([cut?.underWayAtFrom, cut?.underWayAtTo]).toEqual([true, true]);
    expect(cut?.culminateMs).toBeCloseTo(whole.culminateMs, -1);
  });

  it("has nothing in a search without length", () => {
    expect(passesOf(orbit, station, whole.culminateMs, whole.culminateMs)).toEqual([]);
    expect(passesOf(orbit, station, whole.setMs, whole.riseMs)).toEqual([]);
  });
});

describe("grazing passes", () => {
  // The limit is laid through SGP4's own elevation half a span after the culmination: the pass must last
  // about that span (an arc near its top is symmetrical to a few per cent).
  const tops = realOrbits(75).flatMap((orbit) => {
    const station = { site, minElevationRad: 10 * DEG };
    const fromMs = orbit.elements.epochMs;
    return passesOf(orbit, station, fromMs, fromMs + DAY_MS).map((pass) => ({ orbit, pass, fromMs }));
  });

  it.each([10_000, 1000, 300])("of %i ms are all found", (spanMs) => {
    expect(tops.length).toBeGreaterThan(40);
    for (const { orbit, pass, fromMs } of tops) {
      const elevation = elevationOf(orbit, { site, minElevationRad: 0 });
      const minElevationRad = elevation(pass.culminateMs + spanMs / 2) ?? Number.NaN;
      const found = passesOf(orbit, { site, minElevationRad }, fromMs, fromMs + DAY_MS);
      const graze = found.find((p) => Math.abs(p.culminateMs - pass.culminateMs) < 1000);
      expect(graze).toBeDefined();
      const lastedMs = (graze?.setMs ?? Number.NaN) - (graze?.riseMs ?? Number.NaN);
      expect(Math.abs(lastedMs - spanMs)).toBeLessThan(100 + spanMs * 0.2);
    }
  });

  it("that stay a hair below the limit are none", () => {
    for (const { orbit, pass, fromMs } of tops) {
      const minElevationRad = pass.maxElevationRad + 1e-8;
      const found = passesOf(orbit, { site, minElevationRad }, fromMs, fromMs + DAY_MS);
      expect(found.some((p) => Math.abs(p.culminateMs - pass.culminateMs) < 60_000)).toBe(false);
    }
  });
});

describe("passes with two culminations", () => {
  it("keep the higher one, and split where the limit lies between the dip and the tops", () => {
    // A geostationary object inclined by 11 degrees (case 14128 of the verification file) goes up and down
    // twice a day for a station under it.
    const orbit = verificationOrbit(14128);
    const fromMs = orbit.elements.epochMs;
    const start = orbit.stateAt(fromMs);
    if (!start.ok) throw new Error(start.reason);
    const { longitudeDeg } = geodeticFromEcef(temeToEcef(start.state, fromMs).rKm);
    const below = { site: { latitudeDeg: 2, longitudeDeg, altitudeM: 0 }, minElevationRad: 10 * DEG };
    const elevation = elevationOf(orbit, below);
    const samples = Array.from({ length: 1441 }, (_, i) => elevation(fromMs + i * 60_000) ?? Number.NaN);
    const inner = samples.slice(1, -1);
    const tops = inner.filter((e, i) => e > (samples[i] ?? 9) && e > (samples[i + 2] ?? 9));
    const dips = inner.filter((e, i) => e < (samples[i] ?? -9) && e < (samples[i + 2] ?? -9));
    expect(tops.length).toBeGreaterThanOrEqual(2);

    const [pass] = passesOf(orbit, below, fromMs, fromMs + DAY_MS);
    // Samples a minute apart miss the top by up to 1e-4 rad so near the zenith.
    expect(pass?.maxElevationRad).toBeGreaterThanOrEqual(Math.max(...samples));
    expect(pass?.maxElevationRad).toBeLessThan(Math.max(...samples) + 1e-4);

    const between = (Math.max(...dips) + Math.min(...tops)) / 2;
    const split = passesOf(orbit, { ...below, minElevationRad: between }, fromMs, fromMs + DAY_MS);
    const wanted = densePasses(
      orbit,
      { ...below, minElevationRad: between },
      fromMs,
      fromMs + DAY_MS,
      30_000,
    );
    expect(wanted.length).toBeGreaterThanOrEqual(2);
    expect(split.map((p) => Math.round(p.riseMs / 100))).toEqual(
      wanted.map((p) => Math.round(p.riseMs / 100)),
    );
  });
});

describe("propagation that fails", () => {
  const anywhere = [-60, -30, 0, 30, 60].map((latitudeDeg, i) => ({
    site: { latitudeDeg, longitudeDeg: 70 * i - 140, altitudeM: 0 },
    minElevationRad: 0,
  }));

  it.each([28872, 29141, 22312])("keeps the passes before and says why: case %i", (catalogNumber) => {
    const orbit = verificationOrbit(catalogNumber);
    const fromMs = orbit.elements.epochMs;
    const { passes, failure } = findPasses(orbit, anywhere, fromMs, fromMs + 2 * DAY_MS);
    expect(failure).toMatch(/^Propagation fails at \d{4}-\d\d-\d\dT.*Z: the .*\.$/);
    expect(passes.length).toBeGreaterThan(0);
    const failedAt = Date.parse(/at (\S+Z)/.exec(failure ?? "")?.[1] ?? "");
    expect(orbit.stateAt(failedAt - 2000).ok).toBe(true);
    for (const [i, station] of anywhere.entries()) {
      const wanted = densePasses(orbit, station, fromMs, failedAt - 2000, 5000);
      const mine = passes.filter((p) => p.stationIndex === i).map((p) => p.pass);
      expect(mine.map((p) => Math.round(p.riseMs / 200))).toEqual(
        wanted.map((p) => Math.round(p.riseMs / 200)),
      );
      for (const pass of mine.filter((p) => p.underWayAtTo))
        expect(pass.setMs).toBeGreaterThan(failedAt - 2000);
    }
  });

  it("gives nothing but the sentence when it fails at the start", () => {
    const orbit = verificationOrbit(28872);
    const late = orbit.elements.epochMs + 10 * DAY_MS;
    const { passes, failure } = findPasses(orbit, anywhere, late, late + DAY_MS);
    expect(passes).toEqual([]);
    expect(failure).toContain("Propagation fails at");
  });

  it("refuses times that are no times", () => {
    const got = findPasses(mustOrbit(LOW), anywhere, Number.NaN, LOW.epochMs);
    expect(got).toEqual({ passes: [], failure: "The search needs a start and an end that are dates." });
  });
});

describe("the calendar", () => {
  it.each([
    ["a leap day", Date.UTC(2028, 1, 28, 12)],
    ["a year's end", Date.UTC(2031, 11, 31, 12)],
    ["the leap second at the end of 2016", Date.UTC(2016, 11, 31, 12)],
    ["a century that is no leap year", Date.UTC(2100, 1, 28, 12)],
  ])("makes no difference over %s", (_name, fromMs) => {
    const orbit = mustOrbit({ ...LOW, epochMs: fromMs - 3_600_000 });
    const station = { site, minElevationRad: 5 * DEG };
    const wanted = densePasses(orbit, station, fromMs, fromMs + 2 * DAY_MS, 20_000);
    const mine = passesOf(orbit, station, fromMs, fromMs + 2 * DAY_MS);
    expect(wanted.length).toBeGreaterThan(5);
    expect(mine).toHaveLength(wanted.length);
    for (const [i, want] of wanted.entries()) {
      expect(Math.abs((mine[i]?.riseMs ?? Number.NaN) - want.riseMs)).toBeLessThan(100);
      expect(Math.abs((mine[i]?.setMs ?? Number.NaN) - want.setMs)).toBeLessThan(100);
    }
  });
});
