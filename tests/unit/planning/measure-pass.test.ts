import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { geodeticFromEcef, lookAngles, temeToEcef } from "@/lib/physics/frames/earth";
import { add, scale, subtract, unit } from "@/lib/physics/vector";
import type { VolumeShape } from "@/lib/planning/airspace";
import { LIMITS, MAP, measured, ORBIT, PASSES } from "../../property/closures/sky";

function ecefAt(atMs: number) {
  const found = ORBIT.stateAt(atMs);
  if (!found.ok) throw new Error(found.reason);
  return temeToEcef(found.state, atMs);
}

function elevationDegAt(atMs: number): number {
  return lookAngles(MAP.frame, ecefAt(atMs)).elevationRad / DEG;
}

/** Seconds of a pass, a tenth apart. */
function tenths(pass: { riseMs: number; setMs: number }): number[] {
  const count = Math.floor((pass.setMs - pass.riseMs) / 100);
  return Array.from({ length: count }, (_, i) => pass.riseMs + 50 + 100 * i);
}

function within(spans: readonly { fromMs: number; toMs: number }[], atMs: number): boolean {
  return spans.some((span) => span.fromMs <= atMs && atMs < span.toMs);
}

/** True when `atMs` lies within 0.15 s of an edge of a span. */
function nearEdge(spans: readonly { fromMs: number; toMs: number }[], atMs: number): boolean {
  return spans.some(({ fromMs, toMs }) => Math.abs(atMs - fromMs) <= 150 || Math.abs(atMs - toMs) <= 150);
}

describe("measuring a pass", () => {
  it("finds nothing in a pass between floor and ceiling far from any airspace", () => {
    const [pass] = PASSES;
    if (!pass) throw new Error("no pass");
    const geometry = measured(pass, LIMITS, []);
    expect(geometry).toMatchObject({ belowFloor: [], aboveCeiling: [], volumes: [], airspaceKey: "" });
  });

  it("finds the stretches outside the elevation limits to 0.15 s", () => {
    const limits = { version: 2, minElevationDeg: 28, maxElevationDeg: 45 };
    let above = 0;
    for (const pass of PASSES.slice(0, 8)) {
      const geometry = measured(pass, limits, []);
      above += geometry.aboveCeiling.length;
      for (const atMs of tenths(pass)) {
        const elevation = elevationDegAt(atMs);
        if (!nearEdge(geometry.aboveCeiling, atMs)) {
          expect(within(geometry.aboveCeiling, atMs)).toBe(elevation > 45);
        }
        if (!nearEdge(geometry.belowFloor, atMs)) {
          expect(within(geometry.belowFloor, atMs)).toBe(elevation < 28);
        }
      }
    }
    expect(above).toBeGreaterThan(0);
  });

  it("sees a peak over the ceiling that lasts less than a second", () => {
    const pass = PASSES.find((p) => p.maxElevationDeg > 40);
    if (!pass) throw new Error("no high pass");
    const limits = { ...LIMITS, maxElevationDeg: pass.maxElevationDeg - 1e-6 };
    const [span] = measured(pass, limits, []).aboveCeiling;
    if (!span) throw new Error("the peak was missed");
    expect(span.fromMs).toBeLessThan(pass.culminateMs);
    expect(span.toMs).toBeGreaterThan(pass.culminateMs);
    expect(span.toMs - span.fromMs).toBeLessThan(1500);
  });

  it("finds the stretches in a box of airspace as marching along the beam on the ellipsoid does", () => {
    // North of the station, where these passes go by; the walk knows nothing of the map or its sphere.
    const [west, east, south, north] = [8.0, 8.4, 46.62, 46.9];
    const ring: VolumeShape["ring"] = [
      [west, south],
      [east, south],
      [east, north],
      [west, north],
      [west, south],
    ];
    const box: VolumeShape = { id: "v-1", version: 7, ring, floorM: 4000, ceilingM: 12_000 };
    const inBox = (atMs: number): boolean => {
      const station = MAP.frame.positionKm;
      const along = unit(subtract(ecefAt(atMs).rKm, station));
      for (let rangeKm = 0.5; rangeKm < 60; rangeKm += 0.05) {
        const place = geodeticFromEcef(add(station, scale(along, rangeKm)));
        if (place.altitudeKm > 12) return false;
        if (place.altitudeKm < 4) continue;
        const { longitudeDeg, latitudeDeg } = place;
        if (longitudeDeg > west && longitudeDeg < east && latitudeDeg > south && latitudeDeg < north)
          return true;
      }
      return false;
    };
    let [inside, outside] = [0, 0];
    for (const pass of PASSES.slice(0, 6)) {
      const geometry = measured(pass, LIMITS, [box]);
      expect(geometry.airspaceKey).toBe("v-1:7");
      const spans = geometry.volumes[0]?.spans ?? [];
      for (const atMs of tenths(pass).filter((_, i) => i % 20 === 0)) {
        // 0.3 s allows for the tens of metres between sphere and ellipsoid.
        if (spans.some((s) => Math.abs(atMs - s.fromMs) <= 300 || Math.abs(atMs - s.toMs) <= 300)) continue;
        const isIn = inBox(atMs);
        if (isIn) inside += 1;
        else outside += 1;
        expect(within(spans, atMs)).toBe(isIn);
      }
    }
    expect(inside).toBeGreaterThan(20);
    expect(outside).toBeGreaterThan(200);
  });
});
