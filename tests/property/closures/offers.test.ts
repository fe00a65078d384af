import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { DwellLimits } from "@/lib/planning/choose-dwell";
import { cutClosures, withVerdict } from "@/lib/planning/closure";
import { closuresOf } from "@/lib/planning/closures/list";
import { brokenLimits } from "@/lib/planning/dwell-limits";
import { effectOfDwell } from "@/lib/planning/effect";
import { contains, overlaps } from "@/lib/planning/interval";
import { openingsOf } from "@/lib/planning/openings";
import type { PassFacts } from "@/lib/planning/pass-facts";
import { planPass } from "@/lib/planning/pass-plan";
import { BODY, LASER, LIMITS, MAP, measured, ORBIT, PASSES } from "./sky";

const FIVE_MINUTES = 300_000;
const pass = PASSES[0];
if (!pass) throw new Error("the invented orbit gives no pass");
const { riseMs, setMs } = pass;

/** A span of whole milliseconds somewhere around the pass. */
const span = fc
  .tuple(fc.integer({ min: -200, max: 900 }), fc.integer({ min: 1, max: 300 }))
  .map(([fromS, lengthS]) => ({ fromMs: riseMs + fromS * 1000, toMs: riseMs + (fromS + lengthS) * 1000 }));

const authority = (id: string) =>
  fc.integer({ min: 0, max: 90 }).map((leadTimeMin) => {
    return { id, name: `Authority ${id}`, kind: "air unit", leadTimeMin, version: 1 };
  });

const volume = fc.record({
  authorityId: fc.constantFrom("desk", "unit", null),
  liftable: fc.boolean(),
  activeSpans: fc.array(span, { maxLength: 2 }),
  scheduleKnownUntilMs: fc.integer({ min: -100, max: 900 }).map((s) => riseMs + s * 1000),
  spans: fc.array(span, { maxLength: 2 }),
});

const crossing = fc.record({
  span,
  class: fc.constantFrom("crewed" as const, "payload" as const, "own" as const),
});

const engagement = fc.record({
  span,
  stationId: fc.constantFrom("here", "elsewhere"),
  fragmentId: fc.constantFrom("this", "other"),
});

const world = fc.record({
  /** Up to two hours before rise, or within the pass. */
  nowMs: fc.integer({ min: -7200, max: 500 }).map((s) => riseMs + s * 1000 + 137),
  hours: fc.array(fc.tuple(fc.integer({ min: 0, max: 1440 }), fc.integer({ min: 0, max: 1440 })), {
    maxLength: 2,
  }),
  openAllDay: fc.boolean(),
  ageLimitH: fc.integer({ min: 1, max: 100 }),
  crossings: fc.array(crossing, { maxLength: 3 }),
  volumes: fc.array(volume, { maxLength: 3 }),
  engagements: fc.array(engagement, { maxLength: 2 }),
  desk: authority("desk"),
  unit: authority("unit"),
  firedAgoS: fc.option(fc.integer({ min: -500, max: 90_000 })),
  above: fc.array(span, { maxLength: 1 }),
});

type World = typeof world extends fc.Arbitrary<infer T> ? T : never;

const LIMITS_OF_DWELL: DwellLimits = {
  acquisitionS: 30,
  guardS: 2,
  minDwellS: 10,
  maxDwellS: 120,
  maxPulses: null,
  maxEnergyJ: null,
  maxHeatingS: null,
};

function geometryOf(w: World) {
  const plain = measured(pass as NonNullable<typeof pass>, LIMITS, []);
  const volumes = w.volumes.map(({ spans }, i) => ({ volumeId: `v-${i}`, spans }));
  return { ...plain, aboveCeiling: w.above, airspaceKey: "volumes", volumes };
}

