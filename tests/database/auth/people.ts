import { scryptSync } from "node:crypto";
import { encode } from "next-auth/jwt";
import { database } from "@/db/client";
import { authorities } from "@/db/schema/authorities";
import { people } from "@/db/schema/people";
import type { Role } from "@/lib/contracts/common";
import type { PersonActor } from "@/lib/services/authenticate";
import { only } from "../world";

export const PASSWORD = "four words in a row";
/** One cheap hash for all invented people: the cost stands in it, and the real one is slow on purpose. */
const HASH = cheapHash(PASSWORD);
let count = 0;

/** Invents a person who can sign in with PASSWORD. */
export async function invent(
  role: Role,
  amend: Partial<typeof people.$inferInsert> = {},
): Promise<PersonActor> {
  count += 1;
  const authorityId = role === "coordinator" ? await inventAuthority() : null;
  const email = `person${count}@desk.invalid`;
  const values = { name: `Person ${count}`, email, passwordHash: HASH, role, authorityId, ...amend };
  const row = only(await database().insert(people).values(values).returning());
  const { id, name, isSafetyOfficer } = row;
  return { id, name, email: row.email, role, authorityId: row.authorityId, isSafetyOfficer, via: "screen" };
}

/** Invents an authority for a coordinator. */
export async function inventAuthority(): Promise<string> {
  const values = {
    name: "Invented Clearing Desk",
    kind: "clearing authority",
    email: "desk@clearing.invalid",
    phone: "none",
    dutyHours: "always",
    timeZone: "UTC",
    leadTimeMin: 30,
    changeDeadlineMin: 10,
  };
  return only(await database().insert(authorities).values(values).returning()).id;
}

/** A session cookie as the sign-in would set it so many seconds ago. */
export async function cookieFor(
  personId: string,
  sessionVersion: number,
  { ageS = 0, maxAge = 3600 } = {},
): Promise<string> {
  const secret = process.env.NEXTAUTH_SECRET ?? "";
  const signedInAtMs = Date.now() - ageS * 1000;
  const token = await encode({ token: { sub: personId, sessionVersion, signedInAtMs }, secret, maxAge });
  return `dwellbook.session=${token}`;
}

function cheapHash(password: string): string {
  const key = scryptSync(password, Buffer.alloc(16, 7), 32, { N: 1024, r: 8, p: 1 });
  return `scrypt$1024$8$1$${Buffer.alloc(16, 7).toString("base64url")}$${key.toString("base64url")}`;
}
