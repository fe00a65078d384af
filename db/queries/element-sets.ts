import { and, desc, eq, inArray, sql } from "drizzle-orm";
import type { Queryable } from "../client";
import { elementImports, elementSets, fragments, protectedObjects } from "../schema/objects";

export type ElementSetRow = typeof elementSets.$inferSelect;
export type NewElementSet = typeof elementSets.$inferInsert;
export type NewFragment = typeof fragments.$inferInsert;
export type NewProtectedObject = typeof protectedObjects.$inferInsert;

/** An object of the book under its catalogue number. */
export interface KnownObject {
  readonly id: string;
  readonly catalogNumber: number;
  readonly name: string;
}

/** Rows in one INSERT: PostgreSQL takes 65,535 parameters, a set has 18. */
const ROWS_AT_ONCE = 2000;

/** One import at a time: two of the same objects would otherwise race to create them. */
export async function lockImports(q: Queryable): Promise<void> {
  await q.execute(sql`select pg_advisory_xact_lock(72830119)`);
}

/**
 * Waits for the import under way, lets none begin in this transaction, and gives the database's time: what
 * is read now is everything imported before that time, and what comes later carries a later one.
 */
export async function holdImports(q: Queryable): Promise<Date> {
  await q.execute(sql`select pg_advisory_xact_lock_shared(72830119)`);
  const { rows } = await q.execute<{ now_ms: number }>(
    sql`select floor(extract(epoch from clock_timestamp()) * 1000)::float8 as now_ms`,
  );
  return new Date(rows[0]?.now_ms ?? Number.NaN);
}

/** The time of this statement, not of the transaction's begin: see {@link holdImports}. */
const thisMoment = sql`clock_timestamp()`;

/** The fragments under these catalogue numbers. */
export async function fragmentsNumbered(q: Queryable, numbers: readonly number[]): Promise<KnownObject[]> {
  const rows = await q
    .select({ id: fragments.id, catalogNumber: fragments.catalogNumber, name: fragments.name })
    .from(fragments)
    .where(inArray(fragments.catalogNumber, [...numbers]));
  return rows.flatMap((row) =>
    row.catalogNumber === null ? [] : [{ ...row, catalogNumber: row.catalogNumber }],
  );
}

/** The protected objects under these catalogue numbers. */
export async function protectedNumbered(q: Queryable, numbers: readonly number[]): Promise<KnownObject[]> {
  return q
    .select({
      id: protectedObjects.id,
      catalogNumber: protectedObjects.catalogNumber,
      name: protectedObjects.name,
    })
    .from(protectedObjects)
    .where(inArray(protectedObjects.catalogNumber, [...numbers]));
}

/** Adds fragments; gives them with their new ids. */
export async function insertFragments(q: Queryable, rows: readonly NewFragment[]): Promise<KnownObject[]> {
  const added: KnownObject[] = [];
  for (const part of parts(rows)) {
    const back = await q.insert(fragments).values(part).returning();
    for (const { id, catalogNumber, name } of back) {
      if (catalogNumber !== null) added.push({ id, catalogNumber, name });
    }
  }
  return added;
}

/** Adds protected objects; gives them with their new ids. */
export async function insertProtected(
  q: Queryable,
  rows: readonly NewProtectedObject[],
): Promise<KnownObject[]> {
  const added: KnownObject[] = [];
  for (const part of parts(rows)) {
    const timed = part.map((row) => ({ ...row, createdAt: thisMoment }));
    const back = await q.insert(protectedObjects).values(timed).returning();
    added.push(...back.map(({ id, catalogNumber, name }) => ({ id, catalogNumber, name })));
  }
  return added;
}

/** Adds one row for an imported text, its counts still nil; gives its id. */
export async function insertImport(
  q: Queryable,
  row: Pick<typeof elementImports.$inferInsert, "source" | "importedBy" | "rejected">,
): Promise<string> {
  const [back] = await q
    .insert(elementImports)
    .values({ ...row, acceptedCount: 0, duplicateCount: 0, olderCount: 0 })
    .returning({ id: elementImports.id });
  if (!back) throw new Error("the import was not written");
  return back.id;
}