function factsOf(w: World): PassFacts {
  const { epochMs } = ORBIT.elements;
  const hours = w.openAllDay ? [[0, 1440] as const] : w.hours;
  return {
    nowMs: w.nowMs,
    station: {
      id: "here",
      name: "Alder Point",
      ...LIMITS,
      openingHours: hours.map(([fromMin, toMin]) => ({ fromMin, toMin })),
      slewS: 60,
      coolDownS: 120,
      elementAgeLimitH: w.ageLimitH,
    },
    fragmentId: "this",
    elements: {
      fragmentName: "Fragment 88001",
      usedEpochMs: epochMs,
      usedSource: "test",
      newestEpochMs: epochMs,
      newestSource: "test",
    },
    vanishedAtMs: null,
    screening: {
      screenedAtMs: epochMs,
      catalogueChangedAtMs: null,
      crewedCount: 1,
      crossings: w.crossings.map((c, i) => ({
        ...c.span,
        object: { id: `p-${i}`, name: `Object ${i}`, class: c.class, version: 1 },
        minSeparationDeg: 0.5,
        halfAngleDeg: 1,
        addedDeg: 0.1,
        objectEpochMs: epochMs,
      })),
      gaps: [],
    },
    volumes: w.volumes.map(({ spans: _spans, ...v }, i) => ({
      ...v,
      id: `v-${i}`,
      name: `Volume ${i}`,
      version: 1,
      floorText: "SFC",
      ceilingText: "FL 245",
    })),
    airspaceKey: "volumes",
    authorities: [w.desk, w.unit],
    stationAuthorityIds: ["desk"],
    engagements: w.engagements.map((e, i) => ({
      id: `e-${i}`,
      number: 1001 + i,
      state: "proposed",
      version: 1,
      plannerName: "Plan Ner",
      stationId: e.stationId,
      stationName: e.stationId,
      fragmentId: e.fragmentId,
      dwell: e.span,
      hold: { fromMs: e.span.fromMs - 60_000, toMs: e.span.toMs + 120_000 },
    })),
    firings:
      w.firedAgoS === null
        ? []
        : [{ engagementNumber: 999, outcome: "fired", closedMs: riseMs - w.firedAgoS * 1000 }],
    own: null,
    dwell: null,
  };
}

describe("offers under any facts", () => {
  it("hold no closed second and break no limit, when read and for five minutes after", () => {
    let offered = 0;
    fc.assert(
      fc.property(world, fc.integer({ min: 0, max: FIVE_MINUTES }), (w, waitMs) => {
        const geometry = geometryOf(w);
        const facts = factsOf(w);
        const closures = closuresOf(geometry, { ...facts, nowMs: w.nowMs + FIVE_MINUTES });
        const plan = planPass({
          orbit: ORBIT,
          frame: MAP.frame,
          pass: geometry,
          laser: LASER,
          laserVersion: 1,
          body: BODY,
          closures,
          limits: LIMITS_OF_DWELL,
          aim: "decay",
        });
        expect(plan.refusal).toBeNull();
        if (!plan.dwell) return;
        offered += 1;
        const dwell = { fromMs: plan.dwell.fromMs, toMs: plan.dwell.toMs };
        const judged = closuresOf(geometry, { ...facts, nowMs: w.nowMs + waitMs, dwell });
        expect(withVerdict(cutClosures(judged, dwell), "closed")).toEqual([]);
        const worked = effectOfDwell({ orbit: ORBIT, frame: MAP.frame, laser: LASER, body: BODY, ...dwell });
        if (!worked.ok) throw new Error(worked.reason);
        const broken = brokenLimits({
          dwell,
          riseMs,
          openings: openingsOf(geometry, judged),
          limits: LIMITS_OF_DWELL,
          laser: LASER,
          meltOnsetS: worked.effect.meltOnsetS,
        });
        expect(broken).toEqual([]);
      }),
      { numRuns: 150 },
    );
    // The facts are free enough that many passes still offer something.
    expect(offered).toBeGreaterThan(20);
  });

  it("share no second with what is held, crossed or shut", () => {
    fc.assert(
      fc.property(world, (w) => {
        const geometry = geometryOf(w);
        const facts = factsOf(w);
        const openings = openingsOf(geometry, closuresOf(geometry, facts));
        for (const opening of openings) {
          expect(contains({ fromMs: riseMs, toMs: setMs }, opening)).toBe(true);
          expect(opening.fromMs).toBeGreaterThanOrEqual(Math.min(w.nowMs, setMs));
          for (const c of w.crossings) expect(overlaps(c.span, opening)).toBe(false);
          for (const a of w.above) expect(overlaps(a, opening)).toBe(false);
          for (const e of w.engagements) {
            if (e.stationId === "here") {
              const widened = { fromMs: e.span.fromMs - 180_000, toMs: e.span.toMs + 180_000 };
              expect(overlaps(widened, opening)).toBe(false);
            } else if (e.fragmentId === "this") {
              expect(overlaps(e.span, opening)).toBe(false);
            }
          }
        }
      }),
      { numRuns: 500 },
    );
  });
});
