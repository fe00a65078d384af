import { lockPerson, updatePerson } from "@/db/queries/people";
import { inTransaction } from "@/db/transaction";
import { unknownCaller } from "@/lib/engagement/refusal";
import type { PersonActor } from "./authenticate";
import { writeLedger } from "./ledger";

/** Ends all sessions of the actor, this one too: for a computer that was left signed in. Tokens stay. */
export async function endOwnSessions(actor: PersonActor): Promise<void> {
  await inTransaction(async (tx) => {
    if (!(await lockPerson(tx, actor.id))) throw unknownCaller();
    await updatePerson(tx, actor.id, {});
    await writeLedger(tx, actor, {
      action: "ended all sessions",
      subjectKind: "person",
      subjectId: actor.id,
      subjectLabel: actor.name,
    });
  });
}
