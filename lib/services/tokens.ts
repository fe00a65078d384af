import { randomBytes } from "node:crypto";
import { database } from "@/db/client";
import { insertToken, liveTokens, lockPerson, revokeTokenRow, type TokenRow } from "@/db/queries/people";
import { inTransaction } from "@/db/transaction";
import { type NewTokenBody, type TokenBody, tokenInput } from "@/lib/contracts/account";
import { notFound, refused, unknownCaller } from "@/lib/engagement/refusal";
import { hashToken, type PersonActor } from "./authenticate";
import { writeLedger } from "./ledger";
import { readInput } from "./read-input";

const MOST_TOKENS = 20;

/** A new token and its hash: 32 random bytes behind a prefix by which leaked ones are found. */
export function makeToken(): { token: string; tokenHash: string } {
  const token = `dwb_${randomBytes(32).toString("base64url")}`;
  return { token, tokenHash: hashToken(token) };
}

/** The actor's own live tokens, without the tokens themselves. */
export async function listTokens(actor: PersonActor): Promise<{ tokens: TokenBody[] }> {
  return { tokens: (await liveTokens(database(), actor.id)).map(toBody) };
}

/** Makes a token that can do what its owner can. The answer is the only place where it is ever shown. */
export async function createToken(actor: PersonActor, input: unknown): Promise<NewTokenBody> {
  const { label } = readInput(tokenInput, input);
  return inTransaction(async (tx) => {
    if (!(await lockPerson(tx, actor.id))?.active) throw unknownCaller();
    if ((await liveTokens(tx, actor.id)).length >= MOST_TOKENS) {
      const message = `You have ${MOST_TOKENS} tokens; revoke one first.`;
      throw refused(message, [{ path: "label", message }]);
    }
    const { token, tokenHash } = makeToken();
    const row = await insertToken(tx, { personId: actor.id, label, tokenHash });
    await writeLedger(tx, actor, entryOf("made access token", row));
    return { ...toBody(row), token };
  });
}

/** Revokes one of the actor's own tokens at once. */
export async function revokeToken(actor: PersonActor, id: string): Promise<void> {
  await inTransaction(async (tx) => {
    const row = await revokeTokenRow(tx, actor.id, id);
    if (!row) throw notFound("token");
    await writeLedger(tx, actor, entryOf("revoked access token", row));
  });
}

function entryOf(action: string, row: TokenRow) {
  return { action, subjectKind: "access token", subjectId: row.id, subjectLabel: row.label };
}

function toBody(row: TokenRow): TokenBody {
  return {
    id: row.id,
    label: row.label,
    createdAt: row.createdAt.toISOString(),
    lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
  };
}
