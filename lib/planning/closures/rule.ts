import type { Closure } from "../closure";
import type { PassFacts } from "../pass-facts";
import type { PassGeometry } from "../pass-geometry";

/** One rule: every stretch of the pass that it does not leave open. Pure; the same shape for all. */
export type Rule = (pass: PassGeometry, facts: PassFacts) => Closure[];

/** The whole pass as a span. */
export function wholePass(pass: PassGeometry): { fromMs: number; toMs: number } {
  return { fromMs: pass.riseMs, toMs: pass.setMs };
}
