import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { geodeticFromEcef, makeSiteFrame, type SiteFrame, temeToEcef } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { type ConeCrossing, screenBeam, screenBeamMany } from "@/lib/physics/screening/beam-cone";
import { add, dot, scale, subtract, unit, type Vec3 } from "@/lib/physics/vector";
import { type BruteCrossing, bruteCrossings, separationRad } from "../../fixtures/brute-cone";
import { realOrbits, verificationOrbit } from "../../fixtures/orbits";

// Reference: SGP4 every 0.05 s (tests/fixtures/brute-cone.ts) on real element sets of 2021. No crossing of
// brute force missing, none extra unless it is shorter than the step, edges within 0.1 s, least separation
// within what the object can move in a step.
const STEP_MS = 50;
const DAY_MS = 86_400_000;

function expectSame(mine: readonly ConeCrossing[], wanted: readonly BruteCrossing[]): void {
  const seen = mine.filter(
    (c) => c.toMs - c.fromMs >= STEP_MS || wanted.some((w) => w.firstMs >= c.fromMs && w.firstMs <= c.toMs),
  );
  expect(seen).toHaveLength(wanted.length);
  for (const [i, want] of wanted.entries()) {
    const got = seen[i];
    if (!got) throw new Error("a crossing is missing");
    expect(Math.abs(got.fromMs - want.firstMs)).toBeLessThanOrEqual(100);
    expect(Math.abs(got.toMs - want.lastMs)).toBeLessThanOrEqual(100);
    expect(got.minSeparationRad).toBeLessThanOrEqual(want.leastRad + 1e-6);
    // 3 degrees a second is faster than anything passes anything.
    expect(got.minSeparationRad).toBeGreaterThan(want.leastRad - 3 * DEG * (STEP_MS / 1000));
    expect(got.minSeparationAtMs).toBeGreaterThanOrEqual(got.fromMs);
    expect(got.minSeparationAtMs).toBeLessThanOrEqual(got.toMs);
  }
}

/** Dwells of 60 s around culminations of some orbits over a station. */
function dwells(
  frame: SiteFrame,
  targets: readonly Orbit[],
): { target: Orbit; fromMs: number; toMs: number }[] {
  return targets.flatMap((target) => {
    const fromMs = target.elements.epochMs;
    const station = { site: frame.site, minElevationRad: 25 * DEG };
    const { passes } = findPasses(target, [station], fromMs, fromMs + 2 * DAY_MS);
    return passes.slice(0, 1).map(({ pass }) => {
      return { target, fromMs: pass.culminateMs - 30_000, toMs: pass.culminateMs + 30_000 };
    });
  });
}

const frame = makeSiteFrame({ latitudeDeg: 47.3, longitudeDeg: 11.4, altitudeM: 1850 });

describe("the cone against brute force", () => {
  const others = realOrbits(8);
  const deep = [8195, 9880, 14128, 21897, 23599, 24208, 26975, 28129, 28626].map(verificationOrbit);

  it.each([8, 30])("finds the same crossings of real objects by wide cones: %i degrees", (halfDeg) => {
    const half = () => halfDeg * DEG;
    let compared = 0;
    for (const { target, fromMs, toMs } of dwells(frame, realOrbits(110))) {
      const screened = others.filter((o) => o.elements.catalogNumber !== target.elements.catalogNumber);
      const wanted = bruteCrossings(frame, target, screened, fromMs, toMs, STEP_MS, half);
      const list = screened.map((orbit) => ({ orbit, halfAngleRad: half }));
      const got = screenBeamMany({ frame, target, others: list, fromMs, toMs });
      for (const [i, result] of got.entries()) {
        if (!result.ok) throw new Error(result.reason);
        expectSame(result.crossings, wanted[i] ?? []);
        compared += wanted[i]?.length ?? 0;
      }
    }
    expect(compared).toBeGreaterThan(halfDeg === 30 ? 10 : 0);
  });

  it("finds the same crossings of objects in high and long orbits", () => {
    // Their sets are of 2006: the target is an orbit of that time, so that all are near their epochs.
    const half = () => 45 * DEG;
    let compared = 0;
    for (const catalogNumber of [28057, 6251, 29238]) {
      for (const { target, fromMs, toMs } of dwells(frame, [verificationOrbit(catalogNumber)])) {
        const wanted = bruteCrossings(frame, target, deep, fromMs, toMs, STEP_MS, half);
        for (const [i, other] of deep.entries()) {
          const got = screenBeam({ frame, target, other, fromMs, toMs, halfAngleRad: half });
          expectSame(got, wanted[i] ?? []);
          compared += wanted[i]?.length ?? 0;
        }
      }
    }
    expect(compared).toBeGreaterThan(0);
  });
});

