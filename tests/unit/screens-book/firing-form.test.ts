import { describe, expect, test } from "vitest";
import { checklistBody, EMPTY_CHECKLIST } from "@/app/_components/engagement/checklist";
import {
  EMPTY_FIRING,
  firingBody,
  firingProblem,
  type TypedFiring,
} from "@/app/_components/engagement/firing-form";
import { checklistInput, fireInput } from "@/lib/contracts/engagements";

const FIRED: TypedFiring = {
  outcome: "fired",
  openedAt: "2031-04-06 03:15:02.120Z",
  closedAt: "2031-04-06 03:16:45Z",
  pulses: "1 545",
  interruptions: [{ key: 1, at: "2031-04-06 03:15:30.5Z", cause: " aircraft ", secondsLost: "2,5" }],
  note: " ",
};

describe("the firing form", () => {
  test("what is typed becomes a record that the contract takes", () => {
    expect(firingProblem(FIRED)).toBeNull();
    expect(fireInput.parse(firingBody(FIRED))).toEqual({
      outcome: "fired",
      openedAt: "2031-04-06T03:15:02.120Z",
      closedAt: "2031-04-06T03:16:45.000Z",
      pulses: 1545,
      interruptions: [{ at: "2031-04-06T03:15:30.500Z", cause: "aircraft", secondsLost: 2.5 }],
      note: null,
    });
  });

  test("not fired sends no shutter times, whatever stands in the fields", () => {
    expect(fireInput.parse(firingBody({ ...FIRED, outcome: "not fired", note: "cloud" }))).toEqual({
      outcome: "not fired",
      pulses: 0,
      interruptions: [],
      note: "cloud",
    });
  });

  test.each<[Partial<TypedFiring>, string]>([
    [EMPTY_FIRING, "Choose what happened."],
    [{ openedAt: "03:15" }, "Shutter opened: write a UTC time."],
    [{ pulses: "1.5" }, "Pulses: write a whole number."],
    [
      { interruptions: [{ key: 1, at: "", cause: "x", secondsLost: "1" }] },
      "Interruption 1: write a UTC time.",
    ],
    [
      { interruptions: [{ key: 1, at: "2031-04-06 03:15", cause: " ", secondsLost: "1" }] },
      "Interruption 1: say what caused it.",
    ],
    [
      { interruptions: [{ key: 1, at: "2031-04-06 03:15", cause: "x", secondsLost: "-1" }] },
      "Interruption 1: how many seconds were lost?",
    ],
  ])("%j is said in words", (part, words) => {
    expect(firingProblem({ ...FIRED, ...part })).toBe(words);
  });
});

describe("the checklist", () => {
  test("has no defaults: an empty one lacks every value", () => {
    const result = checklistInput.safeParse(checklistBody(EMPTY_CHECKLIST));
    expect(result.error?.issues.map((issue) => issue.path[0])).toEqual(Object.keys(EMPTY_CHECKLIST));
  });

  test("takes a minus sign as people type it", () => {
    expect(checklistBody({ ...EMPTY_CHECKLIST, clockOffsetMs: "\u22122,5" })).toEqual({
      clockOffsetMs: -2.5,
    });
    expect(checklistBody({ ...EMPTY_CHECKLIST, clockOffsetMs: "3 ms" })).toEqual({});
  });
});
