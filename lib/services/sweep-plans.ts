import { setImmediate as nextTurn } from "node:timers/promises";
import type { Transaction } from "@/db/client";
import { passRowsById } from "@/db/queries/passes";
import { loadFactBook } from "./fact-book";
import { sceneOf } from "./pass-facts";
import { figuresOf, planIsCurrent, storedGeometryOf } from "./pass-work";
import { replanPasses } from "./replan-passes";

/** Passes planned between two turns of the event loop: some 15 ms each. */
const PLANNED_AT_ONCE = 4;

/**
 * Plans the passes that changed, and of the unchanged ones those whose plan no longer rests on today's
 * laser, fragment, station or airspace. Planning is most of a sweep's work: where only protected objects
 * moved, few passes need it.
 */
export async function planSwept(
  tx: Transaction,
  changedIds: readonly string[],
  unchangedIds: readonly string[],
  nowMs: number,
): Promise<void> {
  const ids = [...changedIds, ...(await outOfDate(tx, unchangedIds))];
  for (let i = 0; i < ids.length; i += PLANNED_AT_ONCE) {
    await replanPasses(tx, ids.slice(i, i + PLANNED_AT_ONCE), nowMs);
    await nextTurn();
  }
}

async function outOfDate(tx: Transaction, passIds: readonly string[]): Promise<string[]> {
  if (passIds.length === 0) return [];
  const rows = await passRowsById(tx, passIds);
  const book = await loadFactBook(tx, rows);
  const stale = rows.filter((row) => {
    const scene = sceneOf(book, row);
    const figured = figuresOf(row, scene);
    return !figured.ok || !planIsCurrent(row, figured.figures) || storedGeometryOf(row, scene) === null;
  });
  return stale.map((row) => row.id);
}