/** A place on the ground from which two objects stand in one line at a time; null when the line misses. */
function stationInLine(a: Orbit, b: Orbit, atMs: number): SiteFrame | null {
  const [p, q] = [a, b].map((orbit) => {
    const got = orbit.stateAt(atMs);
    if (!got.ok) throw new Error(got.reason);
    return temeToEcef(got.state, atMs).rKm;
  });
  if (!p || !q) return null;
  const [low, high]: [Vec3, Vec3] = dot(p, p) < dot(q, q) ? [p, q] : [q, p];
  const down = unit(subtract(low, high));
  const along = dot(low, down);
  const off2 = dot(low, low) - along * along;
  if (along > 0 || off2 > 6300 ** 2) return null;
  // Down to the ground by halving: the altitude falls until the line has gone below.
  let [near, far] = [0, -along];
  while (far - near > 1e-9) {
    const middle = (near + far) / 2;
    if (geodeticFromEcef(add(low, scale(down, middle))).altitudeKm > 0) near = middle;
    else far = middle;
  }
  const place = geodeticFromEcef(add(low, scale(down, near)));
  const { latitudeDeg, longitudeDeg, altitudeKm } = place;
  return makeSiteFrame({ latitudeDeg, longitudeDeg, altitudeM: altitudeKm * 1000 });
}

describe("narrow cones through two objects that stand exactly in line", () => {
  const orbits = realOrbits(20);
  const times = Array.from({ length: 40 }, (_, i) => Date.UTC(2021, 9, 3, 6, 30) + i * 600_000);
  const lines = times.flatMap((atMs) =>
    orbits.flatMap((target, i) =>
      orbits.slice(i + 1).flatMap((other) => {
        const station = stationInLine(target, other, atMs);
        return station ? [{ target, other, station, atMs }] : [];
      }),
    ),
  );

  it("has a good number of such lines", () => {
    expect(lines.length).toBeGreaterThan(60);
  });

  it.each([0.02, 0.1])("never misses the crossing: half-angle %d degrees", (halfDeg) => {
    const half = () => halfDeg * DEG;
    let shortest = Number.POSITIVE_INFINITY;
    for (const { target, other, station, atMs } of lines.slice(0, 60)) {
      // Neither time nor chunk is symmetrical about the crossing.
      const [fromMs, toMs] = [atMs - 47_123, atMs + 31_457];
      const got = screenBeam({ frame: station, target, other, fromMs, toMs, halfAngleRad: half });
      const hit = got.find((c) => c.fromMs <= atMs && c.toMs >= atMs);
      expect(hit).toBeDefined();
      expect(hit?.minSeparationRad).toBeLessThan(2e-6);
      expect(Math.abs((hit?.minSeparationAtMs ?? Number.NaN) - atMs)).toBeLessThan(10);
      shortest = Math.min(shortest, (hit?.toMs ?? Number.NaN) - (hit?.fromMs ?? Number.NaN));
      const wanted = bruteCrossings(station, target, [other], atMs - 10_000, atMs + 10_000, STEP_MS, half);
      const [brute] = wanted;
      expectSame(
        got.filter((c) => c.fromMs > atMs - 10_000 && c.toMs < atMs + 10_000),
        brute?.filter((c) => c.firstMs > atMs - 10_000 && c.lastMs < atMs + 10_000) ?? [],
      );
    }
    expect(shortest).toBeLessThan(halfDeg * 10_000);
  });

  it("tells a cone that just reaches an object from one that just does not", () => {
    let compared = 0;
    for (const { target, other, station, atMs } of lines.slice(0, 40)) {
      // From 3 km aside the objects pass each other at a small distance.
      const aside = makeSiteFrame({ ...station.site, latitudeDeg: station.site.latitudeDeg - 0.03 });
      const [fromMs, toMs] = [atMs - 20_000, atMs + 20_000];
      const wide = screenBeam({ frame: aside, target, other, fromMs, toMs, halfAngleRad: () => 2 * DEG });
      const [only] = wide;
      if (!only || only.minSeparationAtMs < fromMs + 1000 || only.minSeparationAtMs > toMs - 1000) continue;
      const least = only.minSeparationRad;
      // Where the objects move north or south, a step to the south hardly parts them.
      if (least < 1e-4) continue;
      expect(separationRad(aside, target, other, only.minSeparationAtMs)).toBeCloseTo(least, 9);
      const reach = (factor: number) =>
        screenBeam({ frame: aside, target, other, fromMs, toMs, halfAngleRad: () => least * factor });
      expect(reach(1.0005)).toHaveLength(1);
      expect(reach(0.9995)).toHaveLength(0);
      compared++;
    }
    expect(compared).toBeGreaterThan(15);
  });
});

