import type { Decision } from "@/lib/engagement/decide";
import { type Reason, Refusal, refused } from "@/lib/engagement/refusal";
import type { EngagementState } from "@/lib/engagement/states";

/**
 * The state a decision leads to. Otherwise throws: 403 when the caller may not,
 * else 422 with every reason, the decision's and the service's own.
 */
export function permit(decision: Decision, what: string, more: readonly Reason[] = []): EngagementState {
  if (decision.ok && more.length === 0) return decision.next;
  const refusals = decision.ok ? [] : decision.refusals;
  const right = refusals.find((refusal) => refusal.kind === "right");
  if (right !== undefined) throw new Refusal(403, "forbidden", right.message);
  const reasons = [...refusals.map(({ path, message }) => ({ path, message })), ...more];
  throw refused(`${what} is refused: ${reasons.map(({ message }) => message).join(" ")}`, reasons);
}

/** 403 as early as possible, before anything is read. */
export function forbid(message: string): Refusal {
  return new Refusal(403, "forbidden", message);
}
