import { sql } from "drizzle-orm";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { answerNotice } from "@/lib/services/answer-notice";
import { moveEngagement } from "@/lib/services/move-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { NOW } from "../world";
import {
  bookIn,
  clearAll,
  confirmAll,
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
