import { eq, sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { handle } from "@/app/_server/handle";
import { database } from "@/db/client";
import { people } from "@/db/schema/people";
import { createToken, revokeToken } from "@/lib/services/tokens";
import { ownDatabase } from "../support";
import { cookieFor, invent } from "./people";

ownDatabase();
beforeAll(() => {
  process.env.NEXTAUTH_SECRET = "a-secret-for-these-tests-only-01";
});

const whoAmI = handle(async ({ actor }) => actor);

async function ask(headers: Record<string, string>, method = "GET") {
  const request = new Request("http://127.0.0.1:3000/api/me", {
    method,
    headers: { host: "127.0.0.1:3000", ...headers },
  });
  const response = await whoAmI(request, { params: Promise.resolve({}) });
  return { status: response.status, body: (await response.json()) as Record<string, unknown> };
}

describe("a session", () => {
  it("is known by its cookie, beside other cookies", async () => {
    const person = await invent("operator", { isSafetyOfficer: true });
    const cookie = `a=1; ${await cookieFor(person.id, 1)}; b=2`;
    const { status, body } = await ask({ cookie });
    expect(status).toBe(200);
    expect(body).toEqual({ ...person, via: "screen" });
  });

  it("has the role of this moment, not of the sign-in", async () => {
    const person = await invent("operator");
    const cookie = await cookieFor(person.id, 1);
    expect((await ask({ cookie })).body.role).toBe("operator");
    await database().update(people).set({ role: "planner" }).where(eq(people.id, person.id));
    expect((await ask({ cookie })).body.role).toBe("planner");
  });

  it("ends when the session version rises, or the person is no longer active", async () => {
    const person = await invent("operator");
    const cookie = await cookieFor(person.id, 1);
    await database()
      .update(people)
      .set({ sessionVersion: sql`session_version + 1` })
      .where(eq(people.id, person.id));
    expect((await ask({ cookie })).status).toBe(401);
    const next = await cookieFor(person.id, 2);
    expect((await ask({ cookie: next })).status).toBe(200);
    await database().update(people).set({ active: false }).where(eq(people.id, person.id));
    expect((await ask({ cookie: next })).status).toBe(401);
  });

  it("is refused when it is forged, damaged, too old or of nobody", async () => {
    const person = await invent("operator");
    const good = await cookieFor(person.id, 1);
    const secret = process.env.NEXTAUTH_SECRET;
    process.env.NEXTAUTH_SECRET = "another-secret-of-somebody-else-1";
    const forged = await cookieFor(person.id, 1);
    process.env.NEXTAUTH_SECRET = secret ?? "";
    const old = await cookieFor(person.id, 1, { maxAge: -120 });
    // A cookie that was renewed again and again still counts from its sign-in.
    const renewed = await cookieFor(person.id, 1, { ageS: 12 * 3600 + 1 });
    const nobody = await cookieFor("00000000-0000-4000-8000-000000000000", 1);
    const notAnId = await cookieFor("1 or 1=1", 1);
    for (const cookie of [
      forged,
      old,
      renewed,
      nobody,
      notAnId,
      good.slice(0, -3),
      `${good}x`,
      "dwellbook.session=plain",
    ]) {
      expect((await ask({ cookie })).status).toBe(401);
    }
    const long = await cookieFor(person.id, 1, { ageS: 12 * 3600 - 60 });
    for (const cookie of [good, long]) expect((await ask({ cookie })).status).toBe(200);
  });

  it("writes only from our own pages", async () => {
    const cookie = await cookieFor((await invent("operator")).id, 1);
    expect((await ask({ cookie }, "POST")).status).toBe(403);
    expect((await ask({ cookie, origin: "http://evil.example" }, "POST")).status).toBe(403);
    expect((await ask({ cookie, origin: "http://127.0.0.1:3000" }, "POST")).status).toBe(200);
  });
});

describe("an access token", () => {
  it("acts for its owner, from anywhere, with the role of this moment", async () => {
    const person = await invent("planner");
    const { token } = await createToken(person, { label: "script" });
    const headers = { authorization: `Bearer ${token}`, origin: "http://elsewhere.example" };
    expect((await ask(headers, "POST")).body).toEqual({ ...person, via: "token" });
    await database().update(people).set({ role: "operator" }).where(eq(people.id, person.id));
    expect((await ask(headers)).body.role).toBe("operator");
    await database().update(people).set({ active: false }).where(eq(people.id, person.id));
    expect((await ask(headers)).status).toBe(401);
  });

  it("that is revoked, unknown or damaged is 401, even beside a good cookie", async () => {
    const person = await invent("planner");
    const cookie = await cookieFor(person.id, 1);
    const made = await createToken(person, { label: "script" });
    await revokeToken(person, made.id);
    for (const authorization of [
      `Bearer ${made.token}`,
      `Bearer ${made.token.slice(0, -1)}`,
      "Bearer x",
      `Bearer ${"x".repeat(5000)}`,
      "Bearer ",
      "Basic abc",
    ]) {
      expect((await ask({ authorization, cookie })).status).toBe(401);
    }
  });
});
