import type { Interval } from "./interval";

/** The rules that close time, in the order in which their closures are listed. */
export const RULE_NAMES = [
  "visibility",
  "station hours",
  "protected objects",
  "airspace",
  "element-set age",
  "other engagements",
  "authority answers",
  "fired upon",
  "time passed",
] as const;
export type RuleName = (typeof RULE_NAMES)[number];

/**
 * closed: no dwell there. pending: may be proposed, not cleared, while something can still come.
 * not checked: data are missing or stale; may be proposed, not confirmed until a person attests.
 */
export type Verdict = "closed" | "pending" | "not checked";

/** A half-open stretch of a pass that one rule does not leave open, with everything a person must know. */
export interface Closure extends Interval {
  readonly rule: RuleName;
  readonly verdict: Verdict;
  /** One plain sentence with numbers and units. */
  readonly cause: string;
  /** Two to four words for the strip. */
  readonly label: string;
  /** Which record, and which version of it, says so. */
  readonly input: string;
  /** What would lift it, in words. */
  readonly liftedBy: string;
  /**
   * For "not checked": a person's attested word may stand in for the missing data. For "closed" and
   * "pending" always false, and false wherever crewed spacecraft are concerned.
   */
  readonly overridable: boolean;
}

/** The two to four words under a closure's mark on the strip: "payload QS-88, 1.9°". */
export function closureLabel(closure: Closure): string {
  return closure.label;
}

/** The closures that touch the span, cut to it. */
export function cutClosures(closures: readonly Closure[], span: Interval): Closure[] {
  const cut: Closure[] = [];
  for (const closure of closures) {
    const fromMs = Math.max(closure.fromMs, span.fromMs);
    const toMs = Math.min(closure.toMs, span.toMs);
    if (fromMs < toMs) cut.push({ ...closure, fromMs, toMs });
  }
  return cut;
}

/** The closures of one verdict. */
export function withVerdict(closures: readonly Closure[], verdict: Verdict): Closure[] {
  return closures.filter((closure) => closure.verdict === verdict);
}
