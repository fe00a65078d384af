import { signIn } from "@/lib/services/sign-in";
import { clientAddress } from "./client-address";

/** What the session cookie is made from. */
export interface SignedIn {
  readonly id: string;
  readonly sessionVersion: number;
}

/**
 * The check behind the sign-in form: null when it is refused. The session
 * handler puts the message of a thrown error into an address, so only two fixed
 * words are ever thrown: "throttled", and "unavailable" for any fault of ours,
 * which is logged.
 */
export async function authorize(
  credentials: unknown,
  headers: Readonly<Record<string, unknown>> | undefined,
): Promise<SignedIn | null> {
  const result = await signIn(credentials, clientAddress(headers)).catch((error: unknown) => {
    console.error("[sign-in]", error);
    throw new Error("unavailable");
  });
  if (result.outcome === "throttled") throw new Error("throttled");
  return result.outcome === "in" ? { id: result.personId, sessionVersion: result.sessionVersion } : null;
}
