import { sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { bookEngagement } from "@/lib/services/book-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { addStation, NOW } from "../world";
import { bookIn, ledgerOf, noticesOf, refusalOf, rowsOf, statusOf } from "./asks";
import { dwellIn, makeScene, type Scene } from "./scene";

ownDatabase();
let scene: Scene;
beforeAll(async () => {
  scene = await makeScene();
});

async function counts() {
  const [row] = await rowsOf(sql`
    select (select count(*)::int from engagements) as engagements, (select count(*)::int from notices) as notices,
      (select count(*)::int from ledger) as ledger,
      (select count(*)::int from graphile_worker.jobs where task_identifier = 'send-notice') as jobs`);
  return row;
}

describe("booking a dwell", () => {
  it("is refused to everybody but planners, before the body is looked at", async () => {
    const { operator, coordinator, administrator } = scene;
    const unread = () => Promise.reject(new Error("the body was read"));
    for (const person of [operator, coordinator, administrator]) {
      expect(await statusOf(bookEngagement(person, unread, NOW))).toBe(403);
    }
  });

  it("refuses bodies by kind: unreadable 400, lacking 422, unknown pass 404", async () => {
    const dwell = dwellIn(scene.pass);
    const book = (body: unknown) => statusOf(bookEngagement(scene.planner, body, NOW));
    expect(await book({ passId: "E-1", ...dwell })).toBe(400);
    expect(await book({ passId: scene.pass.id })).toBe(422);
    expect(await book({ passId: scene.station.id, ...dwell })).toBe(404);
    expect(await book({ passId: scene.pass.id, from: dwell.to, to: dwell.from })).toBe(422);
    expect(
      await book({ passId: scene.pass.id, from: dwell.from.replace(".000", ".500"), to: dwell.to }),
    ).toBe(422);
  });

  it("refuses with every reason of the rules, and leaves nothing behind", async () => {
    const before = await counts();
    // Begins with the rise, so before acquisition is over, and is longer than the station allows.
    const from = new Date(Math.ceil(scene.pass.riseAt.getTime() / 1000) * 1000);
    const to = new Date(from.getTime() + 300_000);
    const body = { passId: scene.pass.id, from: from.toISOString(), to: to.toISOString() };
    const refusal = await refusalOf(bookEngagement(scene.planner, body, NOW));
    expect(refusal.status).toBe(422);
    const words = refusal.reasons.map(({ message }) => message).join("\n");
    expect(words).toContain("240 s");
    expect(words).toContain("30 s");
    expect(await counts()).toEqual(before);
  });

  it("refuses a dwell that is over or too near for an authority's lead time", async () => {
    const dwellMs = Date.parse(dwellIn(scene.pass).from);
    expect((await refusalOf(bookIn(scene, scene.pass, dwellMs + 1000))).status).toBe(422);
    const refusal = await refusalOf(bookIn(scene, scene.pass, dwellMs - 29 * 60_000));
    expect(refusal.status).toBe(422);
    expect(refusal.message).toContain("too late to ask Tessel Clearing Desk");
  });

  it("holds the time, asks every concerned authority and writes the ledger, together", async () => {
    const before = await counts();
    const body = await bookIn(scene);
    expect(body).toMatchObject({
      state: "proposed",
      version: 1,
      passId: scene.pass.id,
      stationName: "Alder Point",
      planner: "Plan Ner",
      overdue: false,
      ...dwellIn(scene.pass),
    });
    expect(Date.parse(body.from) - Date.parse(body.holdFrom)).toBe(60_000);
    expect(Date.parse(body.holdUntil) - Date.parse(body.to)).toBe(120_000);
    expect(await counts()).toEqual({
      engagements: Number(before?.engagements) + 1,
      notices: Number(before?.notices) + 2,
      ledger: Number(before?.ledger) + 1,
      jobs: Number(before?.jobs) + 2,
    });
    expect(await ledgerOf(body.id)).toEqual(["Plan Ner: proposed engagement"]);
    for (const authority of [scene.clearing, scene.airUnit]) {
      expect(await noticesOf(body.id, authority.id)).toEqual(["0 request (REQUEST)"]);
    }
    await scrubEngagement(scene.planner, body.id, { reason: "test over" }, NOW);
  });

  it("names who has taken the time: 409", async () => {
    const taken = await bookIn(scene);
    const refusal = await refusalOf(bookIn(scene));
    expect(refusal.status).toBe(409);
    const span = `${taken.from.slice(0, 10)} ${taken.from.slice(11, 19)}Z`;
    expect(refusal.message).toContain(`Taken by E-${taken.number} (Plan Ner), ${span}`);
    // The hold counts, not the dwell alone: this one begins two minutes after the other has ended.
    const later = { passId: scene.pass.id, ...dwellIn(scene.pass, -140, 20) };
    expect(await statusOf(bookEngagement(scene.otherPlanner, later, NOW))).toBe(409);
    await scrubEngagement(scene.planner, taken.id, { reason: "test over" }, NOW);
  });

  it("refuses to lase one fragment from two stations at once: 409", async () => {
    const taken = await bookIn(scene);
    const twin = await twinPass();
    const refusal = await refusalOf(
      bookEngagement(scene.otherPlanner, { passId: twin, ...dwellIn(scene.pass) }, NOW),
    );
    expect(refusal.status).toBe(409);
    expect(refusal.message).toContain(
      `The fragment is taken by E-${taken.number} (Plan Ner) at another station`,
    );
    await scrubEngagement(scene.planner, taken.id, { reason: "test over" }, NOW);
  });
});

/** The same pass seen from a second station at the same place, so that only the fragment collides. */
async function twinPass(): Promise<string> {
  const twin = await addStation(database(), "Alder Annex");
  const [row] = await rowsOf(sql`
    insert into passes (station_id, laser_setting_id, fragment_id, element_set_id, rise_at, culminate_at, set_at,
      max_elevation_deg, rise_azimuth_deg, culmination_azimuth_deg, set_azimuth_deg, min_range_km,
      under_way_at_from, under_way_at_to, screened_at)
    select ${twin.id}, ${twin.laserSettingId}, fragment_id, element_set_id, rise_at, culminate_at, set_at,
      max_elevation_deg, rise_azimuth_deg, culmination_azimuth_deg, set_azimuth_deg, min_range_km,
      under_way_at_from, under_way_at_to, screened_at from passes where id = ${scene.pass.id}
    returning id`);
  return String(row?.id);
}
