import { randomUUID } from "node:crypto";
import type { RouteHandler } from "@/app/_server/handle";
import { database } from "@/db/client";
import { accessTokens } from "@/db/schema/people";
import { hashToken } from "@/lib/services/authenticate";
import { addAuthority, addPerson } from "../../database/world";

/** An access token of a new person of that role. */
export async function tokenOf(
  role: "planner" | "operator" | "coordinator" | "administrator",
): Promise<string> {
  const name = `${role} ${randomUUID().slice(0, 8)}`;
  const authorityId =
    role === "coordinator" ? (await addAuthority(database(), `Office of ${name}`, null)).id : undefined;
  const person = await addPerson(database(), name, role, authorityId === undefined ? {} : { authorityId });
  if (person.id === null) throw new Error("a person has an identifier");
  const token = randomUUID();
  await database()
    .insert(accessTokens)
    .values({ personId: person.id, label: "test", tokenHash: hashToken(token) });
  return token;
}

/** What a handler answered, with its JSON. */
export interface Answer<T = unknown> {
  readonly status: number;
  readonly body: T;
}

/** Calls a route handler as a script would. */
export async function call<T = unknown>(
  handler: RouteHandler,
  request: {
    readonly method?: "GET" | "POST";
    readonly path?: string;
    readonly token?: string | null;
    readonly body?: BodyInit | object;
    readonly params?: Record<string, string>;
  },
): Promise<Answer<T>> {
  const { method = "POST", path = "/api", token = null, body, params = {} } = request;
  const isJson = body !== undefined && Object.getPrototypeOf(body) === Object.prototype;
  const init: RequestInit = { method };
  if (body !== undefined) init.body = isJson ? JSON.stringify(body) : (body as BodyInit);
  init.headers = token === null ? {} : { authorization: `Bearer ${token}` };
  const response = await handler(new Request(`http://127.0.0.1${path}`, init), {
    params: Promise.resolve(params),
  });
  return { status: response.status, body: (await response.json()) as T };
}
