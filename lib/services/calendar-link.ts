import { createHash, randomBytes } from "node:crypto";
import type { Transaction } from "@/db/client";
import { setCalendarSecret } from "@/db/queries/calendar";
import { inTransaction } from "@/db/transaction";
import { config } from "@/lib/config";
import { unknownCaller } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { writeLedger } from "./ledger";

/** What is stored of a calendar's secret; 32 random bytes need no slow hash. */
export function hashCalendarSecret(secret: string): string {
  return createHash("sha256").update("calendar\0").update(secret, "utf8").digest("hex");
}

/** Gives the actor a new secret calendar address, shown this once; a former one is dead at once. */
export async function renewCalendarLink(actor: Actor): Promise<{ url: string }> {
  const secret = randomBytes(32).toString("base64url");
  await inTransaction((tx) => setSecret(tx, actor, hashCalendarSecret(secret), "made calendar address"));
  return { url: new URL(`/api/calendar/${secret}.ics`, config().DWELLBOOK_BASE_URL).href };
}

/** Ends the actor's calendar address. */
export async function endCalendarLink(actor: Actor): Promise<void> {
  await inTransaction((tx) => setSecret(tx, actor, null, "ended calendar address"));
}

async function setSecret(tx: Transaction, actor: Actor, hash: string | null, action: string): Promise<void> {
  if (actor.id === null) throw unknownCaller();
  await setCalendarSecret(tx, actor.id, hash);
  await writeLedger(tx, actor, {
    action,
    subjectKind: "person",
    subjectId: actor.id,
    subjectLabel: actor.name,
  });
}
