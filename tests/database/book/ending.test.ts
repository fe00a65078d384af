import { sql } from "drizzle-orm";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { answerNotice } from "@/lib/services/answer-notice";
import { engagementSheet } from "@/lib/services/engagement-sheet";
import { lapseEngagements } from "@/lib/services/lapse-engagements";
import { listEngagements } from "@/lib/services/list-engagements";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { HOUR, NOW } from "../world";
import {
  bookIn,
  clearAll,
  confirmAll,
  ledgerOf,
  noticesOf,
  openRequest,
  rowsOf,
  stateOf,
  statusOf,
} from "./asks";
import { dwellIn, makeScene, type Scene } from "./scene";

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

const dwellMs = () => Date.parse(dwellIn(scene.pass).from);

describe("scrubbing", () => {
  it("needs a reason and the right: own planner or any operator, from any live state", async () => {
    const reason = { reason: "cloud" };
    for (const person of [scene.otherPlanner, scene.coordinator, scene.administrator, scene.safetyOfficer]) {
      expect(await statusOf(scrubEngagement(person, id, reason, NOW))).toBe(403);
    }
    expect(await statusOf(scrubEngagement(scene.operator, id, {}, NOW))).toBe(422);
    await clearAll(scene, id);
    await confirmAll(scene, id);
    const body = await scrubEngagement(scene.operator, id, reason, NOW);
    expect(body).toMatchObject({ state: "scrubbed", endReason: "cloud" });
    for (const authority of [scene.clearing, scene.airUnit]) {
      expect((await noticesOf(id, authority.id)).at(-1)).toBe("1 cancellation (CANCEL)");
    }
    const [mail] = await rowsOf(sql`
      select text_body, calendar_body from notices where engagement_id = ${id} and kind = 'cancellation' limit 1`);
    expect(mail?.text_body).toContain("Reason: cloud");
    expect(mail?.calendar_body).toContain(`UID:${id}@dwellbook.invalid`);
    expect(await statusOf(scrubEngagement(scene.operator, id, reason, NOW))).toBe(422);
    expect((await bookIn(scene)).state).toBe("proposed");
    await scrubEngagement(
      scene.operator,
      (await listEngagements(scene.planner, { state: "proposed" }, NOW)).engagements[0]?.id ?? "",
      reason,
      NOW,
    );
  });
});

describe("lapsing", () => {
  it("ends a proposal at its earliest missing answer, with cancellations, and nothing before", async () => {
    // Brume Air Unit's answer is needed 60 minutes before the dwell, Tessel's 20.
    const due = dwellMs() - 60 * 60_000;
    expect(await lapseEngagements(due - 1000)).toBe(0);
    expect(await lapseEngagements(due)).toBe(1);
    const sheet = await engagementSheet(scene.planner, id, due);
    expect(sheet).toMatchObject({ state: "lapsed" });
    expect(sheet.endReason).toMatch(/^No answer from Brume Air Unit by 2031-/);
    expect((await noticesOf(id, scene.clearing.id)).at(-1)).toBe("1 cancellation (CANCEL)");
    expect((await ledgerOf(id)).at(-1)).toBe("the book: let engagement lapse");
    expect(await lapseEngagements(due)).toBe(0);
  });

  it("waits for the next deadline once the earliest is met", async () => {
    const request = await openRequest(id, scene.airUnit.id);
    await answerNotice(scene.airCoordinator, request.id, { outcome: "no objection" }, NOW);
    expect(await lapseEngagements(dwellMs() - 60 * 60_000)).toBe(0);
    expect(await lapseEngagements(dwellMs() - 20 * 60_000)).toBe(1);
  });

  it("ends what is cleared but not confirmed when the dwell begins; a confirmed one stays, overdue a day later", async () => {
    await clearAll(scene, id);
    expect(await lapseEngagements(dwellMs() - 1000)).toBe(0);
    expect(await lapseEngagements(dwellMs())).toBe(1);
    expect(await stateOf(id)).toBe("lapsed");
    id = (await bookIn(scene)).id;
    await clearAll(scene, id);
    await confirmAll(scene, id);
    expect(await lapseEngagements(dwellMs() + 100 * HOUR)).toBe(0);
    const list = await listEngagements(scene.operator, { state: "confirmed" }, dwellMs() + 25 * HOUR);
    expect(list.engagements).toMatchObject([{ id, overdue: true }]);
  });
});
