import { notAllowed, unknownCaller } from "@/lib/engagement/refusal";
import { actorFromSession, actorFromToken, type PersonActor } from "@/lib/services/authenticate";
import { errorResponse, withApiHeaders } from "./respond";
import { mayWriteWithCookie } from "./same-origin";
import { cookieOf, readSession, sessionCookieName } from "./session";

export { readBytes, readJson, readText } from "./read-body";

export interface PublicContext {
  readonly request: Request;
  /** Segments of the route; one that the route doesn't have reads as undefined. */
  readonly params: Readonly<Record<string, string>>;
  readonly nowMs: number;
}

export interface HandlerContext extends PublicContext {
  readonly actor: PersonActor;
}

export type RouteHandler = (
  request: Request,
  context: { params: Promise<Record<string, string>> },
) => Promise<Response>;

/**
 * A route handler for people who signed in or sent `Authorization: Bearer`.
 * Finds the actor (else 401), refuses foreign pages that ride on a cookie
 * (403), runs `work`, and turns what it throws into the error body. A plain
 * object is sent as JSON with 200; a Response goes out as it is, with our
 * headers added.
 */
export function handle(work: (context: HandlerContext) => Promise<Response | object>): RouteHandler {
  return handlePublic(async (context) => work({ ...context, actor: await callerOf(context) }));
}

/** The same without a sign-in: answer links, health, the API's description. */
export function handlePublic(work: (context: PublicContext) => Promise<Response | object>): RouteHandler {
  return async (request, { params }) => {
    try {
      const result = await work({ request, params: await params, nowMs: Date.now() });
      return withApiHeaders(result instanceof Response ? result : Response.json(result));
    } catch (error) {
      return withApiHeaders(errorResponse(error));
    }
  };
}

/** Who calls; a token, where one is sent, decides alone. */
async function callerOf({ request, nowMs }: PublicContext): Promise<PersonActor> {
  const authorization = request.headers.get("authorization");
  if (authorization !== null) {
    const token = /^Bearer +(\S+)$/i.exec(authorization)?.[1];
    const actor = token ? await actorFromToken(token, nowMs) : null;
    if (!actor) throw unknownCaller();
    return actor;
  }
  const claims = await readSession(cookieOf(request.headers.get("cookie"), sessionCookieName()), nowMs);
  const actor = claims ? await actorFromSession(claims) : null;
  if (!actor) throw unknownCaller();
  if (!mayWriteWithCookie(request)) throw notAllowed("a change that another site asked for");
  return actor;
}
