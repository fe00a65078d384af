import { database } from "@/db/client";
import { lockPerson, personById, updatePerson } from "@/db/queries/people";
import { inTransaction } from "@/db/transaction";
import { passwordInput } from "@/lib/contracts/account";
import { notAllowed, Refusal, refused, unknownCaller } from "@/lib/engagement/refusal";
import type { PersonActor } from "./authenticate";
import { writeLedger } from "./ledger";
import { hashPassword, passwordFits, passwordProblem } from "./passwords";
import { readInput } from "./read-input";
import { countAttempt, forgiveAttempts } from "./sign-in-throttle";

/**
 * Changes the actor's own password after the present one, and ends all their
 * sessions. Only from a screen: a token must not take over its owner's account.
 * Wrong present passwords count as attempts on the account.
 */
export async function changePassword(actor: PersonActor, input: unknown, address: string): Promise<void> {
  if (actor.via !== "screen") throw notAllowed("changing a password with a token");
  const { current, next } = readInput(passwordInput, input);
  const waitS = await countAttempt(actor.email, address);
  if (waitS > 0)
    throw new Refusal(429, "throttled", `Too many attempts. Try again in ${Math.ceil(waitS / 60)} min.`);

  const person = await personById(database(), actor.id);
  if (!person || !(await passwordFits(current, person.passwordHash))) {
    throw refused("The password was not changed.", [
      { path: "current", message: "this is not your present password" },
    ]);
  }
  await forgiveAttempts(actor.email, address);
  const problem = current === next ? "the new password is the old one" : passwordProblem(next, person);
  if (problem) throw refused("The password was not changed.", [{ path: "next", message: problem }]);

  const passwordHash = await hashPassword(next);
  await inTransaction(async (tx) => {
    const now = await lockPerson(tx, actor.id);
    // Somebody else's change in between (a password, a role, an end) wins.
    if (!now?.active || now.sessionVersion !== person.sessionVersion) throw unknownCaller();
    await updatePerson(tx, actor.id, { passwordHash });
    await writeLedger(tx, actor, {
      action: "changed password",
      subjectKind: "person",
      subjectId: actor.id,
      subjectLabel: actor.name,
    });
  });
}
