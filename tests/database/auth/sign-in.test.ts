import { eq } from "drizzle-orm";
import { describe, expect, it } from "vitest";
import { database, pool } from "@/db/client";
import { ledger } from "@/db/schema/ledger";
import { signIn } from "@/lib/services/sign-in";
import { countAttempt } from "@/lib/services/sign-in-throttle";
import { ownDatabase } from "../support";
import { invent, PASSWORD } from "./people";

ownDatabase();

let address = 0;
/** A fresh address, so that tests don't count against each other. */
const somewhere = () => `198.51.100.${++address}`;

describe("signing in", () => {
  it("lets the right password in, in any case of the address, and writes it down", async () => {
    const person = await invent("planner");
    const result = await signIn({ email: person.email.toUpperCase(), password: PASSWORD }, somewhere());
    expect(result).toEqual({ outcome: "in", personId: person.id, sessionVersion: 1 });
    const rows = await database().select().from(ledger).where(eq(ledger.subjectId, person.id));
    expect(rows.map((row) => row.action)).toEqual(["signed in"]);
  });

  it("answers the same to a wrong password, an unknown address and an inactive person", async () => {
    const person = await invent("planner");
    const gone = await invent("operator", { active: false });
    for (const attempt of [
      { email: person.email, password: "four words in a Row" },
      { email: "nobody@desk.invalid", password: PASSWORD },
      { email: gone.email, password: PASSWORD },
      { email: "not an address", password: PASSWORD },
      { email: person.email, password: "" },
      { email: person.email },
      null,
    ]) {
      expect(await signIn(attempt, somewhere())).toEqual({ outcome: "refused" });
    }
  });
});

describe("the throttle", () => {
  it("stops the eleventh attempt on an account, right or wrong, from wherever it comes", async () => {
    const person = await invent("planner");
    const attempts = Array.from({ length: 10 }, () =>
      signIn({ email: person.email, password: "x" }, somewhere()),
    );
    expect(new Set((await Promise.all(attempts)).map((r) => r.outcome))).toEqual(new Set(["refused"]));
    const eleventh = await signIn({ email: person.email, password: PASSWORD }, somewhere());
    expect(eleventh.outcome).toBe("throttled");
    expect(eleventh).toHaveProperty("waitS");
  });

  it("does the same for an account that does not exist", async () => {
    const attempts = Array.from({ length: 14 }, () =>
      signIn({ email: "ghost@desk.invalid", password: "x" }, somewhere()),
    );
    const outcomes = (await Promise.all(attempts)).map((r) => r.outcome);
    expect(outcomes.filter((o) => o === "refused")).toHaveLength(10);
    expect(outcomes.filter((o) => o === "throttled")).toHaveLength(4);
  });

  it("starts afresh after a success", async () => {
    const person = await invent("planner");
    for (let n = 0; n < 6; n++) await signIn({ email: person.email, password: "x" }, somewhere());
    expect((await signIn({ email: person.email, password: PASSWORD }, somewhere())).outcome).toBe("in");
    for (let n = 0; n < 9; n++) {
      expect((await signIn({ email: person.email, password: "x" }, somewhere())).outcome).toBe("refused");
    }
  });

  it("stops an address that tries many accounts", async () => {
    const from = somewhere();
    const attempts = Array.from({ length: 61 }, (_, n) =>
      signIn({ email: `guess${n}@desk.invalid`, password: "x".repeat(300) }, from),
    );
    // Unreadable attempts cost nothing and are not counted; readable ones are.
    expect(new Set((await Promise.all(attempts)).map((r) => r.outcome))).toEqual(new Set(["refused"]));
    for (let n = 0; n < 60; n++) expect(await countAttempt(`guess${n}@desk.invalid`, from)).toBe(0);
    expect(await countAttempt("another@desk.invalid", from)).toBeGreaterThan(0);
  });

  it("keeps no address in the clear", async () => {
    const { rows } = await pool().query<{ key: string }>("select key from sign_in_throttle");
    expect(rows.length).toBeGreaterThan(0);
    for (const { key } of rows) expect(key).not.toMatch(/desk\.invalid|198\.51/);
  });
});
