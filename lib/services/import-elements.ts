import type { Transaction } from "@/db/client";
import { insertImport, lockImports, updateImportCounts } from "@/db/queries/element-sets";
import { inTransaction } from "@/db/transaction";
import { type ImportOptions, type ImportReportBody, importOptions } from "@/lib/contracts/element-sets";
import { notAllowed } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { type ImportObjects, resolveObjects } from "./import-objects";
import { type ImportedText, type ImportResult, importReport } from "./import-report";
import { type PlacedSet, type StoredSets, storeSets } from "./import-sets";
import { writeLedger } from "./ledger";
import { type ImportText, type ReadText, readTexts } from "./read-texts";
import { startSweep } from "./start-sweep";

/** Thrown to roll a preview back, or an import that has nothing to keep; the report stays. */
class NothingKept extends Error {
  readonly report: ImportReportBody;
  constructor(report: ImportReportBody) {
    super("the import keeps nothing");
    this.report = report;
  }
}

/** Imports one text; see {@link importTexts}. */
export function importElements(
  actor: Actor,
  input: ImportText & { as?: ImportOptions["as"]; class?: ImportOptions["class"]; preview?: boolean },
  nowMs: number,
): Promise<ImportReportBody> {
  const { text, source, ...options } = input;
  return importTexts(actor, async () => [{ text, source }], options, nowMs);
}

/**
 * Reads element sets from texts and stores the good ones in one transaction, with the ledger's row and
 * the sweep that follows; nothing else is stored, and of a preview nothing at all. Objects that the book
 * doesn't know are created. The report names what was refused, what was there already and what is older
 * than the newest set of its object. The input is read only for those who may import.
 */
export async function importTexts(
  actor: Actor,
  readInput: () => Promise<readonly ImportText[]>,
  options: unknown,
  nowMs: number,
): Promise<ImportReportBody> {
  if (!may(actor, "import elements")) throw notAllowed("import element sets");
  const wanted = importOptions.parse(options);
  const texts = await readInput();
  const read = await readTexts(texts);
  try {
    return await inTransaction(async (tx) => {
      await lockImports(tx);
      const result = await storeTexts(tx, read, wanted, actor);
      const report = importReport(result, wanted.preview);
      if (wanted.preview || isNothingGood(report)) throw new NothingKept({ ...report, importId: null });
      const sweepId = await sweepAfter(tx, result, wanted, actor, nowMs);
      await writeImportLedger(tx, actor, report, texts);
      return { ...report, sweepId };
    });
  } catch (error) {
    if (error instanceof NothingKept) return error.report;
    throw error;
  }
}

/** True for the report of texts without a single good set: neither stored now nor before. */
export function isNothingGood(report: ImportReportBody): boolean {
  return report.accepted + report.duplicates.length === 0;
}

async function storeTexts(
  tx: Transaction,
  read: readonly ReadText[],
  options: ImportOptions,
  actor: Actor,
): Promise<ImportResult> {
  const objects = await resolveObjects(
    tx,
    read.flatMap((text) => text.accepted),
    options,
  );
  const placed: PlacedSet[] = [];
  const texts: ImportedText[] = [];
  for (const text of read) {
    const { source } = text;
    const rejected = [...text.rejected, ...refusedObjects(text, objects)].sort((a, b) => a.line - b.line);
    const importId = await insertImport(tx, { source, importedBy: actor.id, rejected });
    texts.push({ source, importId, rejected });
    for (const set of text.accepted) {
      const object = objects.byNumber.get(set.elements.catalogNumber);
      if (object) placed.push({ set, objectId: object.id, importId, source });
    }
  }
  const stored = await storeSets(tx, placed, options.as);
  for (const { importId } of texts) await updateImportCounts(tx, importId, countsOf(stored, importId));
  return { texts, objects, stored };
}

/** Sets of objects that stand on the other list, as refusals by their line. */
function refusedObjects(text: ReadText, objects: ImportObjects): ImportReportBody["rejected"] {
  return text.accepted.flatMap(({ line, elements }) => {
    const message = objects.refused.get(elements.catalogNumber);
    return message === undefined ? [] : [{ line, column: 1, message }];
  });
}

function countsOf(stored: StoredSets, importId: string) {
  const ofThis = (one: PlacedSet) => one.importId === importId;
  return {
    acceptedCount: stored.added.filter(ofThis).length,
    duplicateCount: stored.duplicates.filter(ofThis).length,
    olderCount: stored.older.filter(({ placed }) => ofThis(placed)).length,
  };
}

/** Fragments with a new newest set are swept; new places of protected objects concern every pass. */
async function sweepAfter(
  tx: Transaction,
  { stored }: ImportResult,
  options: ImportOptions,
  actor: Actor,
  nowMs: number,
): Promise<string | null> {
  if (stored.changedIds.length === 0) return null;
  const sweep = { requestedBy: actor.id, nowMs };
  const { sweepId } =
    options.as === "fragments"
      ? await startSweep(tx, { ...sweep, fragmentIds: [...stored.changedIds], reason: "new element sets" })
      : await startSweep(tx, {
          ...sweep,
          fragmentIds: "all",
          reason: "new element sets of protected objects: every pass is screened again",
        });
  return sweepId;
}

async function writeImportLedger(
  tx: Transaction,
  actor: Actor,
  report: ImportReportBody,
  texts: readonly ImportText[],
): Promise<void> {
  await writeLedger(tx, actor, {
    action: "imported element sets",
    subjectKind: "element import",
    subjectId: report.importId,
    subjectLabel: texts
      .map((text) => text.source)
      .join(", ")
      .slice(0, 300),
    newValues: {
      accepted: report.accepted,
      rejected: report.rejected.length,
      duplicates: report.duplicates.length,
      older: report.older.length,
      created: report.created.length,
    },
  });
}
