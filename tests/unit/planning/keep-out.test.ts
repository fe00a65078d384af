import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import {
  alongTrackErrorKm,
  guardedCrossing,
  halfAngleOf,
  inflatedHalfAngle,
  isUsableSet,
  KEEP_OUT,
} from "@/lib/planning/keep-out";

const NOW = Date.UTC(2031, 3, 6);
const DAY = 86_400_000;

describe("keep-out cones", () => {
  it("start from the common practice of 2.5° and widen for crewed spacecraft", () => {
    // 2.5° default and 0.1° smallest: arXiv 2606.25238, summary.
    expect(KEEP_OUT["optical payload"].halfAngleDeg).toBe(2.5);
    expect(KEEP_OUT.crewed.halfAngleDeg).toBeGreaterThan(2.5);
    expect(halfAngleOf("payload", 0.01)).toBe(0.1);
    expect(halfAngleOf("payload", 3)).toBe(3);
    expect(halfAngleOf("payload", null)).toBe(KEEP_OUT.payload.halfAngleDeg);
  });

  it("take 1 km at epoch and 1 km more each day, on either side of the epoch", () => {
    expect(alongTrackErrorKm(NOW, NOW)).toBe(1);
    expect(alongTrackErrorKm(NOW - 3 * DAY, NOW)).toBe(4);
    expect(alongTrackErrorKm(NOW + 2 * DAY, NOW)).toBe(3);
  });

  it("show the added part apart", () => {
    const inflated = inflatedHalfAngle({
      halfAngleDeg: 2.5,
      atMs: NOW,
      target: { epochMs: NOW, rangeKm: 800 },
      other: { epochMs: NOW - 2 * DAY, rangeKm: 1200 },
    });
    // 1 km at 800 km is 0.0716° (0.07° in the trade's own arithmetic); 3 km at 1200 km is 0.1432°.
    expect(inflated.addedRad / DEG).toBeCloseTo(0.0716 + 0.1432, 3);
    expect(inflated.halfAngleRad / DEG).toBeCloseTo(2.5, 12);
    expect(inflated.totalRad).toBeCloseTo(inflated.halfAngleRad + inflated.addedRad, 12);
  });

  it("widen crossings by 2 s at both ends", () => {
    expect(guardedCrossing({ fromMs: 10_000, toMs: 12_000 })).toEqual({ fromMs: 8_000, toMs: 14_000 });
  });

  it("do not trust a set a fortnight away from its epoch", () => {
    expect(isUsableSet(NOW - 14 * DAY, NOW)).toBe(true);
    expect(isUsableSet(NOW - 14 * DAY - 1, NOW)).toBe(false);
    expect(isUsableSet(NOW + 15 * DAY, NOW)).toBe(false);
  });
});
