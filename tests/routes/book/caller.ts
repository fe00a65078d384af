import type { RouteHandler } from "@/app/_server/handle";
import { database } from "@/db/client";
import { insertToken } from "@/db/queries/people";
import { makeToken } from "@/lib/services/tokens";

/** A personal access token of somebody. */
export async function tokenFor(personId: string): Promise<string> {
  const { token, tokenHash } = makeToken();
  await insertToken(database(), { personId, label: "test", tokenHash });
  return token;
}

/** What a handler answered. */
export interface Answer {
  readonly status: number;
  readonly headers: Headers;
  readonly text: string;
  /** The body as JSON; reading it throws when it is none. */
  readonly json: () => Record<string, unknown>;
}

/** Calls a route handler as Next would. A string body goes as it is, an object as JSON. */
export async function call(
  handler: RouteHandler,
  ask: {
    method?: string;
    token?: string | null;
    params?: Record<string, string>;
    query?: string;
    body?: unknown;
  },
): Promise<Answer> {
  const headers = new Headers();
  if (ask.token) headers.set("authorization", `Bearer ${ask.token}`);
  const body = typeof ask.body === "string" || ask.body === undefined ? ask.body : JSON.stringify(ask.body);
  const request = new Request(`http://book.example.invalid/api/x${ask.query ?? ""}`, {
    method: ask.method ?? (body === undefined ? "GET" : "POST"),
    headers,
    ...(body === undefined ? {} : { body }),
  });
  const response = await handler(request, { params: Promise.resolve(ask.params ?? {}) });
  const text = await response.text();
  return { status: response.status, headers: response.headers, text, json: () => JSON.parse(text) };
}
