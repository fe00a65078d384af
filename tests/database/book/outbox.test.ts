import { sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { inTransaction } from "@/db/transaction";
import { bookEngagement } from "@/lib/services/book-engagement";
import { raiseNotices } from "@/lib/services/raise-notices";
import { ownDatabase } from "../support";
import { NOW } from "../world";
import { bookIn, rowsOf } from "./asks";
import { dwellIn, makeScene, type Scene } from "./scene";

ownDatabase();
let scene: Scene;
beforeAll(async () => {
  scene = await makeScene();
});

describe("notices and jobs", () => {
  const counts = async () =>
    (
      await rowsOf(sql`
      select (select count(*)::int from notices) as notices,
        (select count(*)::int from graphile_worker._private_jobs) as jobs`)
    )[0];

  it("are never there when the transaction that raised them is not", async () => {
    const body = await bookIn(scene);
    const before = await counts();
    const work = inTransaction(async (tx) => {
      await tx.execute(sql`update engagements set calendar_sequence = 7 where id = ${body.id}`);
      const members = [{ authority: scene.clearing, kind: "revised request", because: "of a test" }] as const;
      await raiseNotices(tx, { engagementId: body.id, members, nowMs: NOW });
      const [inside] = (await tx.execute(sql`select count(*)::int as n from graphile_worker._private_jobs`))
        .rows;
      expect(inside?.n).toBe(Number(before?.jobs) + 1);
      throw new Error("undo");
    });
    await expect(work).rejects.toThrow("undo");
    expect(await counts()).toEqual(before);
  });

  it("are not there for a booking that was refused", async () => {
    const before = await counts();
    const booked = bookEngagement(
      scene.planner,
      { passId: scene.laterPass.id, ...dwellIn(scene.laterPass, 0, 1) },
      NOW,
    );
    await expect(booked).rejects.toThrow("rules do not allow");
    expect(await counts()).toEqual(before);
  });
});
