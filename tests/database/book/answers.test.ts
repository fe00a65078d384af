import { sql } from "drizzle-orm";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { secret } from "@/lib/config";
import { signLink } from "@/lib/notices/answer-link";
import { answerByLink, openByLink, readAnswerPage } from "@/lib/services/answer-by-link";
import { answerNotice } from "@/lib/services/answer-notice";
import { engagementSheet } from "@/lib/services/engagement-sheet";
import { listNotices } from "@/lib/services/list-notices";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { NOW } from "../world";
import {
  bookIn,
  clearAll,
  confirmAll,
  ledgerOf,
  openRequest,
  refusalOf,
  rowsOf,
  stateOf,
  statusOf,
} from "./asks";
import { makeScene, type Scene } from "./scene";

ownDatabase();
let scene: Scene;
let id = "";
beforeAll(async () => {
  scene = await makeScene();
});
beforeEach(async () => {
  id = (await bookIn(scene)).id;
});
afterEach(async () => {
  if (["proposed", "cleared", "confirmed"].includes(String(await stateOf(id)))) {
    await scrubEngagement(scene.planner, id, { reason: "test over" }, NOW);
  }
});

const request = () => openRequest(id, scene.clearing.id);
const fine = { outcome: "no objection" };

async function tokenOf(noticeId: string): Promise<string> {
  const expiresMs = scene.pass.setAt.getTime();
  return signLink(secret("DWELLBOOK_LINK_SECRET"), { noticeId, expiresMs });
}

describe("an answer at the desk", () => {
  it("is the authority's own only", async () => {
    const notice = await request();
    expect(await statusOf(answerNotice(scene.planner, notice.id, fine, NOW))).toBe(403);
    expect(await statusOf(answerNotice(scene.airCoordinator, notice.id, fine, NOW))).toBe(403);
    expect(await statusOf(answerNotice(scene.coordinator, id, fine, NOW))).toBe(404);
    expect(await statusOf(answerNotice(scene.coordinator, notice.id, { outcome: "yes" }, NOW))).toBe(400);
    expect(await statusOf(answerNotice(scene.coordinator, notice.id, { outcome: "objection" }, NOW))).toBe(
      422,
    );
  });

  it("shows coordinators their own authority's notices only", async () => {
    const mine = await listNotices(scene.coordinator, { engagement: id });
    expect(mine.notices.map(({ authorityName }) => authorityName)).toEqual(["Tessel Clearing Desk"]);
    const all = await listNotices(scene.planner, { engagement: id });
    expect(all.notices).toHaveLength(2);
  });

  it("clears the engagement when it is the last one missing, not before", async () => {
    const first = await answerNotice(scene.coordinator, (await request()).id, fine, NOW);
    expect(first.answer).toMatchObject({ outcome: "no objection", answeredBy: "Co Ord", via: "desk" });
    expect(await stateOf(id)).toBe("proposed");
    const sheet = await engagementSheet(scene.planner, id, NOW);
    expect(sheet.outstanding.join()).toContain("Brume Air Unit");
    const second = await openRequest(id, scene.airUnit.id);
    await answerNotice(scene.airCoordinator, second.id, fine, NOW);
    expect(await stateOf(id)).toBe("cleared");
    expect(await ledgerOf(id)).toEqual([
      "Plan Ner: proposed engagement",
      "Co Ord: answered: no objection",
      "Air Co: answered: no objection",
      "the book: cleared engagement",
    ]);
  });

  it("that objects keeps it proposed; a later one without objection clears it, and voids the older", async () => {
    const notice = await request();
    const objection = { outcome: "objection", reasons: "parachute display" };
    await answerNotice(scene.coordinator, notice.id, objection, NOW);
    await answerNotice(scene.airCoordinator, (await openRequest(id, scene.airUnit.id)).id, fine, NOW);
    expect(await stateOf(id)).toBe("proposed");
    const sheet = await engagementSheet(scene.planner, id, NOW);
    expect(sheet.outstanding.join()).toContain("Tessel Clearing Desk objects: parachute display");
    await answerNotice(scene.coordinator, notice.id, fine, NOW + 1000);
    expect(await stateOf(id)).toBe("cleared");
    const rows = await rowsOf(sql`
      select outcome, voided_because from answers where notice_id = ${notice.id} order by answered_at`);
    expect(rows).toEqual([
      { outcome: "objection", voided_because: "a newer answer" },
      { outcome: "no objection", voided_because: null },
    ]);
  });

  it("that objects late sends a confirmed engagement back and voids both names", async () => {
    await clearAll(scene, id);
    await confirmAll(scene, id);
    expect(await stateOf(id)).toBe("confirmed");
    const objection = { outcome: "objection", reasons: "search and rescue flight" };
    await answerNotice(scene.coordinator, (await request()).id, objection, NOW);
    expect(await stateOf(id)).toBe("proposed");
    const [row] = await rowsOf(sql`
      select count(*)::int as n, count(voided_at)::int as voided from confirmations where engagement_id = ${id}`);
    expect(row).toEqual({ n: 2, voided: 2 });
    expect((await ledgerOf(id)).at(-1)).toBe("Co Ord: sent engagement back");
  });

  it("with new conditions has a confirmed engagement confirmed again by people who know them", async () => {
    await clearAll(scene, id);
    await confirmAll(scene, id);
    const conditions = { outcome: "no objection with conditions", conditions: "call ten minutes before" };
    await answerNotice(scene.coordinator, (await request()).id, conditions, NOW);
    expect(await stateOf(id)).toBe("cleared");
    const sheet = await engagementSheet(scene.operator, id, NOW);
    expect(sheet.confirmations).toEqual([]);
    expect(sheet.notices.map(({ answer }) => answer?.conditions ?? null)).toContain(
      "call ten minutes before",
    );
    await confirmAll(scene, id);
    expect(await stateOf(id)).toBe("confirmed");
  });

  it("comes too late once the dwell has begun or the engagement has ended", async () => {
    const notice = await request();
    const begun = Date.parse(notice.dwellFrom);
    expect(await statusOf(answerNotice(scene.coordinator, notice.id, fine, begun))).toBe(422);
    await scrubEngagement(scene.planner, id, { reason: "no longer wanted" }, NOW);
    expect(await statusOf(answerNotice(scene.coordinator, notice.id, fine, NOW))).toBe(422);
  });
});

