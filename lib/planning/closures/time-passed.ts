import { timeWords } from "../words";
import type { Rule } from "./rule";

/** Seconds that are over. */
export const timePassed: Rule = (pass, facts) => {
  const fromMs = Math.min(pass.riseMs, facts.dwell?.fromMs ?? pass.riseMs);
  if (facts.nowMs <= fromMs) return [];
  return [
    {
      fromMs,
      toMs: facts.nowMs,
      rule: "time passed",
      verdict: "closed",
      cause: `It is ${timeWords(facts.nowMs)}; what lies before is over.`,
      label: "over",
      input: "the clock",
      liftedBy: "nothing",
      overridable: false,
    },
  ];
};
