import { setImmediate as nextTurn } from "node:timers/promises";
import type { Queryable } from "@/db/client";
import type { PassRow } from "@/db/queries/passes";
import type { StoredPlan } from "@/lib/planning/stored-plan";
import type { FactBook } from "./fact-book";
import { sceneOf } from "./pass-facts";
import { measureRow, orbitOrNull, planRow, storedGeometryOf, unmeasured } from "./pass-work";
import { knownOffer, type Offer, type PassReading, planOffer, readPass } from "./read-pass";
import { elementsByRow } from "./replan-passes";

/** So many passes are read before other requests get their turn: some 20 ms. */
const READ_AT_ONCE = 500;

/** A pass with what it offers, and the plan behind it where it was made just now. */
export interface OfferedPass {
  readonly reading: PassReading;
  readonly offer: Offer;
  readonly plan: StoredPlan | null;
}

/**
 * Reads passes and works out what each offers. Most rest on their stored plans; those that no longer fit
 * are planned on the spot for at most `budgetMs`, one at a time between other requests. What the budget
 * doesn't reach offers nothing and says so: nothing is ever offered unchecked.
 */
export async function planOffers(
  q: Queryable,
  book: FactBook,
  rows: readonly PassRow[],
  options: { readonly nowMs: number; readonly budgetMs: number },
): Promise<OfferedPass[]> {
  const read: { reading: PassReading; offer: Offer | null }[] = [];
  for (const [i, row] of rows.entries()) {
    if (i % READ_AT_ONCE === READ_AT_ONCE - 1) await nextTurn();
    const geometry = storedGeometryOf(row, sceneOf(book, row));
    const reading = readPass(book, row, geometry ?? unmeasured(row), options.nowMs);
    read.push({ reading, offer: geometry ? knownOffer(reading) : null });
  }
  const open = read.filter(({ offer }) => offer === null).map(({ reading }) => reading.row);
  const elements = await elementsByRow(q, open);
  const deadline = performance.now() + options.budgetMs;
  const offered: OfferedPass[] = [];
  for (const { reading, offer } of read) {
    if (offer) {
      offered.push({ reading, offer, plan: reading.row.plan });
    } else if (performance.now() < deadline) {
      await nextTurn();
      offered.push(planNow(book, reading, elements.get(reading.row.elementSetId), options.nowMs));
    } else {
      offered.push({ reading, offer: LATER, plan: reading.row.plan });
    }
  }
  return offered;
}

const LATER: Offer = {
  dwell: null,
  reason: "What this pass offers is being worked out anew; open the pass to have it at once.",
};

/** Measures and plans one pass under today's closures. */
function planNow(
  book: FactBook,
  before: PassReading,
  elements: Parameters<typeof orbitOrNull>[0],
  nowMs: number,
): OfferedPass {
  const { row, scene } = before;
  const orbit = orbitOrNull(elements);
  const geometry = storedGeometryOf(row, scene) ?? measureRow(row, scene, orbit);
  const reading = readPass(book, row, geometry, nowMs);
  const known = knownOffer(reading);
  if (known) return { reading, offer: known, plan: row.plan };
  if (!orbit || !reading.figured.ok) {
    const reason = reading.figured.ok ? "The element set gives no orbit." : reading.figured.reason;
    return { reading, offer: { dwell: null, reason }, plan: row.plan };
  }
  const closures = reading.offerClosures;
  const plan = planRow({ scene, figures: reading.figured.figures, orbit, geometry, closures });
  const offer = planOffer(reading, plan) ?? LATER;
  return { reading, offer, plan };
}
