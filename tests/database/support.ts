import { randomBytes } from "node:crypto";
import { Client, escapeIdentifier } from "pg";
import { afterAll, beforeAll } from "vitest";
import { closePool } from "@/db/client";

/** A database of one test file: a copy of the migrated template, dropped at the end. */
export interface TestDatabase {
  readonly name: string;
  /** As the application role: what the product itself may do. */
  readonly url: string;
  /** As the owner of the tables. */
  readonly ownerUrl: string;
}

/**
 * Gives the test file a database of its own before its first test, points the product at it
 * (DATABASE_URL, link secret) and drops it after the last. The returned function gives its
 * addresses inside tests.
 */
export function ownDatabase(): () => TestDatabase {
  let made: TestDatabase | undefined;
  beforeAll(async () => {
    made = await cloneTemplate();
    process.env.DATABASE_URL = made.url;
    process.env.DATABASE_OWNER_URL = made.ownerUrl;
    process.env.DWELLBOOK_LINK_SECRET ??= "a-secret-for-tests-only-0123456789";
  });
  afterAll(async () => {
    await closePool();
    if (made) await dropDatabase(made.name);
  });
  return () => {
    if (!made) throw new Error("the test database is made before the first test, not while the file loads");
    return made;
  };
}

/** Runs `work` on a connection of its own and closes it. */
export async function withClient<T>(url: string, work: (client: Client) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

function required(name: "TEST_DATABASE_ADMIN_URL" | "TEST_TEMPLATE_DB"): string {
  const value = process.env[name];
  if (value) return value;
  throw new Error(`${name} is not set: database tests need a PostgreSQL server. Run them with \`npm test\`.`);
}

async function cloneTemplate(): Promise<TestDatabase> {
  const admin = required("TEST_DATABASE_ADMIN_URL");
  const template = required("TEST_TEMPLATE_DB");
  const name = `dwellbook_test_${randomBytes(6).toString("hex")}`;
  await withClient(admin, (client) =>
    client.query(`CREATE DATABASE ${escapeIdentifier(name)} TEMPLATE ${escapeIdentifier(template)}`),
  );
  const roles = await withClient(urlFor(admin, name, null), readRoles);
  await withClient(admin, (client) =>
    client.query(
      `GRANT CONNECT, TEMPORARY, CREATE ON DATABASE ${escapeIdentifier(name)} TO ${escapeIdentifier(roles.app)}`,
    ),
  );
  return { name, url: urlFor(admin, name, roles.app), ownerUrl: urlFor(admin, name, roles.owner) };
}

/** The two roles of the product, by what they own: the job queue's schema and the ledger. */
async function readRoles(client: Client): Promise<{ app: string; owner: string }> {
  const { rows } = await client.query<{ app: string | null; owner: string | null }>(`
    SELECT (SELECT pg_get_userbyid(nspowner) FROM pg_namespace WHERE nspname = 'graphile_worker') AS app,
           (SELECT tableowner FROM pg_tables WHERE schemaname = 'public' AND tablename = 'ledger') AS owner`);
  const { app, owner } = rows[0] ?? { app: null, owner: null };
  if (!app || !owner)
    throw new Error("the template database has not been migrated: run the tests with `npm test`");
  if (app === owner) throw new Error("the template was migrated by one role only; the ledger needs two");
  return { app, owner };
}

/** The administrator's address, with another database and acting as another role from the start. */
function urlFor(adminUrl: string, database: string, role: string | null): string {
  const url = new URL(adminUrl);
  url.pathname = `/${database}`;
  const settings = `-c timezone=UTC${role === null ? "" : ` -c role=${role}`}`;
  url.search = `?options=${encodeURIComponent(settings)}`;
  return url.href;
}

async function dropDatabase(name: string): Promise<void> {
  await withClient(required("TEST_DATABASE_ADMIN_URL"), (client) =>
    client.query(`DROP DATABASE IF EXISTS ${escapeIdentifier(name)} WITH (FORCE)`),
  );
}
