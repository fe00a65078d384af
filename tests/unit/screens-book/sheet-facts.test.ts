import { describe, expect, test } from "vitest";
import { refusalsBefore, toAttest } from "@/app/_components/engagement/sheet-facts";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";
import type { ClosureBody } from "@/lib/contracts/passes";

const CLOSURE: ClosureBody = {
  from: "2031-04-06T03:15:00.000Z",
  to: "2031-04-06T03:16:00.000Z",
  rule: "airspace",
  verdict: "not checked",
  cause: "No schedule is known for this day.",
  label: "airspace",
  input: "volume 3",
  liftedBy: "A newer schedule.",
  overridable: true,
};

type Part = Pick<EngagementSheetBody, "closures" | "attestations">;
const sheetOf = (part: Part) => part as EngagementSheetBody;

describe("rules that wait for a person's word", () => {
  test("are named once, with every cause", () => {
    const closures = [CLOSURE, { ...CLOSURE, cause: "The ring can't be read." }, CLOSURE];
    expect(toAttest({ closures, attestations: [] })).toEqual([
      { rule: "airspace", causes: [CLOSURE.cause, "The ring can't be read."] },
    ]);
  });

  test("never are those where no word may stand in, nor those that have one", () => {
    const fixed = { ...CLOSURE, rule: "protected objects", overridable: false };
    const given = { rule: "airspace", statement: "Called.", personName: "Ruth", attestedAt: CLOSURE.from };
    expect(toAttest({ closures: [fixed, CLOSURE], attestations: [given] })).toEqual([]);
  });
});

describe("what keeps a form shut", () => {
  const refusal = `Not checked, airspace: ${CLOSURE.cause} A person must give their word for it.`;
  const sheet = sheetOf({ closures: [CLOSURE], attestations: [] });

  test("a missing word is given in the form itself", () => {
    expect(refusalsBefore({ command: "confirm", refusals: [refusal] }, sheet)).toEqual([]);
  });

  test("everything else keeps it shut", () => {
    const others = [
      "Not checked, protected objects: the list is empty. No person's word can stand in for this.",
    ];
    expect(refusalsBefore({ command: "confirm", refusals: [refusal, ...others] }, sheet)).toEqual(others);
    expect(refusalsBefore({ command: "fire", refusals: [refusal] }, sheet)).toEqual([refusal]);
  });
});
