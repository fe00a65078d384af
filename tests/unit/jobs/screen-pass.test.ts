import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import { makeSiteFrame, siteStateTeme } from "@/lib/physics/frames/earth";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { angleBetweenRad, norm, subtract } from "@/lib/physics/vector";
import { inflatedHalfAngle } from "@/lib/planning/keep-out";
import { screenPass } from "@/lib/services/screen-pass";
import { findForSweep } from "@/lib/services/sweep-find";
import type { Guarded, SweepGround, SweepStation } from "@/lib/services/sweep-ground";
import { elementsFromText } from "../../fixtures/read-tle";

/** Real sets of October 2021 as published by CelesTrak; see the README beside the file. */
const sets = elementsFromText(readFileSync("../shared/reference/published-debris-2021.tle", "utf8"));

function orbitOf(n: number): Orbit {
  const elements = sets[n];
  const made = elements ? makeOrbit(elements) : null;
  if (!made?.ok) throw new Error(`set ${n} gives no orbit`);
  return made.orbit;
}

const site = { latitudeDeg: 46.5, longitudeDeg: 8.2, altitudeM: 1400 };
const station: SweepStation = {
  id: "station",
  name: "Alder Point",
  site,
  minElevationRad: 20 * DEG,
  laserSettingId: "laser",
  frame: makeSiteFrame(site),
};

function guarded(n: number, halfAngleDeg: number): Guarded {
  const orbit = orbitOf(n);
  return {
    id: `object ${n}`,
    elementSetId: `set ${n}`,
    epochMs: orbit.elements.epochMs,
    halfAngleDeg,
    orbit,
  };
}

function groundOf(objects: readonly Guarded[], blind: readonly string[] = []): SweepGround {
  return { stations: [station], idle: [], guarded: objects, blind, readAt: new Date(0) };
}

const DAY = 86_400_000;
const fromMs = Date.UTC(2021, 9, 3);
const target = orbitOf(0);
const { passes } = findForSweep(target, [station], { fromMs, toMs: fromMs + 2 * DAY, nowMs: fromMs });

describe("screenPass", () => {
  it("closes every moment at which an object stands in its widened cone, by the definition", () => {
    const objects = Array.from({ length: 300 }, (_, i) => guarded(i + 1, i % 3 === 0 ? 12 : 6)).filter(
      ({ epochMs }) => fromMs - epochMs < 10 * DAY,
    );
    expect(objects.length).toBeGreaterThan(100);
    let inside = 0;
    for (const pass of passes) {
      const { crossings, gaps } = screenPass(pass, target, groundOf(objects));
      expect(gaps).toEqual([]);
      for (const object of objects) {
        const own = crossings.filter((crossing) => crossing.protectedObjectId === object.id);
        for (let atMs = Math.ceil(pass.event.riseMs); atMs < pass.event.setMs; atMs += 2000) {
          if (!standsInCone(object, atMs)) continue;
          inside += 1;
          expect(own.some(({ fromAt, toAt }) => fromAt.getTime() <= atMs && atMs < toAt.getTime())).toBe(
            true,
          );
        }
      }
    }
    expect(passes.length).toBeGreaterThanOrEqual(4);
    expect(inside).toBeGreaterThan(100);
  });

  it("widens by the timing guard on both sides", () => {
    const [pass] = passes;
    if (!pass) throw new Error("no pass");
    const ahead = { ...guarded(0, 1), id: "on the same orbit" };
    const { crossings } = screenPass(pass, target, groundOf([ahead]));
    expect(crossings).toHaveLength(1);
    expect(crossings[0]?.fromAt.getTime()).toBeLessThanOrEqual(pass.event.riseMs - 2000);
    expect(crossings[0]?.toAt.getTime()).toBeGreaterThanOrEqual(pass.event.setMs + 2000);
    expect(crossings[0]?.minSeparationDeg).toBeCloseTo(0, 6);
  });

  it("names as a gap what has no usable set, and what can't be propagated to the pass", () => {
    const [pass] = passes;
    if (!pass) throw new Error("no pass");
    const old = { ...guarded(1, 1), id: "old", epochMs: fromMs - 15 * DAY };
    const elements = { ...orbitOf(2).elements, epochMs: fromMs - DAY, meanMotionRevPerDay: 16.4, bstar: 0.2 };
    const made = makeOrbit({ ...elements, eccentricity: 0.001 });
    if (!made.ok) throw new Error(made.reason);
    const decayed = { ...guarded(2, 1), id: "decayed", orbit: made.orbit, epochMs: elements.epochMs };
    const { gaps } = screenPass(pass, target, groundOf([old, decayed, guarded(3, 1)], ["never seen"]));
    expect(gaps).toEqual(["decayed", "never seen", "old"]);
  });
});

/** By angles and ranges at that very time, without any bound. */
function standsInCone(object: Guarded, atMs: number): boolean {
  const from = siteStateTeme(station.frame, atMs).rKm;
  const line = (orbit: Orbit) => {
    const state = orbit.stateAt(atMs);
    if (!state.ok) throw new Error(state.reason);
    return subtract(state.state.rKm, from);
  };
  const [toTarget, toOther] = [line(target), line(object.orbit)];
  const { totalRad } = inflatedHalfAngle({
    halfAngleDeg: object.halfAngleDeg,
    atMs,
    target: { epochMs: target.elements.epochMs, rangeKm: norm(toTarget) },
    other: { epochMs: object.epochMs, rangeKm: norm(toOther) },
  });
  return angleBetweenRad(toTarget, toOther) < totalRad;
}
