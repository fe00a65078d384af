import { randomBytes } from "node:crypto";
import { chmod, mkdir, readFile, writeFile } from "node:fs/promises";
import { dirname, join } from "node:path";
import { eq } from "drizzle-orm";
import type { Transaction } from "@/db/client";
import { accessTokens, people } from "@/db/schema/people";
import { config } from "@/lib/config";
import type { Actor } from "@/lib/engagement/roles";
import { hashToken } from "@/lib/services/authenticate";
import { hashPassword } from "@/lib/services/passwords";
import { INVENTED_PEOPLE, type InventedPerson } from "./people";

/** One line of the file that tells how to sign in to the demo. */
export interface DemoAccess {
  readonly name: string;
  readonly email: string;
  readonly password: string;
  readonly role: string;
  readonly token: string;
}

const accessFile = (): string => join(config().DWELLBOOK_DATA_DIR, "demo-access.json");

/** Makes the demo's people, each with a password and a token of random bytes. */
export async function fillPeople(tx: Transaction, authorityIds: Map<string, string>): Promise<DemoAccess[]> {
  const access: DemoAccess[] = [];
  for (const person of INVENTED_PEOPLE) {
    const secrets = newSecrets();
    const [row] = await tx
      .insert(people)
      .values({
        name: person.name,
        email: person.email,
        role: person.role,
        isSafetyOfficer: person.isSafetyOfficer,
        authorityId: person.authority === null ? null : (authorityIds.get(person.authority) ?? null),
        passwordHash: await hashPassword(secrets.password),
      })
      .returning({ id: people.id });
    if (!row) throw new Error(`${person.name} was not inserted`);
    access.push(await giveToken(tx, row.id, person, secrets));
  }
  return access;
}

/** New passwords and tokens for demo people whose access file was lost. */
export async function renewAccess(tx: Transaction): Promise<DemoAccess[]> {
  const access: DemoAccess[] = [];
  for (const person of INVENTED_PEOPLE) {
    const [row] = await tx.select({ id: people.id }).from(people).where(eq(people.email, person.email));
    if (!row) continue;
    const secrets = newSecrets();
    await tx
      .update(people)
      .set({ passwordHash: await hashPassword(secrets.password) })
      .where(eq(people.id, row.id));
    access.push(await giveToken(tx, row.id, person, secrets));
  }
  return access;
}

function newSecrets() {
  return { password: randomBytes(12).toString("base64url"), token: randomBytes(32).toString("base64url") };
}

async function giveToken(
  tx: Transaction,
  personId: string,
  person: InventedPerson,
  secrets: { password: string; token: string },
): Promise<DemoAccess> {
  const tokenHash = hashToken(secrets.token);
  await tx.insert(accessTokens).values({ personId, label: "demo", tokenHash });
  return {
    name: person.name,
    email: person.email,
    password: secrets.password,
    role: person.role,
    token: secrets.token,
  };
}

/** Writes the sign-ins where only their owner can read them. */
export async function writeAccess(access: readonly DemoAccess[]): Promise<void> {
  await mkdir(dirname(accessFile()), { recursive: true });
  await writeFile(accessFile(), `${JSON.stringify(access, null, 2)}\n`, { mode: 0o600 });
  await chmod(accessFile(), 0o600);
}

/** True when the file of the sign-ins is there and readable. */
export async function hasAccess(): Promise<boolean> {
  try {
    return Array.isArray(JSON.parse(await readFile(accessFile(), "utf8")));
  } catch {
    return false;
  }
}

/** The actor that a demo person is on the screen. */
export async function actorOf(
  tx: Pick<Transaction, "select">,
  email: string,
): Promise<Actor & { id: string }> {
  const [row] = await tx.select().from(people).where(eq(people.email, email));
  if (!row) throw new Error(`no demo person ${email}`);
  return {
    id: row.id,
    name: row.name,
    role: row.role as Actor["role"],
    authorityId: row.authorityId,
    isSafetyOfficer: row.isSafetyOfficer,
    via: "screen",
  };
}
