// A developers' tool: makes sure the product's PostgreSQL runs and prints its addresses as shell lines.
//   eval "$(node lib/run/dev-db.mjs)"          start it and set the variables
//   node lib/run/dev-db.mjs --stop             stop it
import { nodeVersionProblem } from "./version.mjs";

async function main() {
  const { ensureCluster } = await import("./postgres.mjs");
  const { dataDirOf } = await import("./folders.mjs");
  const dataDir = dataDirOf();
  const cluster = await ensureCluster({ dataDir });
  if (process.argv.includes("--stop")) {
    await cluster.stop(30_000);
    return;
  }
  const lines = {
    DATABASE_URL: cluster.databaseUrl,
    DATABASE_OWNER_URL: cluster.ownerUrl,
    TEST_DATABASE_ADMIN_URL: cluster.adminUrl,
    DWELLBOOK_DATA_DIR: dataDir,
  };
  for (const [name, value] of Object.entries(lines)) process.stdout.write(`export ${name}='${value}'\n`);
}

const problem = nodeVersionProblem(process.versions.node);
if (problem) {
  console.error(problem);
  process.exitCode = 1;
} else {
  main().catch(async (error) => {
    const { tellFailure } = await import("./words.mjs");
    tellFailure(error);
    process.exitCode = 1;
  });
}
