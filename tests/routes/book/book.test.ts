import { afterAll, beforeAll, describe, expect, it } from "vitest";
import * as opened from "@/app/api/answers/[token]/opened/route";
import * as answers from "@/app/api/answers/[token]/route";
import * as calendarFile from "@/app/api/calendar/[file]/route";
import * as calendar from "@/app/api/calendar/route";
import * as confirm from "@/app/api/engagements/[id]/confirm/route";
import * as fire from "@/app/api/engagements/[id]/fire/route";
import * as engagement from "@/app/api/engagements/[id]/route";
import * as scrub from "@/app/api/engagements/[id]/scrub/route";
import * as engagements from "@/app/api/engagements/route";
import * as ledger from "@/app/api/ledger/route";
import * as answer from "@/app/api/notices/[id]/answer/route";
import * as notice from "@/app/api/notices/[id]/route";
import * as notices from "@/app/api/notices/route";
import { database } from "@/db/client";
import type { NoticeBody } from "@/lib/contracts/engagements";
import { answerUrl } from "@/lib/services/raise-notices";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { bookIn, checklistAt } from "../../database/book/asks";
import { dwellIn, makeScene, type Scene } from "../../database/book/scene";
import { ownDatabase } from "../../database/support";
import { addAuthority, addPerson, NOW } from "../../database/world";
import { call, tokenFor } from "./caller";

ownDatabase();
let scene: Scene;
/** Tokens of the scene's people, by role. */
const token: Record<string, string> = {};
beforeAll(async () => {
  scene = await makeScene();
  const people = {
    planner: scene.planner,
    operator: scene.operator,
    second: scene.secondOperator,
    coordinator: scene.coordinator,
    air: scene.airCoordinator,
    administrator: scene.administrator,
  };
  for (const [name, person] of Object.entries(people)) token[name] = await tokenFor(person.id);
});

const UNKNOWN = "3f2b8c1e-9a47-4d56-8e0f-0123456789ab";

describe("the order of refusal", () => {
  /** An engagement of the planner's, for the writes that need one. */
  let booked = "";
  beforeAll(async () => {
    booked = (await bookIn(scene, scene.laterPass)).id;
  });
  afterAll(async () => {
    await scrubEngagement(scene.planner, booked, { reason: "test over" }, NOW);
  });

  const writes = [
    ["POST /api/engagements", engagements.POST, "planner"],
    ["PATCH /api/engagements/:id", engagement.PATCH, "planner"],
    ["POST /api/engagements/:id/confirm", confirm.POST, "operator"],
    ["POST /api/engagements/:id/scrub", scrub.POST, "operator"],
    ["POST /api/engagements/:id/fire", fire.POST, "operator"],
  ] as const;
  for (const [name, handler, role] of writes) {
    it(`${name}: 401 before 403 before 400`, async () => {
      const ask = { params: { id: booked }, body: "this is not JSON" };
      const stranger = await call(handler, { ...ask, token: null });
      expect(stranger.status).toBe(401);
      expect((await call(handler, { ...ask, token: "dwb_wrong" })).status).toBe(401);
      expect((await call(handler, { ...ask, token: token.coordinator ?? "" })).status).toBe(403);
      const unread = await call(handler, { ...ask, token: token[role] ?? "" });
      expect(unread.status).toBe(400);
      expect(unread.json()).toMatchObject({ error: { code: "invalid", details: [] } });
      const nowhere = { ...ask, params: { id: UNKNOWN }, token: token[role] ?? "" };
      if (handler !== engagements.POST) expect((await call(handler, nowhere)).status).toBe(404);
    });
  }

  it("reads need a sign-in too, and the ledger a right", async () => {
    for (const handler of [engagements.GET, engagement.GET, notices.GET, ledger.GET]) {
      expect((await call(handler, { params: { id: UNKNOWN }, token: null })).status).toBe(401);
    }
    expect((await call(ledger.GET, { token: token.coordinator ?? "" })).status).toBe(403);
    expect((await call(engagement.GET, { params: { id: UNKNOWN }, token: token.planner ?? "" })).status).toBe(
      404,
    );
    expect(
      (await call(engagement.GET, { params: { id: "E-1001" }, token: token.planner ?? "" })).status,
    ).toBe(404);
    const query = "?state=asleep";
    expect((await call(engagements.GET, { query, token: token.planner ?? "" })).status).toBe(400);
  });
});

