import { describe, expect, it } from "vitest";
import { stripClosures } from "@/app/_components/pass-strip/strip-of-pass";
import type { ClosureBody } from "@/lib/contracts/passes";

const at = (second: number): string => new Date(Date.UTC(2031, 3, 6, 3, 0, second)).toISOString();

function closure(rule: string, from: number, to: number): ClosureBody {
  const words = { cause: "", input: "", liftedBy: "", overridable: false };
  return { rule, verdict: "closed", label: rule, from: at(from), to: at(to), ...words };
}

const ruleOf = (pass: { closures: ClosureBody[]; setAt: string }): string[] =>
  stripClosures(pass).map((c) => c.label);

describe("the closures that a strip draws", () => {
  it("come in time order, whatever the rules' order", () => {
    const closures = [closure("airspace", 40, 50), closure("visibility", 0, 5)];
    expect(ruleOf({ closures, setAt: at(60) })).toEqual(["visibility", "airspace"]);
  });

  it("leave time itself out once the pass is over, and show it while it is under way", () => {
    const crossing = closure("protected objects", 20, 25);
    expect(ruleOf({ closures: [closure("time passed", 0, 60), crossing], setAt: at(60) })).toEqual([
      "protected objects",
    ]);
    expect(ruleOf({ closures: [closure("time passed", 0, 30), crossing], setAt: at(60) })).toEqual([
      "time passed",
      "protected objects",
    ]);
  });
});
