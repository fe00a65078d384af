import { database } from "@/db/client";
import { findLedger, type LedgerRow } from "@/db/queries/ledger";
import { type LedgerBody, ledgerQuery } from "@/lib/contracts/engagements";
import { notAllowed } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { readQuery } from "./read-input";

/** The ledger, newest first. `nextBefore` is what to send as `before` to read on; null at the end. */
export async function listLedger(
  actor: Actor,
  query: unknown,
): Promise<{ entries: LedgerBody[]; nextBefore: number | null }> {
  if (!may(actor, "read ledger")) throw notAllowed("read the ledger");
  const { from, to, before, limit, ...words } = readQuery(ledgerQuery, query);
  const rows = await findLedger(database(), {
    ...words,
    fromMs: from === undefined ? undefined : Date.parse(from),
    toMs: to === undefined ? undefined : Date.parse(to),
    beforeId: before,
    limit: limit + 1,
  });
  const shown = rows.slice(0, limit);
  return {
    entries: shown.map(ledgerBody),
    nextBefore: rows.length > limit ? (shown.at(-1)?.id ?? null) : null,
  };
}

/** A row of the ledger as it goes over the wire. */
export function ledgerBody(row: LedgerRow): LedgerBody {
  return {
    id: row.id,
    at: row.at.toISOString(),
    actor: row.actorName,
    via: row.via,
    action: row.action,
    subjectKind: row.subjectKind,
    subjectId: row.subjectId,
    subjectLabel: row.subjectLabel,
    reason: row.reason,
    oldValues: row.oldValues,
    newValues: row.newValues,
  };
}
