import type { Closure } from "./closure";
import { type Interval, overlaps, subtract } from "./interval";

/** A stretch without any closed second, with what is still awaited somewhere in it. */
export interface Opening extends Interval {
  /** Sentences of what is pending or not checked; a dwell may be proposed all the same. */
  readonly pending: readonly string[];
}

/**
 * What is left of a pass after everything closed. A stretch that is pending or not checked stays part of
 * its opening, since it may be proposed; it is not a border, so no guard time is kept there.
 */
export function openingsOf(
  pass: { readonly riseMs: number; readonly setMs: number },
  closures: readonly Closure[],
): Opening[] {
  const closed = closures.filter((closure) => closure.verdict === "closed");
  const waiting = closures.filter((closure) => closure.verdict !== "closed");
  return subtract({ fromMs: pass.riseMs, toMs: pass.setMs }, closed).map((stretch) => ({
    ...stretch,
    pending: pendingWords(waiting.filter((closure) => overlaps(closure, stretch))),
  }));
}

/** Each awaited thing once, in the order of the rules. */
function pendingWords(waiting: readonly Closure[]): string[] {
  const words = waiting.map((closure) =>
    closure.verdict === "not checked" ? `not checked: ${closure.cause}` : closure.cause,
  );
  return [...new Set(words)];
}
