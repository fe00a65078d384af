import { z } from "zod";
import { database } from "@/db/client";
import { personByEmail } from "@/db/queries/people";
import { inTransaction } from "@/db/transaction";
import type { Role } from "@/lib/contracts/common";
import { writeLedger } from "./ledger";
import { PASSWORD_MAX, passwordFits } from "./passwords";
import { countAttempt, forgiveAttempts } from "./sign-in-throttle";

const credentials = z.object({ email: z.email().max(254), password: z.string().min(1).max(PASSWORD_MAX) });

/** Every failure reads the same; only too many attempts are told apart, and that without looking at the account. */
export type SignInResult =
  | { readonly outcome: "in"; readonly personId: string; readonly sessionVersion: number }
  | { readonly outcome: "refused" }
  | { readonly outcome: "throttled"; readonly waitS: number };

/**
 * Checks e-mail address and password. Unknown, inactive and wrong all take the
 * same time and give the same answer. `address` is where the attempt comes from.
 */
export async function signIn(input: unknown, address: string): Promise<SignInResult> {
  const parsed = credentials.safeParse(input);
  if (!parsed.success) return { outcome: "refused" };
  const { email, password } = parsed.data;
  const waitS = await countAttempt(email, address);
  if (waitS > 0) return { outcome: "throttled", waitS };

  const person = await personByEmail(database(), email);
  const fits = await passwordFits(password, person?.active ? person.passwordHash : null);
  if (!person || !fits) return { outcome: "refused" };

  await forgiveAttempts(email, address);
  await inTransaction(async (tx) => {
    const actor = { ...person, role: person.role as Role, via: "screen" } as const;
    await writeLedger(tx, actor, {
      action: "signed in",
      subjectKind: "person",
      subjectId: person.id,
      subjectLabel: person.name,
    });
  });
  return { outcome: "in", personId: person.id, sessionVersion: person.sessionVersion };
}
