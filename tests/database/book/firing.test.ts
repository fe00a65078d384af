import { eq, sql } from "drizzle-orm";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { elementSets } from "@/db/schema/objects";
import { passes } from "@/db/schema/passes";
import { engagementSheet } from "@/lib/services/engagement-sheet";
import { recordFiring } from "@/lib/services/record-firing";
import { rescreenEngagement } from "@/lib/services/rescreen-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { elementSetRow, NOW, only } from "../world";
import { bookIn, clearAll, confirmAll, noticesOf, refusalOf, rowsOf, stateOf, statusOf } from "./asks";
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
  // A firing leaves the fragment's later passes pending: the next test starts without it.
  await database().execute(sql`delete from firing_records`);
});

const dwellMs = () => Date.parse(dwellIn(scene.pass).from);

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
