import { sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { elementSets, protectedObjects } from "@/db/schema/objects";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { screenAfterDwellTask } from "@/lib/jobs/tasks/screen-after-dwell";
import { fitElements } from "@/lib/physics/effect/fit-elements";
import { rtnAxes } from "@/lib/physics/effect/two-body";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { add, scale } from "@/lib/physics/vector";
import { afterDwellSheet } from "@/lib/services/after-dwell-sheet";
import { elementsOf } from "@/lib/services/domain-rows";
import { moveEngagement } from "@/lib/services/move-engagement";
import { ownDatabase } from "../support";
import { elementSetRow, NOW, only } from "../world";
import { bookIn, rowsOf, statusOf } from "./asks";
import { dwellIn, makeScene, type Scene } from "./scene";

ownDatabase();
const DAY = 86_400_000;
let scene: Scene;
let booked: EngagementBody;

beforeAll(async () => {
  scene = await makeScene();
  await addObjects(220);
  booked = await bookIn(scene);
  await addMeeting();
});

/** Protected objects on many planes and heights, and one that never had an element set. */
async function addObjects(count: number): Promise<void> {
  const db = database();
  const rows = Array.from({ length: count }, (_, i) => {
    return { name: `Object ${i}`, catalogNumber: 71_000 + i, class: i % 3 ? "payload" : "optical payload" };
  });
  const made = await db.insert(protectedObjects).values(rows).returning();
  await db.insert(elementSets).values(
    made.map((object, i) =>
      elementSetRow(object.catalogNumber, {
        protectedObjectId: object.id,
        meanMotionRevPerDay: 14.1 + (i % 30) / 50,
        inclinationDeg: 40 + (i % 60),
        raanDeg: (i * 37) % 360,
        meanAnomalyDeg: (i * 71) % 360,
      }),
    ),
  );
  await db.insert(protectedObjects).values({ name: "Mute", catalogNumber: 79_999, class: "own" });
}

/** A payload that meets the untouched fragment a day after the dwell, against its way. */
async function addMeeting(): Promise<void> {
  const row = elementSetRow(88_001, {});
  const like = elementsOf({ ...row, objectName: null, objectId: null });
  const made = makeOrbit(like);
  const meetMs = Date.parse(booked.to) + DAY;
  const at = made.ok ? made.orbit.stateAt(meetMs) : null;
  if (!at?.ok) throw new Error("the fragment must have a state");
  const { normal } = rtnAxes(at.state);
  const turned = { rKm: at.state.rKm, vKmPerS: add(scale(at.state.vKmPerS, 0.6), scale(normal, 6)) };
  const fit = fitElements(turned, meetMs, like);
  if (!fit.ok) throw new Error(fit.reason);
  const object = only(
    await database()
      .insert(protectedObjects)
      .values({ name: "Meeting", catalogNumber: 79_000, class: "payload" })
      .returning(),
  );
  const { elements } = fit.orbit;
  await database()
    .insert(elementSets)
    .values({
      ...elementSetRow(79_000, { protectedObjectId: object.id }),
      ...elements,
      catalogNumber: 79_000,
      epochAt: new Date(elements.epochMs),
    });
}

const waitingJobs = async (): Promise<unknown[]> => {
  const rows = await rowsOf(sql`
    select j.payload from graphile_worker._private_jobs j
    join graphile_worker._private_tasks t on t.id = j.task_id where t.identifier = 'screen-after-dwell'`);
  return rows.map(({ payload }) => payload);
};

/** Takes the waiting jobs of the screening out of the queue and runs them, as a worker would. */
async function runJobs(): Promise<{ payloads: unknown[]; longestMs: number }> {
  const payloads: unknown[] = [];
  let longestMs = 0;
  for (;;) {
    const waiting = await waitingJobs();
    if (waiting.length === 0) return { payloads, longestMs };
    await database().execute(sql`delete from graphile_worker._private_jobs j
      using graphile_worker._private_tasks t where t.id = j.task_id and t.identifier = 'screen-after-dwell'`);
    for (const payload of waiting) {
      const startMs = performance.now();
      await screenAfterDwellTask.run(payload);
      longestMs = Math.max(longestMs, performance.now() - startMs);
      payloads.push(payload);
    }
  }
}

describe("screening the days after a dwell", () => {
  it("is asked for by the booking, and reads as waiting until then", async () => {
    expect(await waitingJobs()).toEqual([{ engagementId: booked.id, run: null, afterId: null, checked: 0 }]);
    const sheet = await afterDwellSheet(scene.planner, booked.id);
    expect(sheet).toMatchObject({ state: "waiting", thresholdKm: 5, from: booked.to, approaches: [] });
    expect(Date.parse(sheet.to) - Date.parse(sheet.from)).toBe(3 * DAY);
  });

  it("goes through all objects in chunks of at most two seconds, and finds the one that was put there", async () => {
    const { payloads, longestMs } = await runJobs();
    expect(payloads).toHaveLength(2);
    expect(longestMs).toBeLessThan(2000);
    const sheet = await afterDwellSheet(scene.operator, booked.id);
    // The crewed one of the scene, 220, the mute one and the meeting one.
    expect(sheet).toMatchObject({ state: "done", checked: 223, total: 223, reason: null });
    expect(sheet.unseen).toEqual(["Mute: it has no element set"]);
    const met = sheet.approaches.filter(({ name, path }) => name === "Meeting" && path === "untouched");
    const meeting = met.find(({ at }) => Math.abs(Date.parse(at) - Date.parse(booked.to) - DAY) < 2000);
    // The set was fitted to the meeting place itself.
    expect(meeting?.missKm).toBeLessThan(0.05);
    expect(meeting?.probability).toBeGreaterThan(0);
    for (const { missKm } of sheet.approaches) expect(missKm).toBeLessThanOrEqual(5);
  });

  it("writes a chunk once, however often it is given out", async () => {
    const before = await afterDwellSheet(scene.planner, booked.id);
    const [row] = await rowsOf(sql`select run from after_dwell_screenings`);
    await screenAfterDwellTask.run({
      engagementId: booked.id,
      run: row?.run,
      afterId: "00000000-0000-0000-0000-000000000000",
      checked: 150,
    });
    await screenAfterDwellTask.run({
      engagementId: booked.id,
      run: crypto.randomUUID(),
      afterId: null,
      checked: 0,
    });
    expect(await waitingJobs()).toEqual([]);
    expect(await afterDwellSheet(scene.planner, booked.id)).toEqual(before);
  });

  it("begins anew when a first chunk is given out twice, without doubling anything", async () => {
    const before = await afterDwellSheet(scene.planner, booked.id);
    await screenAfterDwellTask.run({ engagementId: booked.id, run: null, afterId: null, checked: 0 });
    expect(await afterDwellSheet(scene.planner, booked.id)).toMatchObject({ state: "running", checked: 150 });
    await runJobs();
    const after = await afterDwellSheet(scene.planner, booked.id);
    expect({ ...after, updatedAt: "" }).toEqual({ ...before, updatedAt: "" });
  });

  it("never shows figures of other times: a moved dwell waits for its own", async () => {
    const dwell = dwellIn(scene.pass, 10, 40);
    await moveEngagement(scene.planner, booked.id, { ...dwell, version: booked.version }, NOW);
    expect(await afterDwellSheet(scene.planner, booked.id)).toMatchObject({
      state: "waiting",
      from: dwell.to,
      approaches: [],
    });
    await runJobs();
    expect(await afterDwellSheet(scene.planner, booked.id)).toMatchObject({ state: "done", from: dwell.to });
  });

  it("is refused in words where the models don't cover the dwell", async () => {
    await database().execute(sql`update fragments set mass_kg = 0.0000001`);
    await screenAfterDwellTask.run({ engagementId: booked.id, run: null, afterId: null, checked: 0 });
    const sheet = await afterDwellSheet(scene.planner, booked.id);
    expect(sheet.state).toBe("refused");
    expect(sheet.reason).toMatch(/\.$/);
    expect(await waitingJobs()).toEqual([]);
  });

  it("is read by those who read the engagement", async () => {
    expect((await afterDwellSheet(scene.coordinator, booked.id)).from).not.toBe("");
    expect(
      await statusOf(afterDwellSheet({ ...scene.coordinator, authorityId: crypto.randomUUID() }, booked.id)),
    ).toBe(404);
    expect(await statusOf(afterDwellSheet(scene.planner, crypto.randomUUID()))).toBe(404);
  });
});
