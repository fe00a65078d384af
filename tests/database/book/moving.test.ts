import { eq, sql } from "drizzle-orm";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { elementSets } from "@/db/schema/objects";
import { passes } from "@/db/schema/passes";
import { answerNotice } from "@/lib/services/answer-notice";
import { engagementSheet } from "@/lib/services/engagement-sheet";
import { lapseEngagements } from "@/lib/services/lapse-engagements";
import { listEngagements } from "@/lib/services/list-engagements";
import { moveEngagement } from "@/lib/services/move-engagement";
import { recordFiring } from "@/lib/services/record-firing";
import { rescreenEngagement } from "@/lib/services/rescreen-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { elementSetRow, HOUR, NOW, only } from "../world";
import {
  bookIn,
  clearAll,
  confirmAll,
  ledgerOf,
  noticesOf,
  openRequest,
  refusalOf,
  rowsOf,
  stateOf,
  statusOf,
} from "./asks";
import { dwellIn, makeScene, type Scene } from "./scene";

ownDatabase();
let scene: Scene;
let id = "";
let version = 1;
beforeAll(async () => {
  scene = await makeScene();
});
beforeEach(async () => {
  const body = await bookIn(scene);
  id = body.id;
  version = body.version;
});
afterEach(async () => {
  if (["proposed", "cleared", "confirmed"].includes(String(await stateOf(id)))) {
    await scrubEngagement(scene.planner, id, { reason: "test over" }, NOW);
  }
  // A firing leaves the fragment's later passes pending: the next test starts without it.
  await database().execute(sql`delete from firing_records`);
});

const dwellMs = () => Date.parse(dwellIn(scene.pass).from);
/** Ten seconds later than booked. */
const later = () => dwellIn(scene.pass, 10, 40);
const versionNow = async () =>
  Number((await rowsOf(sql`select version from engagements where id = ${id}`))[0]?.version);

describe("moving", () => {
  it("is the own planner's only", async () => {
    const body = { ...later(), version };
    for (const person of [scene.otherPlanner, scene.operator, scene.coordinator, scene.administrator]) {
      expect(await statusOf(moveEngagement(person, id, body, NOW))).toBe(403);
    }
    expect(await statusOf(moveEngagement(scene.planner, id, { version }, NOW))).toBe(422);
    expect(await statusOf(moveEngagement(scene.planner, scene.pass.id, body, NOW))).toBe(404);
  });

  it("sends it back to proposed, voids answers and names, revises the notices with a higher sequence", async () => {
    await clearAll(scene, id);
    await confirmAll(scene, id);
    const old = await openRequest(id, scene.clearing.id);
    const moved = await moveEngagement(scene.planner, id, { ...later(), version: await versionNow() }, NOW);
    expect(moved).toMatchObject({ state: "proposed", ...later() });
    expect(Date.parse(moved.holdUntil) - Date.parse(moved.to)).toBe(120_000);
    const [row] = await rowsOf(sql`
      select (select count(*)::int from answers where engagement_id = ${id} and voided_at is null) as answers,
        (select count(*)::int from confirmations where engagement_id = ${id} and voided_at is null) as names`);
    expect(row).toEqual({ answers: 0, names: 0 });
    expect(await noticesOf(id, scene.clearing.id)).toEqual([
      "0 request (REQUEST)",
      "1 revised request (REQUEST)",
    ]);
    expect(await statusOf(answerNotice(scene.coordinator, old.id, { outcome: "no objection" }, NOW))).toBe(
      422,
    );
    await clearAll(scene, id);
    expect(await stateOf(id)).toBe("cleared");
  });

  it("lifts an objection to the old times: it is asked anew", async () => {
    const objection = { outcome: "objection", reasons: "not at that time" };
    await answerNotice(scene.coordinator, (await openRequest(id, scene.clearing.id)).id, objection, NOW);
    await moveEngagement(scene.planner, id, { ...later(), version: await versionNow() }, NOW);
    await clearAll(scene, id);
    expect(await stateOf(id)).toBe("cleared");
  });

  it("of a version that is no longer the present one is refused with the present row: 409", async () => {
    const refusal = await refusalOf(
      moveEngagement(scene.planner, id, { ...later(), version: version + 1 }, NOW),
    );
    expect(refusal.status).toBe(409);
    expect(Object.fromEntries(refusal.reasons.map(({ path, message }) => [path, message]))).toEqual({
      state: "proposed",
      version: String(version),
      ...dwellIn(scene.pass),
    });
  });

  it("into somebody else's time is refused, and leaves the old hold", async () => {
    const other = await bookIn(scene, scene.laterPass);
    const body = { ...dwellIn(scene.laterPass), version };
    expect(await statusOf(moveEngagement(scene.planner, id, body, NOW))).toBe(409);
    await scrubEngagement(scene.planner, other.id, { reason: "test over" }, NOW);
    // Free now, but outside its own pass.
    expect(await statusOf(moveEngagement(scene.planner, id, body, NOW))).toBe(422);
    expect(
      await rowsOf(sql`select dwell_from from engagements where id = ${id} and version = ${version}`),
    ).toHaveLength(1);
  });

  it("inside an authority's deadline for changes is refused: scrub it instead", async () => {
    // Brume Air Unit takes no change in the last 60 minutes.
    const late = dwellMs() - 59 * 60_000;
    const refusal = await refusalOf(moveEngagement(scene.planner, id, { ...later(), version }, late));
    expect(refusal.status).toBe(422);
    expect(refusal.message).toContain("Brume Air Unit takes no change later than 60 min");
    expect(refusal.message).toContain("scrub it instead");
    expect(await noticesOf(id, scene.airUnit.id)).toEqual(["0 request (REQUEST)"]);
  });

  it("to the same times changes nothing and asks nobody", async () => {
    await clearAll(scene, id);
    const same = await moveEngagement(
      scene.planner,
      id,
      { ...dwellIn(scene.pass), version: await versionNow() },
      NOW,
    );
    expect(same.state).toBe("cleared");
    expect(await noticesOf(id, scene.clearing.id)).toHaveLength(1);
  });
});

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

