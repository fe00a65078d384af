import { describe, expect, it } from "vitest";
import { authorityAnswers } from "@/lib/planning/closures/authority-answers";
import type { AnswerFacts, PassFacts } from "@/lib/planning/pass-facts";
import { brief, MINUTE, OPEN, PASS, RISE, riseAnd, span } from "./facts";

const DESK = { id: "desk", name: "Eastmoor Desk", kind: "clearing authority", leadTimeMin: 60, version: 1 };
const UNIT = { id: "unit", name: "Cotter Vale Approach", kind: "air unit", leadTimeMin: 30, version: 1 };
const FACTS: PassFacts = {
  ...OPEN,
  authorities: [DESK, UNIT],
  stationAuthorityIds: ["desk"],
  airspaceKey: "v-1:1",
  volumes: [
    {
      id: "v-1",
      name: "Vale corridor",
      version: 1,
      authorityId: "unit",
      floorText: "FL 100",
      ceilingText: "FL 245",
      activeSpans: [span(-9000, 9000)],
      scheduleKnownUntilMs: riseAnd(90_000),
      liftable: true,
    },
  ],
};
const CROSSING = { ...PASS, airspaceKey: "v-1:1", volumes: [{ volumeId: "v-1", spans: [span(100, 200)] }] };

function answer(authorityId: string, outcome: AnswerFacts["outcome"], reasons: string | null = null) {
  return { authorityId, outcome, conditions: null, reasons, answeredMs: RISE - 90 * MINUTE };
}

function asked(ids: string[], answers: AnswerFacts[]): PassFacts["own"] {
  return { engagementId: "e-1", dwell: span(60, 120), requestedOf: new Set(ids), answers };
}

describe("authority answers", () => {
  it("leaves a pass open that concerns nobody", () => {
    expect(authorityAnswers(PASS, { ...FACTS, stationAuthorityIds: [] })).toEqual([]);
  });

  it("is pending: over the pass for the station's authority, over the stretch for the volume's", () => {
    const closures = authorityAnswers(CROSSING, FACTS);
    expect(brief(closures)).toEqual([
      ["pending", 0, 600],
      ["pending", 100, 200],
    ]);
    expect(closures[1]?.cause).toBe(
      "Cotter Vale Approach must be asked: the beam runs through Vale corridor.",
    );
  });

  it("closes every second that is too near to ask the station's authority", () => {
    const nowMs = riseAnd(120) - 60 * MINUTE;
    expect(brief(authorityAnswers(PASS, { ...FACTS, nowMs }))).toEqual([
      ["closed", 0, 120],
      ["pending", 0, 600],
    ]);
  });

  it("closes the stretch of a volume whose authority can't be asked before the earliest dwell", () => {
    const nowMs = RISE + 1000 - 30 * MINUTE;
    const facts = { ...FACTS, nowMs, stationAuthorityIds: [] };
    expect(brief(authorityAnswers(CROSSING, facts))).toEqual([
      ["closed", 100, 200],
      ["pending", 100, 200],
    ]);
    // A dwell that begins late enough keeps the lead time.
    expect(brief(authorityAnswers(CROSSING, { ...facts, dwell: span(50, 150) }))).toEqual([
      ["pending", 100, 200],
    ]);
    expect(brief(authorityAnswers(CROSSING, { ...facts, dwell: span(0, 150) }))[0]?.[0]).toBe("closed");
  });

  it("asks a volume's authority only when the dwell touches its stretch while it is active", () => {
    const facts = { ...FACTS, stationAuthorityIds: [], dwell: span(220, 300) };
    expect(authorityAnswers(CROSSING, facts)).toEqual([]);
    const [volume] = FACTS.volumes;
    const asleep = volume ? [{ ...volume, activeSpans: [span(-9000, 50)] }] : [];
    const during = { ...FACTS, stationAuthorityIds: [], dwell: span(100, 150), volumes: asleep };
    expect(authorityAnswers(CROSSING, during)).toEqual([]);
  });

  it("does not hold the lead time against a request that has gone out", () => {
    const facts = { ...FACTS, nowMs: RISE, own: asked(["desk"], []), dwell: span(60, 120) };
    expect(brief(authorityAnswers(PASS, facts))).toEqual([["pending", 60, 120]]);
  });

  it("is lifted by no objection, with or without conditions", () => {
    for (const outcome of ["no objection", "no objection with conditions"] as const) {
      const facts = { ...FACTS, own: asked(["desk"], [answer("desk", outcome)]), dwell: span(60, 120) };
      expect(authorityAnswers(PASS, facts)).toEqual([]);
    }
  });

  it("says nothing about other seconds of the pass than those that were asked about", () => {
    const whole = { ...FACTS, dwell: null };
    const content = asked(["desk"], [answer("desk", "no objection")]);
    expect(brief(authorityAnswers(PASS, { ...whole, own: content }))).toEqual([
      ["pending", 0, 60],
      ["pending", 120, 600],
    ]);
    const against = asked(["desk"], [answer("desk", "objection")]);
    expect(brief(authorityAnswers(PASS, { ...whole, own: against }))).toEqual([
      ["closed", 60, 120],
      ["pending", 0, 60],
      ["pending", 120, 600],
    ]);
  });

  it("is closed by an objection, with its reasons", () => {
    const answers = [answer("desk", "objection", "a survey flight at that hour")];
    const facts = { ...FACTS, own: asked(["desk"], answers), dwell: span(60, 120) };
    const closures = authorityAnswers(PASS, facts);
    expect(brief(closures)).toEqual([["closed", 60, 120]]);
    expect(closures[0]?.cause).toBe("Eastmoor Desk objects: a survey flight at that hour");
  });
});
