import NextAuth from "next-auth";
import { authOptions } from "@/app/_server/auth-options";
import { withApiHeaders } from "@/app/_server/respond";

type Context = { params: Promise<{ nextauth: string[] }> };

/** Sign-in, sign-out and their CSRF token. Options are made per request: secrets are read at run time. */
async function handler(request: Request, context: Context): Promise<Response> {
  const respond = NextAuth(authOptions()) as (request: Request, context: Context) => Promise<Response>;
  return withApiHeaders(await respond(request, context));
}

export { handler as GET, handler as POST };
