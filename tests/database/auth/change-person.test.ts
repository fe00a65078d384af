import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { ledger } from "@/db/schema/ledger";
import { people } from "@/db/schema/people";
import { actorFromSession, actorFromToken, type PersonActor } from "@/lib/services/authenticate";
import { changePerson, endSessions } from "@/lib/services/change-person";
import { listPeople } from "@/lib/services/people";
import { createToken } from "@/lib/services/tokens";
import { ownDatabase } from "../support";
import { only } from "../world";
import { invent, inventAuthority } from "./people";

ownDatabase();

let administrator: PersonActor;
beforeAll(async () => {
  administrator = await invent("administrator");
});

async function ledgerOf(personId: string) {
  return database().select().from(ledger).where(eq(ledger.subjectId, personId)).orderBy(ledger.id);
}

describe("changing a person", () => {
  it("changes the role at once, ends the sessions, and keeps old and new with the reason", async () => {
    const person = await invent("planner");
    const body = await changePerson(administrator, person.id, {
      role: "operator",
      reason: "joins the watch",
    });
    expect(body).toMatchObject({ id: person.id, role: "operator", authorityId: null });
    expect(await actorFromSession({ personId: person.id, sessionVersion: 1 })).toBeNull();
    expect(await actorFromSession({ personId: person.id, sessionVersion: 2 })).toMatchObject({
      role: "operator",
    });
    expect(await ledgerOf(person.id)).toMatchObject([
      {
        action: "changed role of",
        actorId: administrator.id,
        reason: "joins the watch",
        oldValues: { role: "planner" },
        newValues: { role: "operator" },
      },
    ]);
  });

  it("deactivates: sessions and tokens end, and tokens stay ended after coming back", async () => {
    const person = await invent("operator");
    const { token } = await createToken(person, { label: "script" });
    await changePerson(administrator, person.id, { active: false, reason: "left" });
    expect(await actorFromToken(token, 0)).toBeNull();
    expect(await actorFromSession({ personId: person.id, sessionVersion: 2 })).toBeNull();
    const back = await changePerson(administrator, person.id, { active: true, reason: "is back" });
    expect(back).toMatchObject({ active: true, liveTokens: 0 });
    expect(await actorFromToken(token, 0)).toBeNull();
    expect((await ledgerOf(person.id)).map((row) => row.action)).toContain("deactivated");
  });

  it("gives a coordinator an authority, and takes it with the role", async () => {
    const person = await invent("planner");
    const refusal = changePerson(administrator, person.id, { role: "coordinator", reason: "x" });
    await expect(refusal).rejects.toMatchObject({ status: 422, reasons: [{ path: "authorityId" }] });
    const unknown = { role: "coordinator", authorityId: person.id, reason: "x" };
    await expect(changePerson(administrator, person.id, unknown)).rejects.toMatchObject({ status: 422 });
    const authorityId = await inventAuthority();
    const body = await changePerson(administrator, person.id, {
      role: "coordinator",
      authorityId,
      reason: "x",
    });
    expect(body).toMatchObject({ role: "coordinator", authorityId, authorityName: "Invented Clearing Desk" });
    const after = await changePerson(administrator, person.id, { role: "planner", reason: "x" });
    expect(after).toMatchObject({ role: "planner", authorityId: null });
  });

  it("refuses what changes nothing, what is unreadable, and what has no reason", async () => {
    const person = await invent("planner");
    const before = (await ledgerOf(person.id)).length;
    await expect(
      changePerson(administrator, person.id, { role: "planner", reason: "x" }),
    ).rejects.toMatchObject({
      status: 422,
    });
    await expect(changePerson(administrator, person.id, { role: "operator" })).rejects.toMatchObject({
      status: 422,
    });
    await expect(
      changePerson(administrator, person.id, { role: "pilot", reason: "x" }),
    ).rejects.toMatchObject({
      status: 400,
    });
    await expect(
      changePerson(administrator, "00000000-0000-4000-8000-000000000000", { role: "planner", reason: "x" }),
    ).rejects.toMatchObject({ status: 404 });
    expect(await actorFromSession({ personId: person.id, sessionVersion: 1 })).not.toBeNull();
    expect(await ledgerOf(person.id)).toHaveLength(before);
  });

  it("is the administrators' alone", async () => {
    const person = await invent("planner");
    for (const role of ["planner", "operator", "coordinator"] as const) {
      const actor = await invent(role);
      await expect(changePerson(actor, person.id, {})).rejects.toMatchObject({ status: 403 });
      await expect(endSessions(actor, person.id, {})).rejects.toMatchObject({ status: 403 });
      await expect(listPeople(actor)).rejects.toMatchObject({ status: 403 });
    }
  });
});

describe("administrators", () => {
  it("don't change their own role or activity", async () => {
    await invent("administrator");
    for (const change of [{ role: "planner" }, { active: false }]) {
      const refusal = changePerson(administrator, administrator.id, { ...change, reason: "x" });
      await expect(refusal).rejects.toMatchObject({ status: 422 });
    }
  });

  it("are never all gone, not even when two demote each other at once", async () => {
    await database().update(people).set({ active: false }).where(eq(people.role, "administrator"));
    const [a, b] = [await invent("administrator"), await invent("administrator")];
    const results = await Promise.allSettled([
      changePerson(a, b.id, { role: "planner", reason: "x" }),
      changePerson(b, a.id, { role: "planner", reason: "x" }),
    ]);
    const refused = only(results.filter((r) => r.status === "rejected"));
    expect(refused.reason).toMatchObject({ status: 403 });
    const left = await database().select().from(people).where(eq(people.role, "administrator"));
    expect(left.filter((row) => row.active)).toHaveLength(1);
  });
});

describe("ending sessions", () => {
  it("raises the version, keeps tokens and writes the reason", async () => {
    const boss = await invent("administrator");
    const person = await invent("operator");
    const { token } = await createToken(person, { label: "script" });
    await endSessions(boss, person.id, { reason: "lost laptop" });
    expect(await actorFromSession({ personId: person.id, sessionVersion: 1 })).toBeNull();
    expect(await actorFromToken(token, 0)).not.toBeNull();
    expect((await ledgerOf(person.id)).at(-1)).toMatchObject({
      action: "ended all sessions",
      reason: "lost laptop",
    });
  });
});