describe("an answer by link", () => {
  it("needs no sign-in, but a name; it is on record as by link", async () => {
    const notice = await request();
    const token = await tokenOf(notice.id);
    const page = await readAnswerPage(token, NOW);
    expect(page).toMatchObject({
      canAnswer: true,
      closedBecause: null,
      answer: null,
      stationName: "Alder Point",
      kind: "request",
      authorityName: "Tessel Clearing Desk",
      engagementState: "proposed",
    });
    expect(page.text).toContain("not a NOTAM");
    expect(await statusOf(answerByLink(token, fine, NOW))).toBe(422);
    const after = await answerByLink(token, { ...fine, name: " Night\r\nDesk " }, NOW);
    expect(after.answer).toMatchObject({ outcome: "no objection", answeredBy: "Night Desk" });
    const [row] = await rowsOf(
      sql`select via, answered_by_person_id from answers where notice_id = ${notice.id}`,
    );
    expect(row).toEqual({ via: "link", answered_by_person_id: null });
    expect((await ledgerOf(id)).at(-1)).toBe("Night Desk: answered: no objection");
  });

  it("is changed by nobody who only opens it: reading leaves every row as it was", async () => {
    const notice = await request();
    const token = await tokenOf(notice.id);
    const before = await rowsOf(sql`select * from notices where id = ${notice.id}`);
    await readAnswerPage(token, NOW);
    await readAnswerPage(token, NOW);
    expect(await rowsOf(sql`select * from notices where id = ${notice.id}`)).toEqual(before);
    await openByLink(token, NOW);
    await openByLink(token, NOW + 5000);
    const opened = await request();
    expect(opened.openedAt).toBe(new Date(NOW).toISOString());
  });

  it("is nothing when the token is not ours: 404, whatever is asked", async () => {
    const foreign = signLink("somebody else's secret", { noticeId: (await request()).id, expiresMs: NOW });
    for (const token of [foreign, "", "x.y", `${await tokenOf((await request()).id)}x`]) {
      expect(await statusOf(readAnswerPage(token, NOW))).toBe(404);
      expect(await statusOf(openByLink(token, NOW))).toBe(404);
      expect(await statusOf(answerByLink(token, { ...fine, name: "X" }, NOW))).toBe(404);
    }
  });

  it("says why once it is over", async () => {
    const notice = await request();
    const token = await tokenOf(notice.id);
    const late = await readAnswerPage(token, Date.parse(notice.dwellFrom));
    expect(late).toMatchObject({ canAnswer: false, closedBecause: "The dwell has begun or is over." });
    await scrubEngagement(scene.planner, id, { reason: "no longer wanted" }, NOW);
    const page = await readAnswerPage(token, NOW);
    expect(page.canAnswer).toBe(false);
    const refusal = await refusalOf(answerByLink(token, { ...fine, name: "X" }, NOW));
    expect(refusal.status).toBe(422);
    expect(refusal.message).toContain("A later notice has replaced this one");
  });
});
