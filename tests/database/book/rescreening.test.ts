import { eq, sql } from "drizzle-orm";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { airspaceVolumes } from "@/db/schema/authorities";
import { laserSettings } from "@/db/schema/stations";
import { rescreenEngagementTask } from "@/lib/jobs/tasks/rescreen-engagement";
import { rescreenEngagement } from "@/lib/services/rescreen-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { addAuthority, NOW, only } from "../world";
import { bookIn, clearAll, confirmAll, ledgerOf, noticesOf, rowsOf, stateOf } from "./asks";
import { dwellIn, makeScene, type Scene } from "./scene";

ownDatabase();
let scene: Scene;
let id = "";
beforeAll(async () => {
  scene = await makeScene();
});
beforeEach(async () => {
  id = (await bookIn(scene)).id;
  await clearAll(scene, id);
});
afterEach(async () => {
  if (["proposed", "cleared", "confirmed"].includes(String(await stateOf(id)))) {
    await scrubEngagement(scene.planner, id, { reason: "test over" }, NOW);
  }
  await database().execute(sql`delete from airspace_volumes`);
});

/** An active volume around the station that the beam must run through. */
async function addVolume(authorityId: string | null, liftable: boolean): Promise<void> {
  await database()
    .insert(airspaceVolumes)
    .values({
      name: "Alder High",
      authorityId,
      ring: [
        [7.2, 45.5],
        [9.2, 45.5],
        [9.2, 47.5],
        [7.2, 47.5],
        [7.2, 45.5],
      ],
      floorText: "FL 100",
      ceilingText: "FL 245",
      floorM: 3048,
      ceilingM: 7468,
      activeSpans: [{ from: new Date(NOW).toISOString(), to: new Date(NOW + 7 * 86_400_000).toISOString() }],
      scheduleKnownUntil: new Date(NOW + 7 * 86_400_000),
      liftable,
      source: "test",
    });
}

describe("judging an engagement again", () => {
  it("leaves alone what still holds: no new version, nothing in the ledger", async () => {
    const before = await rowsOf(sql`select * from engagements where id = ${id}`);
    const ledger = await ledgerOf(id);
    await rescreenEngagement(id, NOW);
    expect(await rowsOf(sql`select * from engagements where id = ${id}`)).toEqual(before);
    expect(await ledgerOf(id)).toEqual(ledger);
  });

  it("asks an authority whose airspace the beam now meets, and waits for it", async () => {
    await confirmAll(scene, id);
    const fresh = await addAuthority(database(), `Sable Air Unit ${id.slice(0, 4)}`, null, {
      kind: "air unit",
    });
    await addVolume(fresh.id, true);
    await rescreenEngagement(id, NOW);
    expect(await stateOf(id)).toBe("proposed");
    expect(await noticesOf(id, fresh.id)).toEqual(["1 request (REQUEST)"]);
    // Those who have answered are not asked again: nothing changed for them.
    expect(await noticesOf(id, scene.clearing.id)).toEqual(["0 request (REQUEST)"]);
    await rescreenEngagement(id, NOW);
    expect(await noticesOf(id, fresh.id)).toHaveLength(1);
  });

  it("does not ask inside the new authority's lead time: there it stays closed", async () => {
    const fresh = await addAuthority(database(), `Late Air Unit ${id.slice(0, 4)}`, null, {
      leadTimeMin: 600,
    });
    await addVolume(fresh.id, true);
    const late = Date.parse(dwellIn(scene.pass).from) - 599 * 60_000;
    await rescreenEngagement(id, late);
    expect(await stateOf(id)).toBe("proposed");
    expect(await noticesOf(id, fresh.id)).toEqual([]);
  });

  it("sends back what a volume closes for good, with the cause in the ledger", async () => {
    await confirmAll(scene, id);
    await addVolume(null, false);
    await rescreenEngagement(id, NOW);
    expect(await stateOf(id)).toBe("proposed");
    const [row] = await rowsOf(sql`
      select actor_name, reason from ledger where subject_id = ${id} and action = 'sent engagement back'`);
    expect(row?.actor_name).toBe("the book");
    expect(row?.reason).toContain("Alder High");
  });

  it("after a change of the laser setting voids every answer and asks everybody anew", async () => {
    const old = only(await database().select().from(laserSettings).where(eq(laserSettings.active, true)));
    await database().update(laserSettings).set({ active: false }).where(eq(laserSettings.id, old.id));
    const { id: _id, ...figures } = old;
    const setting = only(
      await database()
        .insert(laserSettings)
        .values({ ...figures, name: "Second head", pulseEnergyJ: 18_000 })
        .returning(),
    );
    await rescreenEngagement(id, NOW);
    expect(await stateOf(id)).toBe("proposed");
    expect(await noticesOf(id, scene.airUnit.id)).toEqual([
      "0 request (REQUEST)",
      "1 revised request (REQUEST)",
    ]);
    const [row] = await rowsOf(sql`
      select laser_setting_id, (select count(*)::int from answers where engagement_id = ${id} and voided_at is null) as answers
      from engagements where id = ${id}`);
    expect(row).toEqual({ laser_setting_id: setting.id, answers: 0 });
    const [mail] = await rowsOf(
      sql`select text_body from notices where engagement_id = ${id} and sequence = 1 limit 1`,
    );
    expect(mail?.text_body).toContain("18,000 J");
    await clearAll(scene, id);
    expect(await stateOf(id)).toBe("cleared");
  });

  it("does nothing once the dwell has begun, after the end, or for what is not there", async () => {
    await confirmAll(scene, id);
    await addVolume(null, false);
    await rescreenEngagement(id, Date.parse(dwellIn(scene.pass).from));
    expect(await stateOf(id)).toBe("confirmed");
    await scrubEngagement(scene.planner, id, { reason: "done" }, NOW);
    await rescreenEngagementTask.run({ engagementId: id });
    await rescreenEngagementTask.run({ engagementId: scene.pass.id });
    expect(await stateOf(id)).toBe("scrubbed");
    await expect(async () => rescreenEngagementTask.run({ engagement: id })).rejects.toThrow();
  });
});
