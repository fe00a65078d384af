import { readdirSync, readFileSync } from "node:fs";
import { join, relative } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { openApiDocument } from "@/lib/contracts/openapi";
import { API_ROUTES } from "@/lib/contracts/openapi-routes";

const API = fileURLToPath(new URL("../../../app/api", import.meta.url));

interface Operation {
  readonly operationId: string;
  readonly parameters?: readonly { name: string; in: string; required: boolean; schema: object }[];
  readonly requestBody?: { content: Record<string, { schema: Record<string, unknown> }> };
  readonly responses: Record<string, { description: string }>;
  readonly security?: readonly object[];
}
interface Document {
  readonly openapi: string;
  readonly paths: Record<string, Record<string, Operation>>;
}

// As it goes over the wire: what JSON can't carry is gone.
const document = JSON.parse(JSON.stringify(openApiDocument("http://127.0.0.1:3000"))) as Document;
const operations = Object.entries(document.paths).flatMap(([path, methods]) =>
  Object.entries(methods).map(([method, operation]) => ({ path, method, operation })),
);

/** `get /api/passes/{id}` for each method that a route file under app/api exports. */
function handlersOnDisk(): string[] {
  return readdirSync(API, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.name === "route.ts")
    .map((entry) => join(entry.parentPath, entry.name))
    .filter((file) => !relative(API, file).startsWith("auth/"))
    .flatMap((file) => {
      const path = `/api/${relative(API, file).replace("/route.ts", "").replaceAll("[", "{").replaceAll("]", "}")}`;
      const methods = [
        ...readFileSync(file, "utf8").matchAll(/^export const (GET|POST|PATCH|PUT|DELETE)\b/gm),
      ];
      if (methods.length === 0) throw new Error(`${path} exports no method`);
      return methods.map(([, method = ""]) => `${method.toLowerCase()} ${path}`);
    });
}

describe("the description of the API", () => {
  it("names every handler that exists, and none that doesn't", () => {
    const described = API_ROUTES.map(({ method, path }) => `${method} ${path}`);
    expect(described.toSorted()).toEqual(handlersOnDisk().toSorted());
  });

  it("is OpenAPI 3.1 with names that are used once", () => {
    expect(document.openapi).toBe("3.1.0");
    const ids = operations.map(({ operation }) => operation.operationId);
    expect(new Set(ids).size).toBe(ids.length);
    for (const id of ids) expect(id).toMatch(/^[a-z][A-Za-z]+$/);
  });

  it("gives every parameter of a path, and says what is refused", () => {
    for (const { path, operation } of operations) {
      const inPath = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
      const given = (operation.parameters ?? []).filter((p) => p.in === "path");
      expect(given.map((p) => p.name)).toEqual(inPath);
      expect(given.every((p) => p.required)).toBe(true);
      for (const response of Object.values(operation.responses)) expect(response.description).not.toBe("");
    }
  });

  it("asks for a sign-in everywhere but where the table says open", () => {
    const open = operations
      .filter(({ operation }) => operation.security?.length === 0)
      .map(({ path }) => path);
    expect([...new Set(open)].toSorted()).toEqual([
      "/api/answers/{token}",
      "/api/answers/{token}/opened",
      "/api/calendar/{file}",
      "/api/health",
      "/api/openapi.json",
    ]);
  });

  it("describes bodies by the schemas that the services read with", () => {
    const book = document.paths["/api/engagements"]?.post?.requestBody?.content["application/json"]?.schema;
    expect(book).toMatchObject({
      type: "object",
      required: ["passId", "from", "to"],
      additionalProperties: false,
      properties: { passId: { format: "uuid" }, from: { format: "date-time" } },
    });
    const passes = document.paths["/api/passes"]?.get?.parameters ?? [];
    expect(passes.map((p) => p.name)).toEqual(expect.arrayContaining(["station", "fragment", "from", "to"]));
    const limit = document.paths["/api/ledger"]?.get?.parameters?.find((p) => p.name === "limit");
    expect(limit).toMatchObject({ required: false });
  });
});
