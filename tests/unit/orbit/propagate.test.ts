import { describe, expect, it } from "vitest";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { norm, subtract } from "@/lib/physics/vector";
import { mustOrbit, verificationOrbit } from "../../fixtures/orbits";

/** An invented fragment. */
const FRAGMENT: Elements = {
  catalogNumber: 999_000_001,
  objectName: "INVENTED FRAGMENT",
  objectId: "2031-001A",
  epochMs: Date.UTC(2031, 3, 6, 3, 12, 45, 123) + 0.456,
  meanMotionRevPerDay: 14.5,
  eccentricity: 0.003,
  inclinationDeg: 97.9,
  raanDeg: 12,
  argPericenterDeg: 34,
  meanAnomalyDeg: 56,
  bstar: 2e-4,
  meanMotionDot: 0,
  meanMotionDdot: 0,
};

describe("an orbit made of elements", () => {
  it("has its period from the mean motion and a state at its epoch", () => {
    const orbit = mustOrbit(FRAGMENT);
    expect(orbit.periodS).toBeCloseTo(86400 / 14.5, 9);
    expect(orbit.elements).toBe(FRAGMENT);
    expect(orbit.stateAt(FRAGMENT.epochMs).ok).toBe(true);
  });

  it("keeps the microseconds of the epoch: half a millisecond later is 3.8 m further along", () => {
    const later = mustOrbit({ ...FRAGMENT, epochMs: FRAGMENT.epochMs + 0.5 });
    const at = FRAGMENT.epochMs + 3_600_000;
    const [a, b] = [mustOrbit(FRAGMENT).stateAt(at), later.stateAt(at)];
    if (!a.ok || !b.ok) throw new Error("no state");
    const alongKm = norm(subtract(a.state.rKm, b.state.rKm));
    expect(alongKm).toBeCloseTo(norm(a.state.vKmPerS) * 0.0005, 5);
  });

  it("gives the same state whatever was asked before", () => {
    const orbit = verificationOrbit(8195);
    const at = orbit.elements.epochMs + 5 * 86_400_000;
    const first = orbit.stateAt(at);
    orbit.stateAt(at - 30 * 86_400_000);
    orbit.stateAt(at + 30 * 86_400_000);
    expect(orbit.stateAt(at)).toEqual(first);
  });

  it.each([
    [{ epochMs: Number.NaN }, "The epoch is not a number."],
    [{ epochMs: 1e16 }, "The epoch is not a date."],
    [{ meanMotionRevPerDay: 0 }, "The mean motion must be above zero."],
    [{ meanMotionRevPerDay: Number.POSITIVE_INFINITY }, "The mean motion is not a number."],
    [{ eccentricity: 1 }, "The eccentricity must be from 0 to below 1."],
    [{ eccentricity: -0.1 }, "The eccentricity must be from 0 to below 1."],
    [{ inclinationDeg: 180.1 }, "The inclination must be from 0 to 180 degrees."],
    [{ raanDeg: Number.NaN }, "The right ascension of the ascending node is not a number."],
    [{ argPericenterDeg: Number.NaN }, "The argument of pericentre is not a number."],
    [{ meanAnomalyDeg: Number.NaN }, "The mean anomaly is not a number."],
    [{ bstar: Number.NaN }, "The drag term is not a number."],
  ])("is refused with a sentence: %j", (change, reason) => {
    expect(makeOrbit({ ...FRAGMENT, ...change })).toEqual({ ok: false, reason });
  });

  it("is refused when it lies under the ground at its own epoch", () => {
    const made = makeOrbit({ ...FRAGMENT, meanMotionRevPerDay: 17.2 });
    expect(made).toEqual({ ok: false, reason: expect.stringMatching(/^No state at the set's own epoch\./) });
  });

  it("says when it has decayed, with the time", () => {
    const orbit = mustOrbit({ ...FRAGMENT, meanMotionRevPerDay: 16.35, bstar: 0.01 });
    const late = orbit.stateAt(FRAGMENT.epochMs + 60 * 86_400_000);
    expect(late.ok).toBe(false);
    expect(late).toEqual({
      ok: false,
      reason: expect.stringMatching(/^Propagation fails at 2031-06-05T03:12:45\.123Z: .+\.$/),
    });
  });

  it("never gives a state at an impossible time", () => {
    expect(mustOrbit(FRAGMENT).stateAt(Number.NaN)).toEqual({
      ok: false,
      reason: "Propagation fails at an impossible time: SGP4 gives no finite state.",
    });
  });
});
