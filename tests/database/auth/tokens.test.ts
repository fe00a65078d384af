import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { ledger } from "@/db/schema/ledger";
import { accessTokens } from "@/db/schema/people";
import { actorFromToken } from "@/lib/services/authenticate";
import { createToken, listTokens, revokeToken } from "@/lib/services/tokens";
import { ownDatabase } from "../support";
import { only } from "../world";
import { invent } from "./people";

ownDatabase();

const NOW = Date.UTC(2031, 3, 6, 3, 12);

describe("access tokens", () => {
  it("are shown once and stored as a hash only", async () => {
    const person = await invent("planner");
    const made = await createToken(person, { label: "  nightly import " });
    expect(made.token).toMatch(/^dwb_[\w-]{43}$/);
    expect(made.label).toBe("nightly import");
    const row = only(
      await database().select().from(accessTokens).where(eq(accessTokens.personId, person.id)),
    );
    expect(JSON.stringify(row)).not.toContain(made.token);
    expect(row.tokenHash).toMatch(/^[0-9a-f]{64}$/);
    expect(await listTokens(person)).toEqual({
      tokens: [{ id: made.id, label: "nightly import", createdAt: made.createdAt, lastUsedAt: null }],
    });
  });

  it("tell when they were last used, to the minute", async () => {
    const person = await invent("planner");
    const { token } = await createToken(person, { label: "script" });
    const lastUsed = async () => only((await listTokens(person)).tokens).lastUsedAt;
    await actorFromToken(token, NOW);
    expect(await lastUsed()).toBe("2031-04-06T03:12:00.000Z");
    await actorFromToken(token, NOW + 30_000);
    expect(await lastUsed()).toBe("2031-04-06T03:12:00.000Z");
    await actorFromToken(token, NOW + 61_000);
    expect(await lastUsed()).toBe("2031-04-06T03:13:01.000Z");
  });

  it("are revoked by their owner alone, once, with ledger rows", async () => {
    const [owner, other] = [await invent("planner"), await invent("administrator")];
    const made = await createToken(owner, { label: "script" });
    await expect(revokeToken(other, made.id)).rejects.toMatchObject({ status: 404 });
    await revokeToken(owner, made.id);
    await expect(revokeToken(owner, made.id)).rejects.toMatchObject({ status: 404 });
    expect((await listTokens(owner)).tokens).toEqual([]);
    const rows = await database()
      .select()
      .from(ledger)
      .where(eq(ledger.subjectId, made.id))
      .orderBy(ledger.id);
    expect(rows.map((row) => [row.action, row.actorId])).toEqual([
      ["made access token", owner.id],
      ["revoked access token", owner.id],
    ]);
  });

  it("need a purpose, and there are twenty at most", async () => {
    const person = await invent("planner");
    await expect(createToken(person, { label: " " })).rejects.toMatchObject({ status: 422 });
    await expect(createToken(person, { label: "x", scope: "all" })).rejects.toMatchObject({ status: 400 });
    for (let n = 0; n < 19; n++) await createToken(person, { label: `script ${n}` });
    const last = await Promise.allSettled([1, 2, 3].map((n) => createToken(person, { label: `last ${n}` })));
    expect(last.filter((r) => r.status === "fulfilled")).toHaveLength(1);
    expect((await listTokens(person)).tokens).toHaveLength(20);
  });
});