describe("the story over HTTP", () => {
  let id = "";
  const ask = (name: string, body?: unknown) => ({ token: token[name] ?? "", params: { id }, body });

  it("books: 201 with the engagement; the same slot again: 409 that says by whom", async () => {
    const body = { passId: scene.pass.id, ...dwellIn(scene.pass) };
    const made = await call(engagements.POST, ask("planner", body));
    expect(made.status).toBe(201);
    expect(made.headers.get("cache-control")).toBe("no-store");
    expect(made.json()).toMatchObject({ state: "proposed", passId: scene.pass.id });
    id = String(made.json().id);
    const again = await call(engagements.POST, ask("planner", body));
    expect(again.status).toBe(409);
    expect(again.json()).toMatchObject({ error: { code: "conflict" } });
    expect(again.text).toContain("Plan Ner");
    const list = await call(engagements.GET, {
      token: token.planner ?? "",
      query: "?state=proposed,cleared",
    });
    expect((list.json().engagements as { id: string }[]).map((row) => row.id)).toEqual([id]);
  });

  it("refuses what the rules forbid: 422 with a detail for each reason", async () => {
    const body = { passId: scene.laterPass.id, ...dwellIn(scene.laterPass, 0, 2) };
    const refused = await call(engagements.POST, ask("planner", body));
    expect(refused.status).toBe(422);
    const { error } = refused.json() as { error: { code: string; details: { message: string }[] } };
    expect(error.code).toBe("refused");
    expect(error.details.map(({ message }) => message).join()).toContain("10 s");
  });

  it("shows notices, takes one answer at the desk and one by link, and clears", async () => {
    const list = await call(notices.GET, { ...ask("coordinator"), query: `?engagement=${id}` });
    const [mine] = list.json().notices as NoticeBody[];
    expect(
      (
        await call(answer.POST, {
          ...ask("air", { outcome: "no objection" }),
          params: { id: mine?.id ?? "" },
        })
      ).status,
    ).toBe(403);
    const desk = await call(answer.POST, {
      ...ask("coordinator", { outcome: "no objection" }),
      params: { id: mine?.id ?? "" },
    });
    expect(desk.status).toBe(200);
    const read = (name: string) =>
      call(notice.GET, { token: token[name] ?? "", params: { id: mine?.id ?? "" } });
    expect((await read("coordinator")).json()).toMatchObject({
      id: mine?.id,
      answer: { outcome: "no objection" },
    });
    expect(String((await read("planner")).json().text)).toContain("slant range");
    expect((await read("air")).status).toBe(404);
    const all = await call(notices.GET, { ...ask("planner"), query: `?engagement=${id}` });
    const air = (all.json().notices as NoticeBody[]).find(
      (other) => other.authorityName === "Brume Air Unit",
    );
    const link = answerUrl(air?.id ?? "", Date.parse(air?.dwellTo ?? "")).split("/answer/")[1] ?? "";
    const page = await call(answers.GET, { params: { token: link } });
    expect(page.json()).toMatchObject({ canAnswer: true, stationName: "Alder Point" });
    expect((await call(opened.POST, { method: "POST", params: { token: link } })).status).toBe(204);
    const body = { outcome: "no objection with conditions", conditions: "call first", name: "Night Desk" };
    expect((await call(answers.POST, { params: { token: link }, body })).status).toBe(200);
    expect((await call(answers.GET, { params: { token: `${link}A` } })).status).toBe(404);
    const sheet = await call(engagement.GET, ask("planner"));
    expect(sheet.json()).toMatchObject({ state: "cleared", outstanding: [] });
  });

  it("confirms by two people, and scrubs; the ledger has it all", async () => {
    const body = { checklist: checklistAt(Date.now()) };
    expect((await call(confirm.POST, ask("operator", {}))).status).toBe(422);
    expect((await call(confirm.POST, ask("operator", body))).json().state).toBe("cleared");
    expect((await call(confirm.POST, ask("operator", body))).status).toBe(422);
    expect((await call(confirm.POST, ask("second", body))).json().state).toBe("confirmed");
    // The dwell has not begun: there is nothing to record.
    expect((await call(fire.POST, ask("operator", { outcome: "not fired" }))).status).toBe(422);
    expect((await call(scrub.POST, ask("operator", {}))).status).toBe(422);
    expect((await call(scrub.POST, ask("operator", { reason: "cloud" }))).json()).toMatchObject({
      state: "scrubbed",
      endReason: "cloud",
    });
    const read = await call(ledger.GET, { ...ask("planner"), query: `?subjectId=${id}&limit=3` });
    const entries = read.json().entries as {
      id: number;
      action: string;
      via: string;
      reason: string | null;
    }[];
    expect(entries.map(({ action }) => action)).toEqual([
      "scrubbed engagement",
      "confirmed engagement",
      "gave the first confirmation of engagement",
    ]);
    expect(entries[0]).toMatchObject({ via: "token", reason: "cloud" });
    const next = await call(ledger.GET, {
      ...ask("planner"),
      query: `?subjectId=${id}&before=${read.json().nextBefore}`,
    });
    expect((next.json().entries as { action: string }[]).at(-1)?.action).toBe("proposed engagement");
    expect(next.json().nextBefore).toBeNull();
    const literal = await call(ledger.GET, { ...ask("planner"), query: "?text=%25" });
    expect(literal.json().entries).toEqual([]);
  });
});

