import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { findPasses, type PassStation } from "@/lib/physics/passes/find-passes";
import { densePasses } from "../../fixtures/dense-passes";
import { realOrbits, verificationOrbit } from "../../fixtures/orbits";

// Reference: a dense scan of SGP4 itself with halved crossings (tests/fixtures/dense-passes.ts). None missing,
// none extra; rise and set within 0.1 s, maximum elevation within 0.001 degrees of the densest sample.
const DAY_MS = 86_400_000;
const TOLERANCE_MS = 100;

const STATIONS: readonly PassStation[] = [
  { site: { latitudeDeg: 47.3, longitudeDeg: 11.4, altitudeM: 1850 }, minElevationRad: 15 * DEG },
  { site: { latitudeDeg: -31.3, longitudeDeg: 149.1, altitudeM: 1165 }, minElevationRad: 0 },
  { site: { latitudeDeg: 90, longitudeDeg: 0, altitudeM: 0 }, minElevationRad: 10 * DEG },
  { site: { latitudeDeg: -89.99, longitudeDeg: 139.3, altitudeM: 2830 }, minElevationRad: 5 * DEG },
  { site: { latitudeDeg: 0.2, longitudeDeg: -78.5, altitudeM: 2850 }, minElevationRad: 30 * DEG },
];

function compare(
  orbit: Orbit,
  stations: readonly PassStation[],
  fromMs: number,
  toMs: number,
  stepMs: number,
) {
  const { passes } = findPasses(orbit, stations, fromMs, toMs);
  let compared = 0;
  for (const [i, station] of stations.entries()) {
    const wanted = densePasses(orbit, station, fromMs, toMs, stepMs);
    const mine = passes.filter((p) => p.stationIndex === i).map((p) => p.pass);
    // A pass shorter than the scan's step may be seen by the search alone.
    const seen = mine.filter(
      (p) => p.setMs - p.riseMs > stepMs || wanted.some((w) => near(w.riseMs, p.riseMs)),
    );
    expect(seen).toHaveLength(wanted.length);
    for (const [k, want] of wanted.entries()) {
      expect(Math.abs((seen[k]?.riseMs ?? Number.NaN) - want.riseMs)).toBeLessThan(TOLERANCE_MS);
      expect(Math.abs((seen[k]?.setMs ?? Number.NaN) - want.setMs)).toBeLessThan(TOLERANCE_MS);
      const top = seen[k]?.maxElevationRad ?? Number.NaN;
      expect(top).toBeGreaterThan(want.maxElevationRad - 1e-3 * DEG);
      compared++;
    }
  }
  return compared;
}

function near(a: number, b: number): boolean {
  return Math.abs(a - b) < TOLERANCE_MS;
}

describe("the fast search against a dense scan of SGP4", () => {
  it("agrees on real fragments in low orbits, poles and equator included", () => {
    let compared = 0;
    for (const orbit of realOrbits(60)) {
      const fromMs = orbit.elements.epochMs + 3_600_000;
      compared += compare(orbit, STATIONS, fromMs, fromMs + DAY_MS, 10_000);
    }
    expect(compared).toBeGreaterThan(300);
  });

  // Cases of the published verification file, by what is hard about them.
  it.each([
    [5, "eccentricity 0.19"],
    [8195, "Molniya orbit, e 0.69, deep space"],
    [9880, "Molniya orbit, e 0.71, deep space"],
    [11801, "transfer orbit, e 0.73, strong drag"],
    [16925, "e 0.56, perigee at 150 km"],
    [20413, "period of 97 hours, e 0.79"],
    [21897, "e 0.74, resonant"],
    [23599, "e 0.58, inclination 7 degrees"],
    [24208, "geostationary, inclination 11.5 degrees"],
    [26975, "e 0.56, period of 12 hours"],
    [28129, "navigation satellite, period of 12 hours"],
    [28057, "sun-synchronous, retrograde"],
    [28623, "e 0.62, low perigee"],
    [6251, "perigee at 377 km, moderate drag"],
  ])("agrees on case %i (%s)", (catalogNumber) => {
    const orbit = verificationOrbit(catalogNumber);
    const fromMs = orbit.elements.epochMs;
    expect(compare(orbit, STATIONS, fromMs, fromMs + 3 * DAY_MS, 20_000)).toBeGreaterThan(0);
  });
});
