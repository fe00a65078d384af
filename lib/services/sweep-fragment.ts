import { setImmediate as nextTurn } from "node:timers/promises";
import { database } from "@/db/client";
import { newestSetsOfFragments } from "@/db/queries/element-sets";
import { inTransaction } from "@/db/transaction";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { elementsOf } from "./domain-rows";
import { screenPass } from "./screen-pass";
import { type FoundPass, findForSweep, type SweepSpan } from "./sweep-find";
import type { SweepGround } from "./sweep-ground";
import { type ScreenedPass, writeFragment } from "./sweep-write";

/** What the sweep of one fragment gave. */
export interface FragmentSweep {
  readonly passCount: number;
  readonly failures: readonly string[];
}

/** A newer element set may arrive while one is worked out; it is then worked out again, so often at most. */
const MOST_TRIES = 3;

/**
 * Works out the passes of one fragment over all stations, screens them, and writes them with their plans
 * in one transaction. Doing it twice gives the same rows: a pass keeps its identity. What can't be done is
 * a sentence; a fault of the database is thrown.
 */
export async function sweepFragment(
  fragmentId: string,
  span: SweepSpan,
  ground: SweepGround,
): Promise<FragmentSweep> {
  for (let attempt = 1; attempt <= MOST_TRIES; attempt++) {
    const [set] = await newestSetsOfFragments(database(), [fragmentId]);
    if (!set) return { passCount: 0, failures: ["The fragment has no element set."] };
    const made = makeOrbit(elementsOf(set));
    if (!made.ok) return { passCount: 0, failures: [made.reason] };
    const { passes, failures } = findForSweep(made.orbit, ground.stations, span);
    const screened = await screenAll(passes, made.orbit, ground);
    const worked = { fragmentId, elementSetId: set.id, orbit: made.orbit, screened };
    const passCount = await inTransaction((tx) => writeFragment(tx, worked, span, ground));
    if (passCount !== null) return { passCount, failures: [...failures, ...ground.idle] };
  }
  throw new Error("new element sets kept arriving while the passes were worked out");
}

/** Screens pass after pass, letting heartbeat and mail have their turn in between. */
async function screenAll(
  passes: readonly FoundPass[],
  orbit: Orbit,
  ground: SweepGround,
): Promise<ScreenedPass[]> {
  const screened: ScreenedPass[] = [];
  for (const pass of passes) {
    screened.push({ ...pass, screening: screenPass(pass, orbit, ground) });
    await nextTurn();
  }
  return screened;
}
