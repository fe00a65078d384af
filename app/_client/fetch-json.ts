import type { ErrorBody } from "@/lib/contracts/common";

type Details = ErrorBody["error"]["details"];

/** An answer that is no success, with the API's code, message and every reason. Status 0: no answer came. */
export class FetchError extends Error {
  readonly status: number;
  readonly code: string;
  readonly details: Details;

  constructor(status: number, code: string, message: string, details: Details = []) {
    super(message);
    this.name = "FetchError";
    this.status = status;
    this.code = code;
    this.details = details;
  }
}

/**
 * Reads JSON from our API; the fetcher for swr: `useSWR<Body>("/api/…", fetchJson)`.
 * Throws a {@link FetchError} for every answer that is no success.
 */
export async function fetchJson<T>(path: string, init?: RequestInit): Promise<T> {
  let response: Response;
  try {
    response = await fetch(path, { credentials: "same-origin", ...init });
  } catch {
    throw new FetchError(
      0,
      "unreachable",
      "The server can't be reached. Nothing was changed that you don't see here.",
    );
  }
  const body: unknown = await response.json().catch(() => null);
  if (response.ok) return body as T;
  const error = isErrorBody(body) ? body.error : null;
  throw new FetchError(
    response.status,
    error?.code ?? "unexpected",
    error?.message ?? `The server answered with status ${response.status}.`,
    error?.details ?? [],
  );
}

/** Sends JSON: `sendJson<EngagementBody>("/api/engagements", "POST", { passId, from, to })`. */
export function sendJson<T>(
  path: string,
  method: "POST" | "PATCH" | "PUT" | "DELETE",
  body?: unknown,
): Promise<T> {
  if (body === undefined) return fetchJson<T>(path, { method });
  return fetchJson<T>(path, {
    method,
    headers: { "content-type": "application/json" },
    body: JSON.stringify(body),
  });
}

function isErrorBody(body: unknown): body is ErrorBody {
  const error = (body as { error?: { message?: unknown; details?: unknown } } | null)?.error;
  return typeof error?.message === "string" && Array.isArray(error.details);
}
