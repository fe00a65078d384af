import { describe, expect, it } from "vitest";
import { airspace } from "@/lib/planning/closures/airspace";
import type { AnswerFacts, VolumeFacts } from "@/lib/planning/pass-facts";
import { brief, OPEN, PASS, riseAnd, span } from "./facts";

const UNIT = { id: "a-1", name: "Cotter Vale Approach", kind: "air unit", leadTimeMin: 30, version: 1 };
const VOLUME: VolumeFacts = {
  id: "v-1",
  name: "Vale corridor",
  version: 5,
  authorityId: "a-1",
  floorText: "FL 100",
  ceilingText: "FL 245",
  activeSpans: [{ fromMs: riseAnd(-3600), toMs: riseAnd(150) }],
  scheduleKnownUntilMs: riseAnd(86_400),
  liftable: true,
};
const INSIDE = { ...PASS, airspaceKey: "v-1:5", volumes: [{ volumeId: "v-1", spans: [span(100, 200)] }] };

function judged(volume: Partial<VolumeFacts>, answers: AnswerFacts[] | null = null, dwell = span(90, 160)) {
  const own = answers && { engagementId: "e-1", dwell, requestedOf: new Set(["a-1"]), answers };
  const facts = { ...OPEN, airspaceKey: "v-1:5", authorities: [UNIT], own };
  return airspace(INSIDE, { ...facts, volumes: [{ ...VOLUME, ...volume }] });
}

function answer(outcome: AnswerFacts["outcome"]): AnswerFacts {
  return { authorityId: "a-1", outcome, conditions: null, reasons: null, answeredMs: riseAnd(-5000) };
}

describe("airspace", () => {
  it("leaves an inactive volume open", () => {
    expect(judged({ activeSpans: [span(-3600, 50), span(300, 3600)] })).toEqual([]);
  });

  it("counts overlapping hours once", () => {
    const activeSpans = [span(0, 130), span(120, 150)];
    expect(brief(judged({ activeSpans }))).toEqual([["pending", 100, 150]]);
  });

  it("is pending where the beam runs through an active volume that its authority may lift", () => {
    const closures = judged({});
    expect(brief(closures)).toEqual([["pending", 100, 150]]);
    expect(closures[0]?.cause).toBe(
      "The beam runs through Vale corridor (FL 100 to FL 245) while it is active; Cotter Vale Approach may allow it.",
    );
    expect(closures[0]?.input).toBe("airspace volume Vale corridor, version 5");
  });

  it("is lifted by no objection, with or without conditions, and by nothing else", () => {
    expect(judged({}, [answer("no objection")])).toEqual([]);
    expect(judged({}, [answer("no objection with conditions")])).toEqual([]);
    expect(brief(judged({}, [answer("objection")]))).toEqual([["pending", 100, 150]]);
    expect(brief(judged({}, []))).toEqual([["pending", 100, 150]]);
  });

  it("stays pending for seconds that the answer was not about", () => {
    expect(brief(judged({}, [answer("no objection")], span(110, 130)))).toEqual([
      ["pending", 100, 110],
      ["pending", 130, 150],
    ]);
  });

  it("is closed where the volume can't be lifted, or nobody is named who could", () => {
    expect(brief(judged({ liftable: false }, [answer("no objection")]))).toEqual([["closed", 100, 150]]);
    expect(brief(judged({ authorityId: null }))).toEqual([["closed", 100, 150]]);
  });

  it("reads not checked where the hours are not known", () => {
    const unknown = judged({ activeSpans: [] });
    expect(brief(unknown)).toEqual([["not checked", 100, 200]]);
    expect(unknown[0]?.overridable).toBe(true);
    expect(brief(judged({ scheduleKnownUntilMs: riseAnd(170) }))).toEqual([
      ["pending", 100, 150],
      ["not checked", 170, 200],
    ]);
    const answered = judged({ activeSpans: [] }, [answer("no objection")], span(90, 180));
    expect(brief(answered)).toEqual([["not checked", 180, 200]]);
    const shut = judged({ activeSpans: [], liftable: false }, [answer("no objection")], span(90, 180));
    expect(brief(shut)).toEqual([["not checked", 100, 200]]);
  });

  it("reads not checked over the whole pass when the volumes have changed since it was measured", () => {
    const closures = airspace(INSIDE, { ...OPEN, airspaceKey: "v-1:6", volumes: [VOLUME] });
    expect(brief(closures)).toEqual([["not checked", 0, 600]]);
    expect(closures[0]?.overridable).toBe(false);
  });
});
