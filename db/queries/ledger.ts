import { and, desc, eq, gte, ilike, lt, or, type SQL } from "drizzle-orm";
import type { Queryable, Transaction } from "../client";
import { ledger } from "../schema/ledger";

export type LedgerRow = typeof ledger.$inferSelect;
export type NewLedgerRow = typeof ledger.$inferInsert;

/** Appends one row; the application role can do no more than this and read. */
export async function appendLedger(tx: Transaction, row: NewLedgerRow): Promise<void> {
  await tx.insert(ledger).values(row);
}

/** What a reader may ask of the ledger; everything is optional but the limit. */
export interface LedgerFilter {
  readonly subjectKind?: string | undefined;
  readonly subjectId?: string | undefined;
  readonly actor?: string | undefined;
  readonly text?: string | undefined;
  readonly fromMs?: number | undefined;
  readonly toMs?: number | undefined;
  /** Only rows older than this one: for reading on. */
  readonly beforeId?: number | undefined;
  readonly limit: number;
}

/** Rows that match, newest first. */
export async function findLedger(q: Queryable, filter: LedgerFilter): Promise<LedgerRow[]> {
  const conditions: (SQL | undefined)[] = [
    filter.subjectKind === undefined ? undefined : eq(ledger.subjectKind, filter.subjectKind),
    filter.subjectId === undefined ? undefined : eq(ledger.subjectId, filter.subjectId),
    filter.actor === undefined ? undefined : ilike(ledger.actorName, holding(filter.actor)),
    filter.text === undefined ? undefined : anyText(holding(filter.text)),
    filter.fromMs === undefined ? undefined : gte(ledger.at, new Date(filter.fromMs)),
    filter.toMs === undefined ? undefined : lt(ledger.at, new Date(filter.toMs)),
    filter.beforeId === undefined ? undefined : lt(ledger.id, filter.beforeId),
  ];
  return q
    .select()
    .from(ledger)
    .where(and(...conditions))
    .orderBy(desc(ledger.id))
    .limit(filter.limit);
}

/** A LIKE pattern for "contains", with the reader's own % and _ taken literally. */
function holding(words: string): string {
  return `%${words.replace(/[\\%_]/g, "\\$&")}%`;
}

function anyText(pattern: string): SQL | undefined {
  return or(
    ilike(ledger.action, pattern),
    ilike(ledger.subjectLabel, pattern),
    ilike(ledger.reason, pattern),
    ilike(ledger.actorName, pattern),
  );
}
