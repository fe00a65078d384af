import type { Queryable } from "@/db/client";
import { elementSetsById } from "@/db/queries/facts";
import { type PassRow, type PlanUpdate, passRowsById, storePlans } from "@/db/queries/passes";
import type { Elements } from "@/lib/physics/orbit/elements";
import { closuresOf, STANDING_RULES } from "@/lib/planning/closures/list";
import type { StoredPlan } from "@/lib/planning/stored-plan";
import { elementsOf } from "./domain-rows";
import { type FactBook, loadFactBook } from "./fact-book";
import { factsOf, sceneOf } from "./pass-facts";
import { AIM, figuresOf, measureRow, orbitOrNull, planRow } from "./pass-work";

/**
 * Measures and plans passes under the rules that don't hang on the book or the clock, and stores the
 * plans. To be called after the passes and their crossings are stored, in the same transaction: a pass
 * costs some 10 to 20 ms. Passes that are gone are left out.
 */
export async function replanPasses(q: Queryable, passIds: readonly string[], nowMs: number): Promise<void> {
  if (passIds.length === 0) return;
  const rows = await passRowsById(q, passIds);
  const book = await loadFactBook(q, rows);
  const elements = await elementsByRow(q, rows);
  await storePlans(
    q,
    rows.map((row) => planUpdate(book, row, elements.get(row.elementSetId), nowMs)),
  );
}

/** The elements behind passes, by the identifier of their set. */
export async function elementsByRow(
  q: Queryable,
  rows: readonly PassRow[],
): Promise<ReadonlyMap<string, Elements>> {
  const sets = await elementSetsById(q, [...new Set(rows.map((row) => row.elementSetId))]);
  return new Map(sets.map((set) => [set.id, elementsOf(set)]));
}

function planUpdate(book: FactBook, row: PassRow, elements: Elements | undefined, nowMs: number): PlanUpdate {
  const scene = sceneOf(book, row);
  const orbit = orbitOrNull(elements);
  const geometry = measureRow(row, scene, orbit);
  const facts = factsOf(book, row, { nowMs, dwell: null, ownEngagementId: null });
  const figured = figuresOf(row, scene);
  if (!figured.ok || !orbit) {
    const reason = figured.ok ? "The element set gives no orbit." : figured.reason;
    return { passId: row.id, laserSettingId: row.laserSettingId, plan: refusedPlan(geometry, reason) };
  }
  const { figures } = figured;
  const closures = closuresOf(geometry, facts, STANDING_RULES);
  const plan = planRow({ scene, figures, orbit, geometry, closures });
  return { passId: row.id, laserSettingId: figures.laserSettingId, plan };
}

/** A plan that only says why there is none; it fits no figures, so it is made anew once there are some. */
function refusedPlan(geometry: ReturnType<typeof measureRow>, refusal: string): StoredPlan {
  const { elementSetId, stationVersion, belowFloor, aboveCeiling, belowMask = [], tooFast = [] } = geometry;
  const { airspaceKey, volumes } = geometry;
  return {
    elementSetId,
    laserSettingVersion: 0,
    inputs: "",
    geometry: { stationVersion, belowFloor, aboveCeiling, belowMask, tooFast, airspaceKey, volumes },
    aim: AIM,
    aimUnit: "",
    strip: { elevationDeg: [], worthPerS: [] },
    dwell: null,
    refusal,
  };
}