describe("recording a firing", () => {
  const record = () => ({
    outcome: "fired",
    openedAt: dwellIn(scene.pass).from,
    closedAt: dwellIn(scene.pass).to,
    pulses: 400,
    interruptions: [{ at: new Date(dwellMs() + 5000).toISOString(), cause: "aircraft", secondsLost: 0.5 }],
  });
  const soonMs = () => dwellMs() + 600_000;

  it("is an operator's, of what is confirmed, after the dwell began", async () => {
    expect(await statusOf(recordFiring(scene.planner, id, record(), soonMs()))).toBe(403);
    expect(await statusOf(recordFiring(scene.operator, id, record(), soonMs()))).toBe(422);
    await clearAll(scene, id);
    await confirmAll(scene, id);
    expect(await statusOf(recordFiring(scene.operator, id, record(), dwellMs() - 1))).toBe(422);
    const bad = { ...record(), openedAt: null, pulses: null };
    const refusal = await refusalOf(recordFiring(scene.operator, id, bad, soonMs()));
    expect(refusal.reasons.map(({ path }) => path)).toEqual(["openedAt", "pulses"]);
    const body = await recordFiring(scene.operator, id, record(), soonMs());
    expect(body.state).toBe("fired");
    const sheet = await engagementSheet(scene.planner, id, soonMs());
    // 400 pulses of 20 kJ.
    expect(sheet.firing).toMatchObject({
      outcome: "fired",
      pulses: 400,
      deliveredEnergyJ: 8e6,
      recordedBy: "Op One",
    });
    expect((await noticesOf(id, scene.clearing.id)).at(-1)).toBe("1 completion (PUBLISH)");
    expect(await statusOf(recordFiring(scene.operator, id, record(), soonMs()))).toBe(422);
  });

  it("that says not fired takes no times, and tells the authorities so", async () => {
    await clearAll(scene, id);
    await confirmAll(scene, id);
    const none = { outcome: "not fired", note: "aircraft in the way throughout" };
    const wrong = { ...none, openedAt: dwellIn(scene.pass).from };
    expect(await statusOf(recordFiring(scene.operator, id, wrong, soonMs()))).toBe(422);
    expect((await recordFiring(scene.operator, id, none, soonMs())).state).toBe("fired");
    const [mail] = await rowsOf(sql`
      select text_body from notices where engagement_id = ${id} and kind = 'completion' limit 1`);
    expect(mail?.text_body).toContain("Nothing was fired");
  });

  // Last in this file: the newer element set stays.
  it("leaves the fragment's other engagements pending until a newer element set has come", async () => {
    const next = await bookIn(scene, scene.laterPass);
    await clearAll(scene, next.id);
    expect(await stateOf(next.id)).toBe("cleared");
    await clearAll(scene, id);
    await confirmAll(scene, id);
    await database().execute(sql`delete from graphile_worker._private_jobs`);
    await recordFiring(scene.operator, id, record(), soonMs());
    const jobs = await rowsOf(sql`
      select payload from graphile_worker._private_jobs j join graphile_worker._private_tasks t on t.id = j.task_id
      where t.identifier = 'rescreen-engagement'`);
    expect(jobs).toEqual([{ payload: { engagementId: next.id } }]);
    await rescreenEngagement(next.id, soonMs());
    expect(await stateOf(next.id)).toBe("proposed");
    const fresh = await freshElements(soonMs() + 300_000);
    await rescreenEngagement(next.id, soonMs() + 600_000);
    expect(await stateOf(next.id)).toBe("cleared");
    const [row] = await rowsOf(sql`select element_set_id from engagements where id = ${next.id}`);
    expect(row).toEqual({ element_set_id: fresh });
    await scrubEngagement(scene.planner, next.id, { reason: "test over" }, NOW);
  });
});

/** A newer element set of the same orbit, and the later pass worked out from it, as a sweep would leave it. */
async function freshElements(epochMs: number): Promise<string> {
  const old = elementSetRow(88_001, {});
  // The same mean motion carried on: the anomaly advances with it, the other elements stay.
  const turned = old.meanMotionRevPerDay * ((epochMs - old.epochMs) / 86_400_000) * 360;
  const set = only(
    await database()
      .insert(elementSets)
      .values({
        ...old,
        fragmentId: scene.fragment.id,
        epochMs,
        epochAt: new Date(epochMs),
        meanAnomalyDeg: (old.meanAnomalyDeg + turned) % 360,
      })
      .returning(),
  );
  await database().update(passes).set({ elementSetId: set.id }).where(eq(passes.id, scene.laterPass.id));
  return set.id;
}
