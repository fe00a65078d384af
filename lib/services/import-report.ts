import type { ImportReportBody } from "@/lib/contracts/element-sets";
import { isoTime } from "@/lib/physics/time";
import type { ImportObjects } from "./import-objects";
import type { PlacedSet, StoredSets } from "./import-sets";

/** A text whose good sets were placed. */
export interface ImportedText {
  readonly source: string;
  readonly importId: string;
  readonly rejected: ImportReportBody["rejected"];
}

/** Everything an import did. */
export interface ImportResult {
  readonly texts: readonly ImportedText[];
  readonly objects: ImportObjects;
  readonly stored: StoredSets;
}

/** The report of an import, without its sweep. Of several files each line says which one it means. */
export function importReport(result: ImportResult, preview: boolean): ImportReportBody {
  const { texts, objects, stored } = result;
  const within = (source: string, message: string) => (texts.length > 1 ? `${source}: ${message}` : message);
  const named = (placed: PlacedSet, message: string) => ({
    line: placed.set.line,
    catalogNumber: placed.set.elements.catalogNumber,
    message: within(placed.source, message),
  });
  return {
    accepted: stored.added.length,
    rejected: texts.flatMap(({ source, rejected }) =>
      rejected.map((one) => ({ ...one, message: within(source, one.message) })),
    ),
    duplicates: stored.duplicates.map((placed) =>
      named(placed, `The set with epoch ${isoTime(placed.set.elements.epochMs)} is stored already.`),
    ),
    older: stored.older.map(({ placed, newestMs }) =>
      named(
        placed,
        `The epoch ${isoTime(placed.set.elements.epochMs)} is older than the newest one, ${isoTime(newestMs)}.`,
      ),
    ),
    created: objects.created.map(({ catalogNumber, name }) => ({ catalogNumber, name })),
    preview,
    importId: texts[0]?.importId ?? null,
    sweepId: null,
  };
}