describe("the subscription calendar", () => {
  const feed = (url: string) => call(calendarFile.GET, { params: { file: url.split("/").at(-1) ?? "" } });
  const renew = (name: string) => call(calendar.POST, { method: "POST", token: token[name] ?? "" });

  it("shows the book to who holds the secret, until it is renewed or ended", async () => {
    const made = await renew("planner");
    expect(made.status).toBe(201);
    const url = String(made.json().url);
    const first = await feed(url);
    expect(first.status).toBe(200);
    expect(first.headers.get("content-type")).toBe("text/calendar; charset=utf-8");
    expect(first.text).toContain("STATUS:CANCELLED");
    expect(first.text.replaceAll("\r\n ", "")).toContain("scrubbed: Fragment 88001 at Alder Point");
    const second = String((await renew("planner")).json().url);
    expect((await feed(url)).status).toBe(404);
    expect((await feed(second)).status).toBe(200);
    expect((await call(calendar.DELETE, { method: "DELETE", token: token.planner ?? "" })).status).toBe(204);
    expect((await feed(second)).status).toBe(404);
    expect((await feed(`${"A".repeat(43)}.ics`)).status).toBe(404);
    expect((await feed("x")).status).toBe(404);
  });

  it("shows coordinators only what concerns their authority", async () => {
    const elsewhere = await addAuthority(database(), "Far Desk", null);
    const outsider = await addPerson(database(), "Out Sider", "coordinator", { authorityId: elsewhere.id });
    token.outsider = await tokenFor(outsider.id);
    const entries = async (name: string) =>
      (await feed(String((await renew(name)).json().url))).text.match(/BEGIN:VEVENT/g)?.length ?? 0;
    expect(await entries("air")).toBe(await entries("planner"));
    expect(await entries("air")).toBeGreaterThan(0);
    expect(await entries("outsider")).toBe(0);
  });
});
