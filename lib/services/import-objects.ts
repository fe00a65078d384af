import type { Transaction } from "@/db/client";
import {
  fragmentsNumbered,
  insertFragments,
  insertProtected,
  type KnownObject,
  type NewFragment,
  protectedNumbered,
} from "@/db/queries/element-sets";
import type { ImportOptions } from "@/lib/contracts/element-sets";
import type { ParsedSet } from "@/lib/formats/element-sets";

/** What is taken for a fragment that nobody described yet. Mass per area near 10 kg/m², usual for small pieces. */
const ASSUMED_BODY = {
  massKg: 0.5,
  areaM2: 0.05,
  material: "unknown",
  shape: "tumbling-plate",
  bodySource:
    "assumed at import: 0.5 kg, 0.05 m² a face, tumbling plate of an unknown solid (our setting); enter better figures when there are any",
} satisfies Partial<NewFragment>;

/** The objects of an import by catalogue number, which of them are new, and which numbers are taken otherwise. */
export interface ImportObjects {
  readonly byNumber: ReadonlyMap<number, KnownObject>;
  readonly created: readonly KnownObject[];
  /** Numbers that stand on the other list, with the sentence that refuses them. */
  readonly refused: ReadonlyMap<number, string>;
}

/**
 * Finds the objects of the sets, and creates those that the book doesn't know. A number that stands on
 * the other list is refused: a protected object must not become a target by an upload, and a fragment
 * made a protected object would close its own passes.
 */
export async function resolveObjects(
  tx: Transaction,
  sets: readonly ParsedSet[],
  options: ImportOptions,
): Promise<ImportObjects> {
  const firstSets = new Map<number, ParsedSet>();
  for (const set of sets) {
    const number = set.elements.catalogNumber;
    if (!firstSets.get(number)?.elements.objectName) firstSets.set(number, set);
  }
  const numbers = [...firstSets.keys()];
  if (numbers.length === 0) return { byNumber: new Map(), created: [], refused: new Map() };
  const fragments = await fragmentsNumbered(tx, numbers);
  const protectedOnes = await protectedNumbered(tx, numbers);
  const [known, others] =
    options.as === "fragments" ? [fragments, protectedOnes] : [protectedOnes, fragments];
  const refused = new Map(others.map((object) => [object.catalogNumber, otherListWords(object, options.as)]));
  const knownNumbers = new Set(known.map((object) => object.catalogNumber));
  const news = numbers
    .filter((number) => !knownNumbers.has(number) && !refused.has(number))
    .map((catalogNumber) => ({ catalogNumber, name: nameFor(firstSets.get(catalogNumber), catalogNumber) }));
  const created = await createObjects(tx, news, options);
  const byNumber = new Map([...known, ...created].map((object) => [object.catalogNumber, object]));
  return { byNumber, created, refused };
}

function createObjects(
  tx: Transaction,
  news: readonly { catalogNumber: number; name: string }[],
  options: ImportOptions,
): Promise<KnownObject[]> {
  const { class: protectedClass } = options;
  if (options.as === "fragments")
    return insertFragments(
      tx,
      news.map((one) => ({ ...ASSUMED_BODY, ...one })),
    );
  if (protectedClass === undefined) throw new Error("protected objects need their class");
  return insertProtected(
    tx,
    news.map((one) => ({ ...one, class: protectedClass })),
  );
}

function nameFor(set: ParsedSet | undefined, catalogNumber: number): string {
  return set?.elements.objectName ?? `Object ${catalogNumber}`;
}

function otherListWords(object: KnownObject, as: ImportOptions["as"]): string {
  const number = `Catalogue number ${object.catalogNumber} (${object.name})`;
  return as === "fragments"
    ? `${number} is a protected object; its element sets are imported as those of protected objects.`
    : `${number} is a fragment to be nudged; its element sets are imported as those of fragments.`;
}
