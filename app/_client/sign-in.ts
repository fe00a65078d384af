import { FetchError, fetchJson } from "./fetch-json";

/** What became of a sign-in: in, refused, or to be tried again later. */
export type SignInOutcome = { readonly ok: true } | { readonly ok: false; readonly error: string };

/** Signs in with the session handler; the server sets the cookie. */
export async function signIn(email: string, password: string): Promise<SignInOutcome> {
  const url = await post("/api/auth/callback/credentials", { email, password, callbackUrl: location.origin });
  const error = new URL(url, location.origin).searchParams.get("error");
  return error === null ? { ok: true } : { ok: false, error };
}

/** Ends the session in this browser. */
export async function signOut(): Promise<void> {
  await post("/api/auth/signout", { callbackUrl: location.origin });
}

/** The session handler answers a form with the address it would lead to. */
async function post(path: string, fields: Record<string, string>): Promise<string> {
  const { csrfToken } = await fetchJson<{ csrfToken: string }>("/api/auth/csrf");
  const response = await fetch(path, {
    method: "POST",
    body: new URLSearchParams({ ...fields, csrfToken, json: "true" }),
  });
  const body = (await response.json().catch(() => null)) as { url?: unknown } | null;
  if (typeof body?.url !== "string") {
    throw new FetchError(response.status, "unexpected", "The sign-in did not answer as expected. Try again.");
  }
  return body.url;
}
