import type { ClosureBody, OpeningBody } from "@/lib/contracts/passes";
import { type Closure, closureLabel } from "@/lib/planning/closure";
import type { Opening } from "@/lib/planning/openings";

/** ISO 8601 with Z and milliseconds. */
export function isoOf(atMs: number): string {
  return new Date(atMs).toISOString();
}

/** A closure as it goes over the wire. */
export function closureBody(closure: Closure): ClosureBody {
  return {
    from: isoOf(closure.fromMs),
    to: isoOf(closure.toMs),
    rule: closure.rule,
    verdict: closure.verdict,
    cause: closure.cause,
    label: closureLabel(closure),
    input: closure.input,
    liftedBy: closure.liftedBy,
    overridable: closure.overridable,
  };
}

/** An opening as it goes over the wire. */
export function openingBody(opening: Opening): OpeningBody {
  return { from: isoOf(opening.fromMs), to: isoOf(opening.toMs), pending: opening.pending };
}
