import { describe, expect, it } from "vitest";
import { earthFixedNode, shiftNode } from "@/lib/physics/orbit/earth-fixed";
import { blankSegment, evaluate, fitSegment } from "@/lib/physics/orbit/hermite";
import { makePath, PropagationFailure, pathAt } from "@/lib/physics/orbit/path";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import { realOrbits, verificationOrbit } from "../../fixtures/orbits";

function mustNode(orbit: Orbit, atMs: number) {
  const node = earthFixedNode(orbit, atMs);
  if (!node) throw new Error("propagation fails");
  return node;
}

const segment = blankSegment();
const point = new Float64Array(6);

function offKm(atMs: number, orbit: Orbit): number {
  const truth = mustNode(orbit, atMs);
  const [x = 0, y = 0, z = 0] = point;
  return Math.hypot(x - truth.x, y - truth.y, z - truth.z);
}

describe("quintic polynomials between SGP4 states", () => {
  it.each([
    [240, 0.035, 0.003],
    [480, 0.08, 0.008],
  ])("stay near SGP4 for real fragments with nodes %i s apart", (stepS, worstKm, meanKm) => {
    let [worst, sum, count] = [0, 0, 0];
    for (const orbit of realOrbits(12)) {
      for (let k = 0; k < 10; k++) {
        const fromMs = orbit.elements.epochMs + k * 1_000_000;
        fitSegment(mustNode(orbit, fromMs), mustNode(orbit, fromMs + stepS * 1000), segment);
        for (const share of [0.25, 0.5, 0.75]) {
          const atMs = fromMs + share * stepS * 1000;
          evaluate(segment, atMs, point, 0);
          const off = offKm(atMs, orbit);
          worst = Math.max(worst, off);
          sum += off;
          count++;
        }
      }
    }
    expect(count).toBe(3000);
    expect(worst).toBeLessThan(worstKm);
    expect(sum / count).toBeLessThan(meanKm);
  });

  it("meet both nodes in position and velocity", () => {
    const orbit = verificationOrbit(6251);
    const a = mustNode(orbit, orbit.elements.epochMs);
    const b = mustNode(orbit, orbit.elements.epochMs + 240_000);
    fitSegment(a, b, segment);
    for (const node of [a, b]) {
      evaluate(segment, node.atMs, point, 0);
      const want = [node.x, node.y, node.z, node.vx, node.vy, node.vz];
      for (const [i, value] of want.entries()) expect(point[i]).toBeCloseTo(value, 8);
    }
  });

  it("carry a node on by fractions of a second", () => {
    const orbit = verificationOrbit(6251);
    const at = orbit.elements.epochMs;
    const shifted = shiftNode(mustNode(orbit, at), 250);
    const truth = mustNode(orbit, at + 250);
    expect(shifted.atMs).toBe(at + 250);
    expect(Math.hypot(shifted.x - truth.x, shifted.y - truth.y, shifted.z - truth.z)).toBeLessThan(1e-4);
  });
});

describe("a path", () => {
  it("covers its whole span, its ends included", () => {
    const orbit = verificationOrbit(6251);
    const fromMs = orbit.elements.epochMs;
    const path = makePath(orbit, fromMs, fromMs + 600_000, 5);
    for (const atMs of [fromMs, fromMs + 119_999, fromMs + 120_000, fromMs + 333_333, fromMs + 600_000]) {
      pathAt(path, atMs, point);
      expect(offKm(atMs, orbit)).toBeLessThan(0.02);
    }
  });

  it("throws SGP4's sentence where propagation fails", () => {
    const orbit = verificationOrbit(28872);
    // It comes down 55 minutes after epoch.
    const late = orbit.elements.epochMs + 55 * 60_000;
    const path = makePath(orbit, late, late + 600_000, 10);
    expect(() => pathAt(path, late, point)).toThrow(PropagationFailure);
    expect(() => pathAt(path, late, point)).toThrow(/^Propagation fails at/);
  });
});
