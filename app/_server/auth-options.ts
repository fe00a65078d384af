import type { AuthOptions } from "next-auth";
import Credentials from "next-auth/providers/credentials";
import { secret } from "@/lib/config";
import { authorize, type SignedIn } from "./authorize";
import { overHttps, SESSION_S, sessionCookieName } from "./session";

/**
 * Credentials with a signed and encrypted session cookie. The cookie holds the
 * person's identifier and the session version, nothing that decides a right:
 * role and version are read from the database on every request.
 */
export function authOptions(): AuthOptions {
  return {
    secret: secret("NEXTAUTH_SECRET"),
    session: { strategy: "jwt", maxAge: SESSION_S },
    pages: { signIn: "/sign-in", signOut: "/sign-in", error: "/sign-in" },
    cookies: { sessionToken: { name: sessionCookieName(), options: cookieOptions() } },
    providers: [
      Credentials({
        credentials: { email: { type: "email" }, password: { type: "password" } },
        authorize: (credentials, request) => authorize(credentials, request.headers),
      }),
    ],
    callbacks: {
      jwt({ token, user }) {
        // Only what names the session goes into the cookie: `user` is there at sign-in alone.
        const signedIn = user as SignedIn | undefined;
        if (signedIn) {
          return { sub: signedIn.id, sessionVersion: signedIn.sessionVersion, signedInAtMs: Date.now() };
        }
        return {
          sub: token.sub ?? "",
          sessionVersion: token.sessionVersion,
          signedInAtMs: token.signedInAtMs,
        };
      },
      session: ({ session }) => ({ expires: session.expires }),
    },
    logger: {
      // A refused sign-in is no fault of ours; everything else is.
      error: (code, metadata) => console.error(`[sign-in] ${code}`, metadata),
      warn: () => undefined,
      debug: () => undefined,
    },
  };
}

function cookieOptions() {
  return { httpOnly: true, sameSite: "lax", path: "/", secure: overHttps() } as const;
}
