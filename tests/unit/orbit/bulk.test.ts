import { describe, expect, it } from "vitest";
import { openBulk } from "@/lib/physics/orbit/bulk";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { realOrbits, verificationOrbit } from "../../fixtures/orbits";

const bulk = await openBulk();

describe("propagation in bulk", () => {
  it("gives the same states as one object at a time, set by set and time by time (1e-6 km)", () => {
    const orbits = realOrbits(30);
    const grid = { fromMs: Date.UTC(2021, 9, 3, 6, 30) + 0.123, stepMs: 3_601_001, count: 60 };
    const got = bulk.propagate(
      orbits.map((o) => o.elements),
      grid,
    );
    for (const [i, orbit] of orbits.entries()) {
      for (let k = 0; k < grid.count; k++) {
        const one = orbit.stateAt(grid.fromMs + k * grid.stepMs);
        const at = i * grid.count + k;
        expect(got.usable[at]).toBe(one.ok ? 1 : 0);
        if (!one.ok) continue;
        const { rKm, vKmPerS } = one.state;
        const [x = 0, y = 0, z = 0] = got.positionsKm.subarray(3 * at, 3 * at + 3);
        const [vx = 0, vy = 0, vz = 0] = got.velocitiesKmPerS.subarray(3 * at, 3 * at + 3);
        expect(Math.hypot(x - rKm.x, y - rKm.y, z - rKm.z)).toBeLessThan(1e-6);
        expect(Math.hypot(vx - vKmPerS.x, vy - vKmPerS.y, vz - vKmPerS.z)).toBeLessThan(1e-9);
      }
    }
  });

  it("marks what fails and goes on with the rest", () => {
    const [falling, good] = [verificationOrbit(28872), verificationOrbit(6251)];
    const { usable } = bulk.propagate([falling.elements, good.elements, falling.elements], {
      fromMs: falling.elements.epochMs + 55 * 60_000,
      stepMs: 1000,
      count: 1,
    });
    expect([...usable]).toEqual([0, 1, 0]);
  });

  it("marks sets that no orbit can be made of", () => {
    const { elements } = verificationOrbit(6251);
    const broken = { ...elements, eccentricity: Number.NaN };
    expect(makeOrbit(broken).ok).toBe(false);
    const { usable } = bulk.propagate([broken], { fromMs: elements.epochMs, stepMs: 1000, count: 2 });
    expect([...usable]).toEqual([0, 0]);
  });

  it("has nothing for no sets or no times, and refuses a grid it cannot hold", () => {
    const { elements } = verificationOrbit(6251);
    const grid = { fromMs: elements.epochMs, stepMs: 1000, count: 0 };
    expect(bulk.propagate([], { ...grid, count: 5 }).usable).toHaveLength(0);
    expect(bulk.propagate([elements], grid).usable).toHaveLength(0);
    expect(() => bulk.propagate([elements], { ...grid, stepMs: 0.5, count: 2 })).toThrow(RangeError);
    expect(() => bulk.propagate([elements], { ...grid, stepMs: 86_400_000, count: 400 })).toThrow(RangeError);
  });
});