/** Writes the counts of an import once its sets are stored. */
export async function updateImportCounts(
  q: Queryable,
  importId: string,
  counts: Pick<typeof elementImports.$inferSelect, "acceptedCount" | "duplicateCount" | "olderCount">,
): Promise<void> {
  await q.update(elementImports).set(counts).where(eq(elementImports.id, importId));
}

/** Adds element sets; those that are stored already are left as they are and not given back. */
export async function insertElementSets(
  q: Queryable,
  rows: readonly NewElementSet[],
): Promise<ElementSetRow[]> {
  const added: ElementSetRow[] = [];
  for (const part of parts(rows)) {
    const timed = part.map((row) => ({ ...row, importedAt: thisMoment }));
    added.push(...(await q.insert(elementSets).values(timed).onConflictDoNothing().returning()));
  }
  return added;
}

/** The newest epoch of each object that has a set, by object id; Unix milliseconds. */
export async function newestEpochs(
  q: Queryable,
  kind: "fragments" | "protected",
  ids: readonly string[],
): Promise<Map<string, number>> {
  const column = kind === "fragments" ? elementSets.fragmentId : elementSets.protectedObjectId;
  const newest = new Map<string, number>();
  for (const part of parts(ids)) {
    const rows = await q
      .select({ id: column, epochMs: sql<number>`max(${elementSets.epochMs})` })
      .from(elementSets)
      .where(inArray(column, part))
      .groupBy(column);
    for (const { id, epochMs } of rows) if (id !== null) newest.set(id, epochMs);
  }
  return newest;
}

/** The newest set of each of these fragments; of two with the same epoch the one imported last. */
export async function newestSetsOfFragments(q: Queryable, ids: readonly string[]): Promise<ElementSetRow[]> {
  return q
    .selectDistinctOn([elementSets.fragmentId])
    .from(elementSets)
    .where(inArray(elementSets.fragmentId, [...ids]))
    .orderBy(elementSets.fragmentId, desc(elementSets.epochMs), desc(elementSets.importedAt), elementSets.id);
}

/** Every protected object with its newest set; null where it never had one. */
export async function protectedWithNewestSet(
  q: Queryable,
): Promise<{ object: typeof protectedObjects.$inferSelect; set: ElementSetRow | null }[]> {
  const newest = q
    .selectDistinctOn([elementSets.protectedObjectId])
    .from(elementSets)
    .where(sql`${elementSets.protectedObjectId} is not null`)
    .orderBy(
      elementSets.protectedObjectId,
      desc(elementSets.epochMs),
      desc(elementSets.importedAt),
      elementSets.id,
    )
    .as("newest");
  const objects = await q.select().from(protectedObjects).orderBy(protectedObjects.id);
  const sets = await q.select().from(newest);
  const byObject = new Map(sets.map((set) => [set.protectedObjectId, set]));
  return objects.map((object) => ({ object, set: byObject.get(object.id) ?? null }));
}

/** Every set of one object, newest epoch first; or of every object its newest one. */
export async function listSets(
  q: Queryable,
  filter: { fragmentId?: string; protectedObjectId?: string; catalogNumber?: number },
): Promise<ElementSetRow[]> {
  const wanted = and(
    filter.fragmentId ? eq(elementSets.fragmentId, filter.fragmentId) : undefined,
    filter.protectedObjectId ? eq(elementSets.protectedObjectId, filter.protectedObjectId) : undefined,
    filter.catalogNumber ? eq(elementSets.catalogNumber, filter.catalogNumber) : undefined,
  );
  if (wanted) {
    return q
      .select()
      .from(elementSets)
      .where(wanted)
      .orderBy(desc(elementSets.epochMs), desc(elementSets.importedAt), elementSets.id);
  }
  return q
    .selectDistinctOn([elementSets.catalogNumber])
    .from(elementSets)
    .orderBy(
      elementSets.catalogNumber,
      desc(elementSets.epochMs),
      desc(elementSets.importedAt),
      elementSets.id,
    );
}

function parts<T>(items: readonly T[]): T[][] {
  const all: T[][] = [];
  for (let i = 0; i < items.length; i += ROWS_AT_ONCE) all.push(items.slice(i, i + ROWS_AT_ONCE));
  return all;
}
