import { decode } from "next-auth/jwt";
import { config, secret } from "@/lib/config";
import type { SessionClaims } from "@/lib/services/authenticate";

/** One shift and a little: then a person signs in again, however often the cookie was renewed. */
export const SESSION_S = 12 * 60 * 60;

/** True when people reach us by https: then the cookie is bound to the host and secure. */
export function overHttps(): boolean {
  return config().DWELLBOOK_BASE_URL.startsWith("https:");
}

/** Name of the session cookie; the __Host- prefix needs https. */
export function sessionCookieName(): string {
  return overHttps() ? "__Host-dwellbook.session" : "dwellbook.session";
}

/**
 * What the session cookie claims, or null when there is none, or it is not
 * ours, or the sign-in is too long ago at `nowMs`. The claims still have to be
 * held against the database: see actorFromSession.
 */
export async function readSession(
  cookieValue: string | undefined,
  nowMs: number,
): Promise<SessionClaims | null> {
  if (!cookieValue) return null;
  try {
    const token = await decode({ token: cookieValue, secret: secret("NEXTAUTH_SECRET") });
    const { sub, sessionVersion, signedInAtMs } = token ?? {};
    if (typeof sub !== "string" || typeof sessionVersion !== "number") return null;
    // Not "age > limit": a time that is no number must fail too.
    if (typeof signedInAtMs !== "number" || !(nowMs - signedInAtMs < SESSION_S * 1000)) return null;
    return { personId: sub, sessionVersion };
  } catch {
    return null; // forged, damaged or too old
  }
}

/** One cookie of a Cookie header, or undefined. */
export function cookieOf(header: string | null, name: string): string | undefined {
  for (const part of (header ?? "").split(";")) {
    const at = part.indexOf("=");
    if (at > 0 && part.slice(0, at).trim() === name) return part.slice(at + 1).trim();
  }
  return undefined;
}
