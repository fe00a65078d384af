import type { Transaction } from "@/db/client";
import { insertElementSets, type NewElementSet, newestEpochs } from "@/db/queries/element-sets";
import type { ImportOptions } from "@/lib/contracts/element-sets";
import type { ParsedSet } from "@/lib/formats/element-sets";

/** A good set, the object it belongs to and the text it came in. */
export interface PlacedSet {
  readonly set: ParsedSet;
  readonly objectId: string;
  readonly importId: string;
  readonly source: string;
}

/** What became of the good sets. */
export interface StoredSets {
  readonly added: readonly PlacedSet[];
  readonly duplicates: readonly PlacedSet[];
  /** Added, but older than the newest set of their object; with that one's epoch, Unix ms. */
  readonly older: readonly { readonly placed: PlacedSet; readonly newestMs: number }[];
  /** Objects whose newest set is now another one. */
  readonly changedIds: readonly string[];
}

/** Stores the sets that are not there yet and tells duplicates and older ones apart. */
export async function storeSets(
  tx: Transaction,
  placed: readonly PlacedSet[],
  as: ImportOptions["as"],
): Promise<StoredSets> {
  const before = await newestEpochs(tx, as, [...new Set(placed.map((one) => one.objectId))]);
  const rows = await insertElementSets(
    tx,
    placed.map((one) => rowOf(one, as)),
  );
  const fresh = new Set(rows.map((row) => keyOf(row.fragmentId ?? row.protectedObjectId ?? "", row)));
  const added: PlacedSet[] = [];
  const duplicates: PlacedSet[] = [];
  for (const one of placed) {
    // The first of equal sets in the same text is the one that was stored.
    if (fresh.delete(keyOf(one.objectId, one.set.elements))) added.push(one);
    else duplicates.push(one);
  }
  const newest = new Map(before);
  for (const { objectId, set } of added) {
    newest.set(objectId, Math.max(newest.get(objectId) ?? Number.NEGATIVE_INFINITY, set.elements.epochMs));
  }
  const older = added.flatMap((one) => {
    const newestMs = newest.get(one.objectId) ?? one.set.elements.epochMs;
    return one.set.elements.epochMs < newestMs ? [{ placed: one, newestMs }] : [];
  });
  const changed = added.filter(({ objectId, set }) => {
    return set.elements.epochMs >= (before.get(objectId) ?? Number.NEGATIVE_INFINITY);
  });
  return { added, duplicates, older, changedIds: [...new Set(changed.map((one) => one.objectId))] };
}

/** What makes two sets of an object the same: the columns of the unique index. */
function keyOf(
  objectId: string,
  set: { epochMs: number; meanMotionRevPerDay: number; meanAnomalyDeg: number },
): string {
  return `${objectId}|${set.epochMs}|${set.meanMotionRevPerDay}|${set.meanAnomalyDeg}`;
}

function rowOf({ set, objectId, importId, source }: PlacedSet, as: ImportOptions["as"]): NewElementSet {
  return {
    ...set.elements,
    fragmentId: as === "fragments" ? objectId : null,
    protectedObjectId: as === "protected" ? objectId : null,
    importId,
    epochAt: new Date(set.elements.epochMs),
    format: set.format,
    raw: set.raw,
    source,
  };
}
