import { describe, expect, it } from "vitest";
import { noDeviation, pulsesBetween } from "@/lib/physics/effect/accumulate";
import { makeTrack } from "@/lib/physics/effect/track";
import { lookAngles, temeToEcef } from "@/lib/physics/frames/earth";
import { dot, norm, subtract, unit } from "@/lib/physics/vector";
import { orbitOf, passOver } from "../../fixtures/pass-over";

const pass = passOver({ eccentricity: 0.02 }, 10, { minElevationDeg: 1 });

describe("track", () => {
  it("is SGP4's own path to decimetres and millimetres a second, and sees the station's sky", () => {
    const made = makeTrack(pass.orbit, pass.frame, pass.fromMs, pass.toMs);
    if (!made.ok) throw new Error(made.reason);
    for (let atMs = pass.fromMs + 137; atMs < pass.toMs; atMs += 3_713) {
      const truth = pass.orbit.stateAt(atMs);
      if (!truth.ok) throw new Error(truth.reason);
      const { state, siteKm, up } = made.track.at(atMs);
      expect(norm(subtract(state.rKm, truth.state.rKm)) * 1000).toBeLessThan(0.3);
      expect(norm(subtract(state.vKmPerS, truth.state.vKmPerS)) * 1e6).toBeLessThan(2);
      const look = lookAngles(pass.frame, temeToEcef(truth.state, atMs));
      const line = subtract(state.rKm, siteKm);
      expect(norm(line)).toBeCloseTo(look.rangeKm, 3);
      expect(Math.asin(dot(unit(line), up))).toBeCloseTo(look.elevationRad, 6);
    }
  });

  it("keeps the middles of its seconds as they are", () => {
    const made = makeTrack(pass.orbit, pass.frame, pass.fromMs, pass.toMs);
    if (!made.ok) throw new Error(made.reason);
    const second = Math.ceil(pass.fromMs / 1000) + 7;
    const fresh = made.track.at(second * 1000 + 500);
    expect(made.track.middleOfSecond(second)).toEqual(fresh);
    expect(made.track.middleOfSecond(second)).toBe(made.track.middleOfSecond(second));
  });

  it("stands at a pole", () => {
    const polar = passOver({ inclinationDeg: 90 }, 30);
    const frame = { ...polar.frame, positionKm: { x: 0, y: 0, z: 6357 }, up: { x: 0, y: 0, z: 1 } };
    const orbit = orbitOf({ inclinationDeg: 90, argPericenterDeg: 80, meanAnomalyDeg: 0 });
    const overPole = orbit.elements.epochMs + (10 / 360) * orbit.periodS * 1000;
    const made = makeTrack(orbit, frame, overPole - 1000, overPole + 1000);
    if (!made.ok) throw new Error(made.reason);
    expect(made.track.at(overPole).up).toEqual({ x: 0, y: 0, z: 1 });
  });

  it.each([
    [0, 0, "later than from"],
    [10, 5, "later than from"],
    [0, Number.NaN, "must be dates"],
    [0, 25 * 3600_000, "24 hours"],
    [-1800_000, 0, "below the station's horizon"],
    [0, 3600_000, "below the station's horizon"],
  ])("refuses a span from %f to %f ms by saying why", (fromMs, toMs, words) => {
    const made = makeTrack(pass.orbit, pass.frame, pass.fromMs + fromMs, pass.fromMs + toMs);
    expect(made.ok ? "" : made.reason).toContain(words);
  });

  it("passes on why an orbit has no state", () => {
    const lost = { ...pass.orbit, stateAt: () => ({ ok: false as const, reason: "the object has decayed" }) };
    const made = makeTrack(lost, pass.frame, pass.fromMs, pass.toMs);
    expect(made).toEqual({ ok: false, about: "orbit", reason: "the object has decayed" });
  });
});

describe("pulses", () => {
  it("are counted from the first one, the end not included", () => {
    expect(pulsesBetween(10, 0, 10)).toBe(100);
    expect(pulsesBetween(11.2, 0, 112)).toBe(1255);
    expect(pulsesBetween(0.1, 0, 5)).toBe(1);
    expect(pulsesBetween(0.1, 5, 10)).toBe(0);
    expect(pulsesBetween(0.1, 10, 10.001)).toBe(1);
    let sum = 0;
    for (let s = 0; s < 60; s++) sum += pulsesBetween(7.3, s, s + 1);
    expect(sum).toBe(pulsesBetween(7.3, 0, 60));
  });

  it("of which there were none leave no deviation", () => {
    expect(Object.values(noDeviation()).every((v) => v === 0)).toBe(true);
  });
});
