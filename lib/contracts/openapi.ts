import { z } from "zod";
import type { ApiRoute } from "./openapi-route";
import { API_ROUTES } from "./openapi-routes";

type JsonObject = Record<string, unknown>;

const ERROR_WORDS: Readonly<Record<number, string>> = {
  400: "The input can't be read.",
  401: "No valid sign-in or token.",
  403: "The caller's role does not allow it, or a cookie came from another site.",
  404: "Nothing under that identifier, or nothing the caller may know of.",
  409: "Somebody else holds it, or it has changed since it was read.",
  413: "The body is too large.",
  422: "Readable and allowed, but refused: every reason is in `details`.",
  429: "Too many attempts.",
  503: "Something that the product needs does not answer.",
};

/** The API as an OpenAPI 3.1 document, made from the schemas that the services read with. */
export function openApiDocument(serverUrl: string): JsonObject {
  const paths: Record<string, JsonObject> = {};
  for (const route of API_ROUTES) {
    paths[route.path] = { ...paths[route.path], [route.method]: operationOf(route) };
  }
  return {
    openapi: "3.1.0",
    info: {
      title: "Dwellbook",
      version: "1",
      description:
        "The engagement book of a ground-laser debris-clearing service. Times are UTC, ISO 8601 with Z and milliseconds; " +
        "intervals are half-open. It keeps plans and records: it is no safety stop, no NOTAM office and no clearing authority.",
    },
    servers: [{ url: serverUrl }],
    security: [{ token: [] }, { session: [] }],
    paths,
    components: { securitySchemes: SECURITY, schemas: { Error: ERROR_SCHEMA } },
  };
}

const SECURITY = {
  token: {
    type: "http",
    scheme: "bearer",
    description: "A personal access token; it can do what its owner can.",
  },
  session: {
    type: "apiKey",
    in: "cookie",
    name: "dwellbook.session",
    description: "Set by the sign-in. Writes with it are taken from the product's own pages only.",
  },
};

const ERROR_SCHEMA = {
  type: "object",
  required: ["error"],
  properties: {
    error: {
      type: "object",
      required: ["code", "message", "details"],
      properties: {
        code: { type: "string" },
        message: { type: "string" },
        details: {
          type: "array",
          items: {
            type: "object",
            required: ["path", "message"],
            properties: { path: { type: "string" }, message: { type: "string" } },
          },
        },
      },
    },
  },
};

function operationOf(route: ApiRoute): JsonObject {
  const parameters = [...pathParameters(route.path), ...queryParameters(route.query)];
  return {
    operationId: operationId(route),
    tags: [route.tag],
    summary: route.summary,
    ...(route.open ? { security: [] } : {}),
    ...(parameters.length > 0 ? { parameters } : {}),
    ...(route.body ? { requestBody: { required: true, content: bodyContent(route.body) } } : {}),
    responses: responsesOf(route),
  };
}

/** `get /api/passes/{id}` becomes `getPassesById`. */
function operationId({ method, path }: ApiRoute): string {
  const words = path.replace("/api/", "").split(/[/.-]/);
  return (
    method +
    words
      .map((word) => capital(word.replace(/^\{(.+)\}$/, (_, name: string) => `By${capital(name)}`)))
      .join("")
  );
}

function pathParameters(path: string): JsonObject[] {
  return [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => ({
    name,
    in: "path",
    required: true,
    schema: name === "id" ? { type: "string", format: "uuid" } : { type: "string" },
  }));
}

function queryParameters(query: z.ZodObject | undefined): JsonObject[] {
  if (!query) return [];
  const schema = schemaOf(query);
  const required = Array.isArray(schema.required) ? schema.required : [];
  return Object.entries((schema.properties ?? {}) as JsonObject).map(([name, property]) => ({
    name,
    in: "query",
    required: required.includes(name),
    schema: property,
  }));
}

function bodyContent(body: NonNullable<ApiRoute["body"]>): JsonObject {
  if (body instanceof z.ZodType) return { "application/json": { schema: schemaOf(body) } };
  const schema = { type: "string", description: body.words };
  return Object.fromEntries(body.mediaTypes.map((mediaType) => [mediaType, { schema }]));
}

function responsesOf(route: ApiRoute): JsonObject {
  const { status, words, fields, mediaType } = route.gives;
  const schema = fields ? { type: "object", required: fields } : { type: "string" };
  const content = status === 204 ? {} : { content: { [mediaType ?? "application/json"]: { schema } } };
  const common = [...(route.query || route.body ? [400] : []), ...(route.open ? [] : [401, 403])];
  const refusals = [...common, ...(route.refusals ?? [])].map(
    (code) => [String(code), refusal(code)] as const,
  );
  return { [String(status)]: { description: words, ...content }, ...Object.fromEntries(refusals) };
}

function refusal(code: number): JsonObject {
  const content = { "application/json": { schema: { $ref: "#/components/schemas/Error" } } };
  return { description: ERROR_WORDS[code], content };
}

/** What a caller sends: defaults may be left out. OpenAPI 3.1 speaks JSON Schema 2020-12. */
function schemaOf(schema: z.ZodType): JsonObject {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io: "input", unrepresentable: "any" });
  return rest;
}

function capital(word: string): string {
  return word.charAt(0).toUpperCase() + word.slice(1);
}
