import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { matchPasses } from "@/lib/services/sweep-match";

const MINUTE = 60_000;
const pass = (stationId: string, minute: number) => ({ stationId, culminateMs: minute * MINUTE });

describe("matchPasses", () => {
  it("keeps a pass that moved by less than the window, at its own station only", () => {
    const stored = [pass("a", 100), pass("b", 100)];
    const found = [pass("a", 103), pass("b", 130)];
    const { kept, added, missing } = matchPasses(stored, found, 25 * MINUTE);
    expect(kept).toEqual([{ stored: stored[0], found: found[0] }]);
    expect(added).toEqual([found[1]]);
    expect(missing).toEqual([stored[1]]);
  });

  it("takes the nearest pair first and nothing twice", () => {
    const stored = [pass("a", 100), pass("a", 110)];
    const found = [pass("a", 109)];
    const { kept, added, missing } = matchPasses(stored, found, 25 * MINUTE);
    expect(kept).toEqual([{ stored: stored[1], found: found[0] }]);
    expect(added).toEqual([]);
    expect(missing).toEqual([stored[0]]);
  });

  it("accounts for every pass exactly once, and never joins what is too far apart", () => {
    const passes = fc.array(
      fc.record({ station: fc.constantFrom("a", "b"), minute: fc.integer({ min: 0, max: 400 }) }),
    );
    fc.assert(
      fc.property(passes, passes, fc.integer({ min: 0, max: 40 }), (before, after, window) => {
        const stored = before.map(({ station, minute }) => pass(station, minute));
        const found = after.map(({ station, minute }) => pass(station, minute));
        const { kept, added, missing } = matchPasses(stored, found, window * MINUTE);
        expect(new Set([...kept.map((k) => k.stored), ...missing])).toEqual(new Set(stored));
        expect(kept.length + missing.length).toBe(stored.length);
        expect(kept.length + added.length).toBe(found.length);
        for (const { stored: s, found: f } of kept) {
          expect(s.stationId).toBe(f.stationId);
          expect(Math.abs(s.culminateMs - f.culminateMs)).toBeLessThanOrEqual(window * MINUTE);
        }
        for (const s of missing) {
          const near = added.filter(
            (f) => f.stationId === s.stationId && Math.abs(f.culminateMs - s.culminateMs) <= window * MINUTE,
          );
          expect(near).toEqual([]);
        }
      }),
    );
  });
});
