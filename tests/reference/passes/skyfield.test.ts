import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { DEG } from "@/lib/physics/constants";
import type { Site } from "@/lib/physics/orbit/elements";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { findPasses, type PassEvent } from "@/lib/physics/passes/find-passes";
import { elementsFromText } from "../../fixtures/read-tle";

// Reference: Skyfield's event search over 200 real element sets of 2021, 3 stations, 3 days; made by
// tests/fixtures/make-skyfield-events.py, versions recorded in the fixture. Skyfield's search stops at a second
// (and in shallow passes a minute away), so the script halves on, on Skyfield's own altitudes. Tolerances: rise
// and set 1 s, maximum elevation 0.02 degrees; none missing, none extra.
interface Fixture {
  readonly versions: Readonly<Record<string, string>>;
  readonly start: string;
  readonly days: number;
  readonly limitDeg: number;
  readonly stations: readonly Site[];
  readonly sets: readonly {
    readonly index: number;
    readonly catalogNumber: number;
    /** For each station: kinds (0 rise, 1 culmination, 2 set), ms after the start, elevations in 1e-4 degrees. */
    readonly events: readonly (readonly [string, readonly number[], readonly number[]])[];
  }[];
}

const fixture: Fixture = JSON.parse(
  readFileSync(new URL("../../fixtures/skyfield-events.json", import.meta.url), "utf8"),
);
const sets = elementsFromText(readFileSync("../shared/reference/published-debris-2021.tle", "utf8"));
const fromMs = Date.parse(fixture.start);
const toMs = fromMs + fixture.days * 86_400_000;

interface Event {
  readonly kind: string;
  readonly atMs: number;
  readonly elevationDeg: number | null;
}

/** Our passes as the events that a search for events gives: what is cut at an end is no event. */
function eventsOf(passes: readonly PassEvent[]): Event[] {
  return passes.flatMap((p) => {
    const top = p.culminateMs > p.riseMs && p.culminateMs < p.setMs;
    return [
      ...(p.underWayAtFrom ? [] : [{ kind: "0", atMs: p.riseMs, elevationDeg: null }]),
      ...(top ? [{ kind: "1", atMs: p.culminateMs, elevationDeg: p.maxElevationRad / DEG }] : []),
      ...(p.underWayAtTo ? [] : [{ kind: "2", atMs: p.setMs, elevationDeg: null }]),
    ];
  });
}

describe(`events of Skyfield ${fixture.versions.skyfield} for 200 real element sets`, () => {
  const stations = fixture.stations.map((site) => ({ site, minElevationRad: fixture.limitDeg * DEG }));
  const worst = { edgeMs: 0, elevationDeg: 0 };
  let events = 0;

  it.each(fixture.sets)("agree for $catalogNumber", ({ index, catalogNumber, events: wanted }) => {
    const elements = sets[index];
    if (!elements) throw new Error("the fixture names a set that the file has not");
    expect(elements.catalogNumber).toBe(catalogNumber);
    const made = makeOrbit(elements);
    if (!made.ok) throw new Error(made.reason);
    const { passes, failure } = findPasses(made.orbit, stations, fromMs, toMs);
    expect(failure).toBeNull();
    for (const [station, [kinds, offsetsMs, tops]] of wanted.entries()) {
      const mine = eventsOf(passes.filter((p) => p.stationIndex === station).map((p) => p.pass));
      expect(mine.map((e) => e.kind).join("")).toBe(kinds);
      const elevations = [...tops];
      for (const [i, event] of mine.entries()) {
        const offMs = Math.abs(event.atMs - fromMs - (offsetsMs[i] ?? Number.NaN));
        events++;
        if (event.elevationDeg === null) {
          expect(offMs).toBeLessThanOrEqual(1000);
          worst.edgeMs = Math.max(worst.edgeMs, offMs);
          continue;
        }
        const offDeg = Math.abs(event.elevationDeg - (elevations.shift() ?? Number.NaN) / 1e4);
        expect(offDeg).toBeLessThan(0.02);
        worst.elevationDeg = Math.max(worst.elevationDeg, offDeg);
      }
    }
  });

  it("compared thousands of events, and most far better than asked", () => {
    expect(events).toBeGreaterThan(10_000);
    expect(worst.edgeMs).toBeGreaterThan(0);
    console.info(
      `${events} events compared; worst rise or set ${worst.edgeMs.toFixed(0)} ms, ` +
        `worst maximum elevation ${worst.elevationDeg.toFixed(4)} degrees`,
    );
  });
});
