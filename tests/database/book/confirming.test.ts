import { sql } from "drizzle-orm";
import { afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { airspaceVolumes } from "@/db/schema/authorities";
import { confirmEngagement } from "@/lib/services/confirm-engagement";
import { engagementSheet } from "@/lib/services/engagement-sheet";
import { rescreenEngagement } from "@/lib/services/rescreen-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { NOW } from "../world";
import {
  bookIn,
  checklistAt,
  clearAll,
  confirmAll,
  ledgerOf,
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
  await scrubEngagement(scene.planner, id, { reason: "test over" }, NOW);
});

const good = { checklist: checklistAt(NOW) };

describe("confirming", () => {
  it("is for operators, and for an administrator who is safety officer", async () => {
    for (const person of [scene.planner, scene.coordinator, scene.administrator]) {
      expect(await statusOf(confirmEngagement(person, id, {}, NOW))).toBe(403);
    }
  });

  it("is refused while it is only proposed, with what is missing", async () => {
    const refusal = await refusalOf(confirmEngagement(scene.operator, id, good, NOW));
    expect(refusal.status).toBe(422);
    expect(refusal.message).toContain("It is proposed; only what is cleared can be confirmed.");
  });

  it("takes two different people: the first leaves it cleared, the same again is refused", async () => {
    await clearAll(scene, id);
    const first = await confirmEngagement(scene.operator, id, good, NOW);
    expect(first.state).toBe("cleared");
    expect((await engagementSheet(scene.operator, id, NOW)).confirmations).toMatchObject([
      { personName: "Op One", capacity: "operator", checklist: good.checklist },
    ]);
    const again = await refusalOf(confirmEngagement(scene.operator, id, good, NOW));
    expect(again.status).toBe(422);
    expect(again.message).toContain("Two different people confirm");
    const second = await confirmEngagement(scene.safetyOfficer, id, good, NOW + 1000);
    expect(second.state).toBe("confirmed");
    const sheet = await engagementSheet(scene.operator, id, NOW);
    expect(sheet.confirmations.map(({ capacity }) => capacity)).toEqual(["operator", "safety officer"]);
    expect((await ledgerOf(id)).slice(-2)).toEqual([
      "Op One: gave the first confirmation of engagement",
      "Saf Ety: confirmed engagement",
    ]);
  });

  it("does not begin with the safety officer", async () => {
    await clearAll(scene, id);
    const refusal = await refusalOf(confirmEngagement(scene.safetyOfficer, id, good, NOW));
    expect(refusal.status).toBe(422);
    expect(refusal.message).toContain("An operator confirms first");
  });

  it("needs every value of the checklist, fresh", async () => {
    await clearAll(scene, id);
    const refusal = await refusalOf(confirmEngagement(scene.operator, id, {}, NOW));
    expect(refusal.status).toBe(422);
    const stale = { ...good.checklist, interlockTestedAt: new Date(NOW - 25 * 3_600_000).toISOString() };
    const old = await refusalOf(confirmEngagement(scene.operator, id, { checklist: stale }, NOW));
    expect(old.reasons.map(({ path }) => path)).toEqual(["checklist.interlockTestedAt"]);
    expect(await stateOf(id)).toBe("cleared");
  });

  it("of two names at the same moment by the same person takes one", async () => {
    await clearAll(scene, id);
    const twice = [1, 2].map(() => confirmEngagement(scene.operator, id, good, NOW));
    const results = await Promise.allSettled(twice);
    expect(results.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"]);
    expect(await stateOf(id)).toBe("cleared");
  });

  it("is refused when a protected object has come into the beam since, and the re-screen sends it back", async () => {
    await clearAll(scene, id);
    await confirmAll(scene, id);
    await crossBeam("crewed");
    await rescreenEngagement(id, NOW);
    expect(await stateOf(id)).toBe("proposed");
    const [last] = (await ledgerOf(id)).slice(-1);
    expect(last).toBe("the book: sent engagement back");
    await database().execute(sql`delete from beam_crossings`);
    await rescreenEngagement(id, NOW);
    expect(await stateOf(id)).toBe("cleared");
    await crossBeam("crewed");
    const refusal = await refusalOf(confirmEngagement(scene.operator, id, good, NOW));
    expect(refusal.reasons.map(({ path }) => path)).toContain("closed");
    await database().execute(sql`delete from beam_crossings`);
  });
});

/** A crossing of the beam with the crewed object over the whole pass. */
async function crossBeam(objectClass: string): Promise<void> {
  await database().execute(sql`
    insert into beam_crossings (pass_id, protected_object_id, element_set_id, from_at, to_at, min_separation_deg,
      half_angle_deg, added_deg, timing_guard_s)
    select p.id, o.id, e.id, p.rise_at, p.set_at, 1.5, 5, 0.2, 1 from passes p, protected_objects o, element_sets e
    where p.id = ${scene.pass.id} and o.class = ${objectClass} and e.protected_object_id = o.id`);
}

describe("what is not checked", () => {
  it("does not keep it from clearing, but needs a person's word before it is confirmed", async () => {
    // A volume around the station whose hours nobody told us, with no authority to ask.
    await database()
      .insert(airspaceVolumes)
      .values({
        name: "Alder Low",
        ring: [
          [7.2, 45.5],
          [9.2, 45.5],
          [9.2, 47.5],
          [7.2, 47.5],
          [7.2, 45.5],
        ],
        floorText: "SFC",
        ceilingText: "FL 245",
        floorM: 0,
        ceilingM: 7500,
        activeSpans: [],
        scheduleKnownUntil: new Date(NOW),
        liftable: true,
        source: "test",
      });
    await clearAll(scene, id);
    expect(await stateOf(id)).toBe("cleared");
    const refusal = await refusalOf(confirmEngagement(scene.operator, id, good, NOW));
    expect(refusal.reasons.map(({ path }) => path)).toEqual(["attestations"]);
    const words = { rule: "airspace", statement: "the unit says by phone that it is not active" };
    const wrong = [{ ...words, rule: "protected objects" }];
    const about = await refusalOf(
      confirmEngagement(scene.operator, id, { ...good, attestations: wrong }, NOW),
    );
    expect(about.message).toContain("There is nothing to attest about “protected objects”.");
    await confirmEngagement(scene.operator, id, { ...good, attestations: [words] }, NOW);
    // The second person need not repeat the word; it is on record with the first one's name.
    await confirmEngagement(scene.secondOperator, id, good, NOW);
    expect(await stateOf(id)).toBe("confirmed");
    const sheet = await engagementSheet(scene.planner, id, NOW);
    expect(sheet.attestations).toMatchObject([{ rule: "airspace", personName: "Op One" }]);
    await database().execute(sql`delete from airspace_volumes`);
  });
});

describe("what a viewer may do now", () => {
  it("is listed by the same table, with the reasons against", async () => {
    const commands = async (person: Parameters<typeof engagementSheet>[0]) =>
      (await engagementSheet(person, id, NOW)).commands.map(({ command, refusals }) => [
        command,
        refusals.length,
      ]);
    expect(await commands(scene.planner)).toEqual([
      ["move", 0],
      ["scrub", 0],
    ]);
    expect(await commands(scene.otherPlanner)).toEqual([]);
    expect(await commands(scene.operator)).toEqual([
      ["confirm", 1],
      ["scrub", 0],
      ["fire", 1],
    ]);
    expect(await commands(scene.coordinator)).toEqual([]);
  });

  it("is shown to coordinators with a notice only, and without the ledger", async () => {
    const sheet = await engagementSheet(scene.coordinator, id, NOW);
    expect(sheet.history).toEqual([]);
    expect(sheet.notices).toHaveLength(1);
    await database().execute(sql`delete from graphile_worker._private_jobs`);
    await rowsOf(sql`delete from answers where authority_id = ${scene.airUnit.id} returning 1`);
    await rowsOf(sql`delete from notices where authority_id = ${scene.airUnit.id} returning 1`);
    expect(await statusOf(engagementSheet(scene.airCoordinator, id, NOW))).toBe(404);
  });
});
