import { type Reason, refused } from "@/lib/engagement/refusal";
import type { Interval } from "@/lib/planning/interval";

/** The times of a dwell as asked for; throws 422 when they are in the wrong order or not whole seconds. */
export function dwellOf(input: { readonly from: string; readonly to: string }): Interval {
  const fromMs = Date.parse(input.from);
  const toMs = Date.parse(input.to);
  const reasons: Reason[] = [];
  if (fromMs % 1000 !== 0) reasons.push({ path: "from", message: "A dwell begins on a whole second." });
  if (toMs % 1000 !== 0) reasons.push({ path: "to", message: "A dwell ends on a whole second." });
  if (fromMs >= toMs) reasons.push({ path: "to", message: "A dwell ends after it begins." });
  if (reasons.length > 0) throw refused("These are no times of a dwell.", reasons);
  return { fromMs, toMs };
}
