import { drizzle } from "drizzle-orm/node-postgres";
import { migrate } from "drizzle-orm/node-postgres/migrator";
import { runMigrations } from "graphile-worker";
import { Client, escapeIdentifier } from "pg";
import { config } from "@/lib/config";

/**
 * Brings the database to the present schema. Tables belong to the owner role,
 * the application role gets what it needs and no more: on the ledger INSERT and
 * SELECT. The job queue's schema belongs to the application role, since its row
 * security admits its owner only.
 */
async function main(): Promise<void> {
  const appUrl = config().DATABASE_URL;
  const ownerUrl = config().DATABASE_OWNER_URL ?? appUrl;
  const client = new Client({ connectionString: ownerUrl, options: "-c timezone=UTC" });
  await client.connect();
  try {
    await client.query("SELECT pg_advisory_lock(72830117)");
    await migrate(drizzle(client), { migrationsFolder: new URL("../drizzle", import.meta.url).pathname });
    const appUser = decodeURIComponent(new URL(appUrl).username);
    if (ownerUrl !== appUrl && appUser) await grantToApplication(client, appUser);
  } finally {
    await client.end();
  }
  await runMigrations({ connectionString: appUrl });
}

async function grantToApplication(client: Client, appUser: string): Promise<void> {
  const role = escapeIdentifier(appUser);
  await client.query(`
    GRANT USAGE ON SCHEMA public TO ${role};
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA public TO ${role};
    GRANT USAGE ON ALL SEQUENCES IN SCHEMA public TO ${role};
    REVOKE UPDATE, DELETE, TRUNCATE ON ledger FROM ${role};
  `);
  const { rowCount } = await client.query("SELECT 1 FROM pg_namespace WHERE nspname = 'graphile_worker'");
  if (!rowCount) await client.query(`CREATE SCHEMA graphile_worker AUTHORIZATION ${role}`);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
