import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { closeApproaches } from "@/lib/physics/screening/close-approach";
import { norm, subtract } from "@/lib/physics/vector";
import { mustOrbit } from "../../fixtures/orbits";
import { elementsFromText } from "../../fixtures/read-tle";

// Real element sets of 2021 (../shared/reference). The reference is a scan of SGP4 itself every five seconds,
// its minima refined by a parabola: distances within 0.1 km, times within 0.1 s.
const sets = elementsFromText(readFileSync("../shared/reference/published-debris-2021.tle", "utf8"));
const THRESHOLD_KM = 1000;

function orbits(count: number): Orbit[] {
  const step = Math.floor(sets.length / count);
  return sets
    .filter((_, i) => i % step === 0)
    .map((set) => makeOrbit(set))
    .flatMap((made) => (made.ok ? [made.orbit] : []));
}

function distanceKm(a: Orbit, b: Orbit, atMs: number): number {
  const [p, q] = [a.stateAt(atMs), b.stateAt(atMs)];
  if (!p.ok || !q.ok) throw new Error("propagation fails");
  return norm(subtract(p.state.rKm, q.state.rKm));
}

function scan(
  a: Orbit,
  b: Orbit,
  fromMs: number,
  toMs: number,
  thresholdKm = THRESHOLD_KM,
): { atMs: number; km: number }[] {
  const found: { atMs: number; km: number }[] = [];
  const stepMs = 5000;
  let [before, here] = [distanceKm(a, b, fromMs), distanceKm(a, b, fromMs + stepMs)];
  for (let at = fromMs + stepMs; at + stepMs <= toMs; at += stepMs) {
    const after = distanceKm(a, b, at + stepMs);
    if (here <= before && here < after && here < thresholdKm + 50) {
      // The square of the distance is a parabola to far better than the tolerance.
      const [l, m, r] = [before ** 2, here ** 2, after ** 2];
      const shift = (l - r) / (2 * (l - 2 * m + r));
      const km = Math.sqrt(Math.max(0, m - ((l - r) * shift) / 4));
      if (km <= thresholdKm) found.push({ atMs: at + shift * stepMs, km });
    }
    [before, here] = [here, after];
  }
  return found;
}

describe("closest approaches", () => {
  const [primary, ...others] = orbits(40);
  if (!primary) throw new Error("no orbit");
  const fromMs = primary.elements.epochMs;
  const toMs = fromMs + 43_200_000;

  it("finds what a scan of SGP4 finds, and nothing else", () => {
    const got = closeApproaches({ primary, others, fromMs, toMs, thresholdKm: THRESHOLD_KM });
    let compared = 0;
    for (const [i, other] of others.entries()) {
      const result = got[i];
      if (!result?.ok) throw new Error(result?.reason ?? "no result");
      const mine = result.approaches.filter((a) => !a.atEdge);
      const wanted = scan(primary, other, fromMs, toMs);
      expect(mine).toHaveLength(wanted.length);
      for (const [k, want] of wanted.entries()) {
        expect(Math.abs((mine[k]?.atMs ?? Number.NaN) - want.atMs)).toBeLessThan(100);
        expect(Math.abs((mine[k]?.missKm ?? Number.NaN) - want.km)).toBeLessThan(0.1);
        compared++;
      }
    }
    expect(compared).toBeGreaterThan(20);
  });

  it("gives relative position and velocity at right angles, and the speed", () => {
    const got = closeApproaches({ primary, others, fromMs, toMs, thresholdKm: THRESHOLD_KM });
    const all = got.flatMap((r) => (r.ok ? r.approaches : [])).filter((a) => !a.atEdge);
    expect(all.length).toBeGreaterThan(20);
    for (const a of all) {
      const { relativeKm: r, relativeKmPerS: v } = a;
      const along = (r.x * v.x + r.y * v.y + r.z * v.z) / a.relativeSpeedKmPerS;
      // SGP4's velocity is the rate of its position to within centimetres a second.
      expect(Math.abs(along)).toBeLessThan(0.05);
      expect(a.relativeSpeedKmPerS).toBeCloseTo(norm(v), 9);
    }
  });

  it("skips shells that never meet, and says why when an object fails", () => {
    const high = makeOrbit({ ...primary.elements, meanMotionRevPerDay: 1.0027, eccentricity: 0.0002 });
    const { elements } = primary;
    const falling = makeOrbit({ ...elements, meanMotionRevPerDay: 16.4, eccentricity: 0.0005, bstar: 0.05 });
    if (!high.ok || !falling.ok) throw new Error("the orbits are good at epoch");
    const [none, failed] = closeApproaches({
      primary: falling.orbit,
      others: [high.orbit, falling.orbit],
      fromMs,
      toMs: fromMs + 6 * 86_400_000,
      thresholdKm: 10,
    });
    expect(none).toEqual({ ok: true, approaches: [] });
    expect(failed).toEqual({ ok: false, reason: expect.stringContaining("Propagation fails at") });
  });

  it("follows an object that comes down through the other's shell", () => {
    // Against each other in one plane, at first 125 km apart; drag closes the gap within days.
    const { elements } = primary;
    const round = { ...elements, eccentricity: 0.0005, inclinationDeg: 90 };
    const sinking = mustOrbit({ ...round, meanMotionRevPerDay: 15.7, bstar: 0.03 });
    const low = mustOrbit({
      ...round,
      meanMotionRevPerDay: 16.15,
      raanDeg: elements.raanDeg + 180,
      bstar: 1e-6,
    });
    const [start, end] = [elements.epochMs, elements.epochMs + 3 * 86_400_000];
    const args = { primary: sinking, others: [low], thresholdKm: 60 };
    const [early] = closeApproaches({ ...args, fromMs: start, toMs: start + 7_200_000 });
    expect(early).toEqual({ ok: true, approaches: [] });
    const wanted = scan(sinking, low, start, end, 60);
    const [got] = closeApproaches({ ...args, fromMs: start, toMs: end });
    if (!got?.ok) throw new Error(got?.reason ?? "no result");
    expect(wanted.length).toBeGreaterThan(10);
    expect(got.approaches.map((a) => Math.round(a.atMs / 1000))).toEqual(
      wanted.map((w) => Math.round(w.atMs / 1000)),
    );
  });

  it("reports the ends of the time when the objects are near there", () => {
    const shifted = makeOrbit({ ...primary.elements, meanAnomalyDeg: primary.elements.meanAnomalyDeg + 0.1 });
    if (!shifted.ok) throw new Error(shifted.reason);
    const [got] = closeApproaches({
      primary,
      others: [shifted.orbit],
      fromMs,
      toMs: fromMs + 600_000,
      thresholdKm: 50,
    });
    if (!got?.ok) throw new Error("no result");
    expect(got.approaches.some((a) => a.atEdge)).toBe(true);
  });
});
