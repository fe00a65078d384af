import { sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { pool } from "@/db/client";
import { Refusal } from "@/lib/engagement/refusal";
import { bookEngagement } from "@/lib/services/book-engagement";
import { moveEngagement } from "@/lib/services/move-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { ownDatabase } from "../support";
import { NOW } from "../world";
import { rowsOf } from "./asks";
import { dwellIn, makeScene, type Scene } from "./scene";

ownDatabase();
let scene: Scene;
beforeAll(async () => {
  scene = await makeScene();
});

/** The status that a handler would answer with; an error that is no refusal would be a 500. */
async function outcomeOf(work: Promise<unknown>): Promise<number> {
  try {
    await work;
    return 201;
  } catch (error) {
    if (error instanceof Refusal) return error.status;
    return 500;
  }
}

function tally(outcomes: readonly number[]): Record<string, number> {
  return Object.fromEntries(
    [...new Set(outcomes)]
      .sort()
      .map((status) => [status, outcomes.filter((other) => other === status).length]),
  );
}

describe("many at once", () => {
  it("200 attempts on one slot over 20 connections: one success, the rest told who was first", async () => {
    expect(pool().options.max).toBe(20);
    const attempts = Array.from({ length: 200 }, (_, index) => {
      // Not all the same dwell: any that overlap must exclude each other.
      const dwell = dwellIn(scene.pass, 20 - (index % 5), 40);
      const planner = index % 2 === 0 ? scene.planner : scene.otherPlanner;
      return outcomeOf(bookEngagement(planner, { passId: scene.pass.id, ...dwell }, NOW));
    });
    expect(tally(await Promise.all(attempts))).toEqual({ 201: 1, 409: 199 });
    const [row] = await rowsOf(sql`
      select (select count(*)::int from engagements) as engagements, (select count(*)::int from notices) as notices,
        (select count(*)::int from ledger) as ledger,
        (select count(*)::int from graphile_worker.jobs where task_identifier = 'send-notice') as jobs`);
    expect(row).toEqual({ engagements: 1, notices: 2, ledger: 1, jobs: 2 });
  });

  it("bookings, moves and scrubs mixed: no two live engagements ever overlap, one ledger row for each deed", async () => {
    const [first] = await rowsOf(sql`select id, version from engagements where state = 'proposed'`);
    const id = String(first?.id);
    const before = Number((await rowsOf(sql`select count(*)::int as n from ledger`))[0]?.n);
    const work = Array.from({ length: 60 }, (_, index) => {
      if (index % 3 === 0) {
        return outcomeOf(
          bookEngagement(
            scene.planner,
            { passId: scene.laterPass.id, ...dwellIn(scene.laterPass, 20, 30) },
            NOW,
          ),
        );
      }
      if (index % 3 === 1) {
        const body = {
          ...dwellIn(scene.pass, 20 - (index % 7), 40),
          version: Number(first?.version) + (index % 4),
        };
        return outcomeOf(moveEngagement(scene.planner, id, body, NOW));
      }
      return index === 59
        ? outcomeOf(scrubEngagement(scene.operator, id, { reason: "enough" }, NOW))
        : outcomeOf(bookEngagement(scene.planner, { passId: scene.pass.id, ...dwellIn(scene.pass) }, NOW));
    });
    const outcomes = await Promise.all(work);
    expect(outcomes).not.toContain(500);
    const overlaps = await rowsOf(sql`
      select a.number from engagements a join engagements b on a.id < b.id and a.station_id = b.station_id
        and a.hold_from < b.hold_until and b.hold_from < a.hold_until
      where a.state in ('proposed', 'cleared', 'confirmed') and b.state in ('proposed', 'cleared', 'confirmed')`);
    expect(overlaps).toEqual([]);
    const rows = await rowsOf(sql`select action from ledger order by id offset ${before}`);
    const moved = rows.filter(({ action }) => action === "moved engagement").length;
    const booked = rows.filter(({ action }) => action === "proposed engagement").length;
    const scrubbed = rows.filter(({ action }) => action === "scrubbed engagement").length;
    expect(booked + moved + scrubbed).toBe(rows.length);
    const [state] = await rowsOf(sql`select count(*)::int as n from engagements`);
    expect(state?.n).toBe(1 + booked);
    const [version] = await rowsOf(sql`select version from engagements where id = ${id}`);
    expect(version?.version).toBe(Number(first?.version) + moved + scrubbed);
  });
});