describe("the cone's other cases", () => {
  const [target, other] = realOrbits(400);
  if (!target || !other) throw new Error("no orbits");
  const [dwell] = dwells(frame, [target]);
  if (!dwell) throw new Error("no dwell");

  it("holds the target itself all the time", () => {
    const got = screenBeam({ frame, ...dwell, other: target, halfAngleRad: () => 1e-6 });
    expect(got).toEqual([
      expect.objectContaining({ fromMs: dwell.fromMs, toMs: dwell.toMs, minSeparationRad: 0 }),
    ]);
  });

  it("follows a half-angle that changes", () => {
    // Opens as far as the object stands away, plus a slow swing: edges where the swing changes sign.
    const angle = (atMs: number) => separationRad(frame, target, other, atMs);
    const swing = (atMs: number) => 0.003 * Math.sin(((atMs - dwell.fromMs) / 1000) * 0.2);
    const slow = screenBeam({
      frame,
      ...dwell,
      toMs: dwell.fromMs + 90_000,
      other,
      halfAngleRad: (atMs) => angle(atMs) + swing(atMs),
    });
    // sin(0.2 t) is above nothing for half of every 31.4 s, of which 90 s hold three beginnings.
    expect(slow).toHaveLength(3);
    const half = (1000 * Math.PI) / 0.2;
    for (const [i, crossing] of slow.entries()) {
      expect(Math.abs(crossing.fromMs - dwell.fromMs - 2 * i * half)).toBeLessThan(100);
      const end = Math.min(90_000, (2 * i + 1) * half);
      expect(Math.abs(crossing.toMs - dwell.fromMs - end)).toBeLessThan(100);
    }
  });

  it("lets nobody take a failing orbit for a free line", () => {
    const falling = verificationOrbit(28872);
    const args = { frame, ...dwell, halfAngleRad: () => DEG };
    expect(() => screenBeam({ ...args, other: falling })).toThrow(/^Propagation fails at/);
    expect(() => screenBeam({ ...args, target: falling, other })).toThrow(/^Propagation fails at/);
    const many = screenBeamMany({
      frame,
      ...dwell,
      others: [falling, other].map((orbit) => ({ orbit, halfAngleRad: () => DEG })),
    });
    expect(many.map((m) => m.ok)).toEqual([false, true]);
  });

  it("has nothing in a time without length", () => {
    const got = screenBeam({ frame, ...dwell, toMs: dwell.fromMs, other, halfAngleRad: () => DEG });
    expect(got).toEqual([]);
  });
});
