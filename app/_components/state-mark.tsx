import type { Verdict } from "@/lib/contracts/passes";
import type { EngagementState } from "@/lib/engagement/states";

/**
 * The state of an engagement, or the verdict of a rule: a word in an edge of
 * its own (dotted proposed, single cleared, double confirmed, filled fired,
 * struck through scrubbed, dashed lapsed), so that no colour is needed.
 */
export function StateMark({ state }: { readonly state: EngagementState | Verdict | "open" }) {
  return (
    <span className="mark" data-state={state}>
      {state}
    </span>
  );
}
