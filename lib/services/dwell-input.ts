import { refused } from "@/lib/engagement/refusal";
import type { Interval } from "@/lib/planning/interval";

/**
 * The times of a dwell as asked for; throws 422 when they are in the wrong order. Whole
 * seconds and all other limits are judged with the rules, after the station is known to be free.
 */
export function dwellOf(input: { readonly from: string; readonly to: string }): Interval {
  const fromMs = Date.parse(input.from);
  const toMs = Date.parse(input.to);
  if (fromMs < toMs) return { fromMs, toMs };
  const message = "A dwell ends after it begins.";
  throw refused(message, [{ path: "to", message }]);
}
