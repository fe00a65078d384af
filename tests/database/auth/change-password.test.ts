import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { ledger } from "@/db/schema/ledger";
import { actorFromSession } from "@/lib/services/authenticate";
import { changePassword } from "@/lib/services/change-password";
import { endOwnSessions } from "@/lib/services/end-own-sessions";
import { signIn } from "@/lib/services/sign-in";
import { ownDatabase } from "../support";
import { invent, PASSWORD } from "./people";

ownDatabase();

const NEXT = "another four words now";

describe("changing one's password", () => {
  it("takes the present one, then only the new one opens, and all sessions have ended", async () => {
    const person = await invent("planner");
    await changePassword(person, { current: PASSWORD, next: NEXT }, "a");
    expect(await actorFromSession({ personId: person.id, sessionVersion: 1 })).toBeNull();
    expect((await signIn({ email: person.email, password: PASSWORD }, "b")).outcome).toBe("refused");
    expect(await signIn({ email: person.email, password: NEXT }, "c")).toMatchObject({
      outcome: "in",
      sessionVersion: 2,
    });
    const rows = await database()
      .select()
      .from(ledger)
      .where(eq(ledger.subjectId, person.id))
      .orderBy(ledger.id);
    expect(rows[0]).toMatchObject({ action: "changed password", oldValues: null, newValues: null });
    expect(JSON.stringify(rows)).not.toContain("scrypt");
  });

  it("refuses a wrong present one, a weak one and the same one, by field", async () => {
    const person = await invent("planner");
    const attempts: [string, string, string][] = [
      ["wrong", NEXT, "current"],
      [PASSWORD, "short", "next"],
      [PASSWORD, PASSWORD, "next"],
    ];
    for (const [current, next, path] of attempts) {
      await expect(changePassword(person, { current, next }, "d")).rejects.toMatchObject({
        status: 422,
        reasons: [{ path }],
      });
    }
    expect(await actorFromSession({ personId: person.id, sessionVersion: 1 })).not.toBeNull();
  });

  it("is not for tokens", async () => {
    const person = await invent("planner");
    const refusal = changePassword({ ...person, via: "token" }, { current: PASSWORD, next: NEXT }, "e");
    await expect(refusal).rejects.toMatchObject({ status: 403 });
  });

  it("counts guesses like a sign-in does", async () => {
    const person = await invent("planner");
    const guesses = Array.from({ length: 10 }, (_, n) =>
      changePassword(person, { current: `guess ${n}`, next: NEXT }, "f").catch(
        (e: { status: number }) => e.status,
      ),
    );
    expect(new Set(await Promise.all(guesses))).toEqual(new Set([422]));
    await expect(changePassword(person, { current: PASSWORD, next: NEXT }, "f")).rejects.toMatchObject({
      status: 429,
    });
  });
});

describe("ending one's own sessions", () => {
  it("ends them all", async () => {
    const person = await invent("planner");
    await endOwnSessions(person);
    expect(await actorFromSession({ personId: person.id, sessionVersion: 1 })).toBeNull();
    expect(await actorFromSession({ personId: person.id, sessionVersion: 2 })).not.toBeNull();
  });
});
