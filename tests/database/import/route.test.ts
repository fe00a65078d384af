import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { GET, POST } from "@/app/api/element-sets/route";
import type { ErrorBody } from "@/lib/contracts/common";
import type { ElementSetBody, ImportReportBody } from "@/lib/contracts/element-sets";
import { call, tokenOf } from "../../routes/calculations/callers";
import { ownDatabase } from "../support";

ownDatabase();

/** Real sets of October 2021 as published by CelesTrak; see the README beside the file. */
const published = readFileSync("../shared/reference/published-debris-2021.tle", "utf8");
const lines = published.split(/\r?\n/);
const setOf = (n: number) => lines.slice(3 * n, 3 * n + 3).join("\n");
const numberOf = (n: number) => Number(lines[3 * n + 1]?.slice(2, 7));
const bad = setOf(9).replace(/.$/, "x");

let planner = "";
beforeAll(async () => {
  planner = await tokenOf("planner");
});

function send(body: BodyInit, query = "", token: string | null = planner) {
  return call<ImportReportBody & ErrorBody>(POST, { body, token, path: `/api/element-sets${query}` });
}

function formOf(...files: readonly [name: string, text: string][]): FormData {
  const form = new FormData();
  for (const [name, text] of files) form.append("file", new File([text], name));
  return form;
}

describe("POST /api/element-sets", () => {
  it("previews and then commits a raw body", async () => {
    const text = `${setOf(0)}\n${bad}`;
    const preview = await send(text, "?preview=1");
    expect(preview).toMatchObject({ status: 200, body: { accepted: 1, preview: true, importId: null } });
    const real = await send(text);
    expect(real).toMatchObject({ status: 200, body: { accepted: 1, preview: false } });
    expect(real.body.rejected).toHaveLength(1);
    expect(real.body.importId).not.toBeNull();
    const again = await send(text);
    expect(again).toMatchObject({ status: 200, body: { accepted: 0, sweepId: null } });
    expect(again.body.duplicates.map(({ line }) => line)).toEqual([1]);
  });

  it("takes several files of a form, each by its name", async () => {
    const { status, body } = await send(
      formOf(["first.tle", setOf(1)], ["second.tle", `${bad}\n${setOf(2)}`]),
    );
    expect(status).toBe(200);
    expect(body.accepted).toBe(2);
    expect(body.rejected.map(({ message }) => message)).toEqual([expect.stringMatching(/^second\.tle: /)]);
  });

  it("takes the 1,200 published sets in one go, read in another process", async () => {
    const { status, body } = await send(published, "?preview=1");
    expect(status).toBe(200);
    expect(body.rejected).toEqual([]);
    expect(body.accepted + body.duplicates.length).toBe(1200);
  });

  it("imports protected objects of a class", async () => {
    expect((await send(setOf(5), "?as=protected")).status).toBe(400);
    expect((await send(setOf(5), "?as=protected&class=royal")).status).toBe(400);
    const { status, body } = await send(setOf(5), "?as=protected&class=payload");
    expect(status).toBe(200);
    expect(body.created.map(({ catalogNumber }) => catalogNumber)).toEqual([numberOf(5)]);
  });

  it("answers 422 with the report when no set is good", async () => {
    const { status, body } = await send(bad);
    expect(status).toBe(422);
    expect(body).toMatchObject({ accepted: 0, importId: null });
    expect(body.rejected).toHaveLength(1);
    const utf16 = await send(Buffer.from(setOf(6), "utf16le"));
    expect(utf16.status).toBe(422);
  });

  it("answers 400 for nothing, 413 for too much, 422 for too many", async () => {
    expect((await send("")).status).toBe(400);
    expect((await send(" \n ")).status).toBe(400);
    expect((await send(formOf())).status).toBe(400);
    expect((await send(formOf(["empty.tle", ""]))).status).toBe(400);
    expect((await send("x".repeat(10 * 1024 * 1024 + 1))).status).toBe(413);
    const many = await send(
      Array.from({ length: 21_000 }, () => bad)
        .join("\n")
        .slice(0, 10_000_000),
    );
    expect(many.status).toBe(422);
    expect(many.body.error.message).toContain("20,000");
  });

  it("answers 401 and 403 before it reads anything", async () => {
    expect((await send("", "", null)).status).toBe(401);
    expect((await send("", "", await tokenOf("operator"))).status).toBe(403);
    expect((await send("", "", await tokenOf("coordinator"))).status).toBe(403);
    expect((await send(setOf(7), "?preview=1", await tokenOf("administrator"))).status).toBe(200);
  });
});

describe("GET /api/element-sets", () => {
  const list = (query: string, token: string | null = planner) =>
    call<{ elementSets: ElementSetBody[] } & ErrorBody>(GET, {
      method: "GET",
      token,
      path: `/api/element-sets${query}`,
    });

  it("gives the history of an object by its number, its fragment or its protected object", async () => {
    const byNumber = await list(`?catalogNumber=${numberOf(0)}`);
    expect(byNumber.body.elementSets.map(({ raw }) => raw)).toEqual([setOf(0)]);
    const [set] = byNumber.body.elementSets;
    const byFragment = await list(`?fragment=${set?.fragmentId}`);
    expect(byFragment.body).toEqual(byNumber.body);
    const guarded = await list(`?catalogNumber=${numberOf(5)}`);
    const byProtected = await list(`?protected=${guarded.body.elementSets[0]?.protectedObjectId}`);
    expect(byProtected.body.elementSets.map(({ catalogNumber }) => catalogNumber)).toEqual([numberOf(5)]);
  });

  it("gives the newest set of every object without a filter, and refuses what it can't read", async () => {
    const all = await list("");
    expect(all.body.elementSets.map(({ catalogNumber }) => catalogNumber).sort()).toEqual(
      [0, 1, 2, 5].map(numberOf).sort(),
    );
    expect((await list("?fragment=no-identifier")).status).toBe(400);
    expect((await list("?catalogNumber=many")).status).toBe(400);
    expect((await list("", await tokenOf("coordinator"))).status).toBe(403);
  });
});
