import type { z } from "zod";

/** One operation of the HTTP API. The table of all of them is in openapi-routes. */
export interface ApiRoute {
  readonly method: "get" | "post" | "patch" | "delete";
  /** With parameters in braces, as OpenAPI writes them. */
  readonly path: string;
  readonly tag:
    | "calculations"
    | "element sets"
    | "passes"
    | "book"
    | "notices"
    | "records"
    | "account"
    | "people"
    | "service";
  readonly summary: string;
  /** True where nobody needs to sign in. */
  readonly open?: boolean;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodType | { readonly mediaTypes: readonly string[]; readonly words: string };
  readonly gives: Gives;
  /** Statuses of refusal beside those that every route of its kind has. */
  readonly refusals?: readonly (404 | 409 | 413 | 422 | 429 | 503)[];
}

/** What a successful answer holds. */
export interface Gives {
  readonly status: 200 | 201 | 204;
  readonly words: string;
  /** The fields at the top of the JSON body; none for other kinds of body. */
  readonly fields?: readonly string[];
  readonly mediaType?: string;
}

/**
 * The fields of a body, checked by the compiler against its type:
 * `json<HealthBody>()("…", "status", "database")`. Not every field has to be listed.
 */
export function json<T>(status: 200 | 201 = 200) {
  return (words: string, ...fields: (keyof T & string)[]): Gives => ({ status, words, fields });
}
