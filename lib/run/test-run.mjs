import { join } from "node:path";
import { endCommands } from "./commands.mjs";
import { migrate } from "./data-steps.mjs";
import { ensureDataDir, ensureFolder, randomWord, treeDir } from "./folders.mjs";
import { keepers, whenGone } from "./leftovers.mjs";
import { takeLock } from "./lock.mjs";
import { ensureNodeModules } from "./node-modules.mjs";
import { discardCluster, ensureCluster } from "./postgres.mjs";
import { createDatabase } from "./postgres-roles.mjs";
import { endServers } from "./postgres-server.mjs";
import { checkTypes, lint, runVitest } from "./test-checks.mjs";
import { discardProduct, plainSurroundings, startProduct } from "./test-product.mjs";
import { addCounts, summaryLine } from "./test-summary.mjs";
import { ensureTestTools } from "./test-tools.mjs";
import { Problem, say, tellFailure } from "./words.mjs";

const dataDir = join(treeDir, ".data");
const productDir = join(dataDir, "test-product");
const reportDir = join(dataDir, "test-reports");
const folder = "test-postgres";
const state = { lock: null, product: null, counts: [], ending: false };

/** Runs a step and counts one failure when it cannot even be done. */
async function step(title, work) {
  if (state.ending) return;
  try {
    const count = await work();
    if (count) state.counts.push(count);
  } catch (error) {
    if (state.ending) return;
    say(`${title}: failed.`);
    tellFailure(error);
    state.counts.push({ passed: 0, failed: 1 });
  }
}

function takeTests() {
  ensureDataDir(dataDir);
  const lock = takeLock(join(dataDir, "test.lock"));
  if (!lock.taken) throw new Problem(`The tests already run in this folder (process ${lock.holder.pid}).`);
  state.lock = lock;
  ensureFolder(reportDir);
}

/** A migrated database for the tests to copy, in a cluster beside the product's own. */
async function prepareTemplate(env) {
  const cluster = await ensureCluster({ dataDir, folder });
  const old = await cluster.psql(
    "postgres",
    "select datname from pg_database where datname ~ '^dwellbook_te(st|mplate)_'",
  );
  for (const name of old.split("\n").filter((line) => line !== "")) {
    await cluster.psql("postgres", `drop database if exists ${name} with (force)`);
  }
  const template = `dwellbook_template_${randomWord(4)}`;
  await createDatabase(cluster.psql, template);
  const at = (url) => Object.assign(new URL(url), { pathname: `/${template}` }).href;
  await migrate({ ...env, DATABASE_URL: at(cluster.databaseUrl), DATABASE_OWNER_URL: at(cluster.ownerUrl) });
  return { TEST_DATABASE_ADMIN_URL: cluster.adminUrl, TEST_TEMPLATE_DB: template };
}

async function runBrowserTests(env, surroundings) {
  state.product = await startProduct(productDir, surroundings, () => state.ending);
  const { address, mailPage } = await state.product.untilReady();
  state.counts.push({ passed: 1, failed: 0 });
  const browserEnv = {
    ...env,
    DWELLBOOK_TEST_URL: address,
    DWELLBOOK_TEST_MAIL_URL: mailPage,
    DWELLBOOK_DATA_DIR: productDir,
  };
  const filters = ["tests/browser", "--no-file-parallelism"];
  return await runVitest("Browser tests", "browser", filters, browserEnv, reportDir);
}

async function runAll() {
  takeTests();
  await ensureNodeModules();
  await ensureTestTools();
  const env = { ...plainSurroundings(process.env), TZ: "UTC", NEXT_TELEMETRY_DISABLED: "1" };
  if (!process.stdout.isTTY) env.NO_COLOR = "1";
  await step("Lint", () => lint(env));
  await step("Types", () => checkTypes(env));
  say("Making sure of PostgreSQL for the tests …");
  await step("Tests", async () => {
    const database = await prepareTemplate(env);
    const filters = ["--exclude", "tests/browser/**"];
    return await runVitest("Tests", "tests", filters, { ...env, ...database }, reportDir);
  });
  await step("The product", () => runBrowserTests(env, process.env));
}

/** Ends all that runs. */
async function cleanUp() {
  await endCommands(500);
  await state.product?.stop();
  await endServers(1_500);
}

/** Removes the product under test, and a test cluster outside the tree, where nobody would look for it. */
async function discardOutsiders() {
  await state.product?.stop();
  await discardProduct(productDir);
  await discardCluster({ dataDir, folder, onlyOutside: true });
}

async function finish() {
  if (state.ending) return;
  await step("Clearing up", discardOutsiders);
  state.ending = true;
  await cleanUp();
  state.lock?.release();
  const count = addCounts(state.counts);
  process.exitCode = count.failed > 0 || count.passed === 0 ? 1 : 0;
  process.stdout.write(`${summaryLine(count)}\n`, () => process.exit());
}

async function interrupt(words) {
  if (state.ending) return;
  state.ending = true;
  say(words);
  await cleanUp();
  state.lock?.release();
  state.counts.push({ passed: 0, failed: 1 });
  process.exitCode = 1;
  process.stdout.write(`${summaryLine(addCounts(state.counts))}\n`, () => process.exit());
}

/** Runs every check and test, and prints the sum alone on the last line. */
export function runTests() {
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) {
    process.on(signal, () => void interrupt(`Ending the tests (${signal}) …`));
  }
  whenGone(keepers(), () => void interrupt("npm has gone; ending the tests …"));
  step("Set-up", runAll).then(finish);
}
