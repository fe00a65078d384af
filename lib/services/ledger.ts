import type { Transaction } from "@/db/client";
import { appendLedger } from "@/db/queries/ledger";
import type { Actor } from "@/lib/engagement/roles";

/** What happened, to what, and why; `action` is a verb in the past tense: "proposed engagement". */
export interface LedgerEntry {
  readonly action: string;
  readonly subjectKind: string;
  readonly subjectId: string | null;
  readonly subjectLabel: string;
  readonly reason?: string | null;
  readonly oldValues?: Record<string, unknown> | null;
  readonly newValues?: Record<string, unknown> | null;
}

/**
 * Writes who did what, in the transaction that does it: the row and the deed
 * stand or fall together. The time is the transaction's, by the database.
 */
export async function writeLedger(tx: Transaction, actor: Actor, entry: LedgerEntry): Promise<void> {
  await appendLedger(tx, {
    actorId: actor.id,
    actorName: actor.name,
    via: actor.via,
    action: entry.action,
    subjectKind: entry.subjectKind,
    subjectId: entry.subjectId,
    subjectLabel: entry.subjectLabel,
    reason: entry.reason ?? null,
    oldValues: entry.oldValues ?? null,
    newValues: entry.newValues ?? null,
  });
}

/** The actor of what the book does by itself: clearing, lapsing, re-screening. */
export const SYSTEM: Actor = {
  id: null,
  name: "the book",
  role: "system",
  authorityId: null,
  isSafetyOfficer: false,
  via: "system",
};
