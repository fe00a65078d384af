import { ZodError } from "zod";
import type { ErrorBody } from "@/lib/contracts/common";
import { Refusal } from "@/lib/engagement/refusal";

/** Headers of every API answer; the page headers are set in proxy.ts. */
const API_HEADERS: Readonly<Record<string, string>> = {
  "cache-control": "no-store",
  "content-security-policy":
    "default-src 'none'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'",
  "x-content-type-options": "nosniff",
  "referrer-policy": "no-referrer",
  "x-frame-options": "DENY",
  "cross-origin-resource-policy": "same-origin",
};

/** The same answer with our headers; those that it already has stay. */
export function withApiHeaders(response: Response): Response {
  const headers = new Headers(response.headers);
  for (const [name, value] of Object.entries(API_HEADERS)) {
    if (!headers.has(name)) headers.set(name, value);
  }
  return new Response(response.body, { status: response.status, statusText: response.statusText, headers });
}

/** An error as an answer: a refusal with its reasons, anything else without its insides. */
export function errorResponse(error: unknown): Response {
  if (error instanceof Refusal) {
    const headers: HeadersInit = error.status === 401 ? { "www-authenticate": "Bearer" } : {};
    return Response.json(errorBody(error.code, error.message, error.reasons), {
      status: error.status,
      headers,
    });
  }
  if (error instanceof ZodError) {
    const details = error.issues.map((i) => ({ path: i.path.join("."), message: i.message }));
    return Response.json(errorBody("invalid", "The input does not have the expected form.", details), {
      status: 400,
    });
  }
  const reference = crypto.randomUUID().slice(0, 8);
  console.error(`[${reference}]`, error);
  return Response.json(errorBody("internal", `Something failed here. It is logged under ${reference}.`, []), {
    status: 500,
  });
}

function errorBody(code: string, message: string, details: ErrorBody["error"]["details"]): ErrorBody {
  return { error: { code, message, details } };
}
