import { accessSync, constants } from "node:fs";
import { join } from "node:path";
import { protectAccess } from "./access.mjs";
import { ensureBuild } from "./build.mjs";
import { endCommands } from "./commands.mjs";
import { hasNoPeople, migrate, seedDemo } from "./data-steps.mjs";
import { childEnvironment, workerCount } from "./environment.mjs";
import { dataDirOf, ensureDataDir, ensureFolder, treeDir } from "./folders.mjs";
import { waitForHealth } from "./health.mjs";
import { endLeftovers, keepers, whenGone } from "./leftovers.mjs";
import { takeLock } from "./lock.mjs";
import { ensureNodeModules } from "./node-modules.mjs";
import { chooseWebPort, readPort } from "./ports.mjs";
import { ensureCluster } from "./postgres.mjs";
import { endServers } from "./postgres-server.mjs";
import { isAlive } from "./processes.mjs";
import { productParts, readyWords } from "./product-parts.mjs";
import { keptPorts, keptSecrets } from "./secrets.mjs";
import { createSupervisor } from "./supervisor.mjs";
import { Problem, say, tellFailure } from "./words.mjs";

/** Everything that must be ended, filled in as the start goes on. */
const house = {
  lock: null,
  supervisor: null,
  cluster: null,
  children: [],
  address: null,
  hasDemo: false,
  stopping: false,
};

/** Ends web server, workers, mail and PostgreSQL, in this order and within four seconds, and then this process. */
async function stop(code, reason) {
  if (house.stopping) return;
  house.stopping = true;
  const said = house.lock ? say : () => {};
  said(reason);
  house.supervisor?.hold();
  await endCommands(500);
  await Promise.all([house.supervisor?.end("web", 1_300), house.supervisor?.end("worker", 1_300)]);
  await house.supervisor?.end("mail", 300);
  await endServers(1_000);
  house.lock?.release();
  said("Everything has ended.");
  process.exit(code);
}

function checkRights(dataDir) {
  try {
    accessSync(treeDir, constants.R_OK | constants.W_OK | constants.X_OK);
  } catch {
    throw new Problem(`This account may not write to ${treeDir}, where packages, build and data are kept.`);
  }
  ensureDataDir(join(treeDir, ".data"));
  ensureDataDir(dataDir);
}

async function takeHouse(dataDir) {
  const lock = takeLock(join(dataDir, "start.lock"));
  if (!lock.taken) {
    const where = lock.holder.address ? ` at ${lock.holder.address}` : "";
    throw new Problem(`Dwellbook already runs from this folder${where} (process ${lock.holder.pid}).`);
  }
  house.lock = lock;
  await endLeftovers(lock.before);
}

/** Writes down what runs, for a second start to name and for a later one to clear up. */
function noteState() {
  if (!house.stopping) house.lock?.amend({ address: house.address, children: house.children });
}

async function prepareDatabase(dataDir, env) {
  if (env.DATABASE_URL) {
    say("Using the database in DATABASE_URL.");
    return {
      databaseUrl: env.DATABASE_URL,
      ownerUrl: env.DATABASE_OWNER_URL || env.DATABASE_URL,
      outside: true,
    };
  }
  say("Making sure of PostgreSQL …");
  const cluster = await ensureCluster({ dataDir });
  house.cluster = cluster;
  say(`PostgreSQL ${cluster.adopted ? "was running" : "runs"} on loopback port ${cluster.port}.`);
  return { databaseUrl: cluster.databaseUrl, ownerUrl: cluster.ownerUrl, outside: false };
}

async function fillDemo(env, outside) {
  if (outside && env.DWELLBOOK_DEMO !== "1" && !(await hasNoPeople(env.DATABASE_URL))) return;
  say("Preparing the demo (all of it invented) …");
  await seedDemo(env);
  protectAccess(env.DWELLBOOK_DATA_DIR);
  house.hasDemo = true;
}

/** PostgreSQL is watched too; on the same port it comes back, on another one the others could not find it. */
function watchCluster(dataDir) {
  let busy = false;
  const look = async () => {
    if (busy || house.stopping || isAlive(house.cluster.pid)) return;
    busy = true;
    say("PostgreSQL ended; starting it again.");
    const { port } = house.cluster;
    house.cluster = await ensureCluster({ dataDir });
    if (house.cluster.port !== port) throw new Problem("PostgreSQL's port was taken meanwhile; start again.");
    busy = false;
  };
  setInterval(() => look().catch(fail), 500).unref();
}

async function start() {
  const dataDir = dataDirOf();
  const asked = readPort(process.env.PORT);
  workerCount(process.env.DWELLBOOK_WORKERS);
  checkRights(dataDir);
  await takeHouse(dataDir);
  const { port, insteadOf } = await chooseWebPort(asked);
  if (insteadOf) say(`Port ${insteadOf} is taken by another program; using ${port}.`);
  await ensureNodeModules();
  const { outside, ...urls } = await prepareDatabase(dataDir, process.env);
  const mail = process.env.SMTP_URL ? null : await keptPorts(dataDir);
  const secrets = keptSecrets(dataDir);
  const env = childEnvironment({ surroundings: process.env, dataDir, port, ...urls, secrets, mail });
  say("Bringing the database up to date …");
  await migrate(env);
  // Neither needs the other, and each keeps about one core busy.
  await Promise.all([fillDemo(env, outside), ensureBuild(env)]);
  // The build may have taken a minute, in which another program can have come.
  await chooseWebPort(port);
  await startAndWait({ env, dataDir, port, mail });
}

async function startAndWait({ env, dataDir, port, mail }) {
  if (house.stopping) return;
  say("Starting web server, workers and mail …");
  house.address = `http://127.0.0.1:${port}`;
  const logDir = join(dataDir, "logs");
  ensureFolder(logDir);
  const onChange = (children) => {
    house.children = children;
    noteState();
  };
  house.supervisor = createSupervisor({ logDir, onChange });
  if (house.cluster) watchCluster(dataDir);
  for (const part of productParts(env, mail)) house.supervisor.keep({ command: process.execPath, ...part });
  const health = await waitForHealth(house.address, 120_000, () => house.stopping);
  if (house.stopping) return;
  if (!health.ok) {
    const words = house.supervisor.lastWords("web server");
    throw new Problem(
      `Dwellbook did not get well within two minutes: ${health.words}.\nThe web server's last words:\n${words}`,
    );
  }
  const mailPage = mail ? env.DWELLBOOK_MAIL_PAGE_URL : undefined;
  process.stdout.write(
    `${readyWords({ address: house.address, mailPage, dataDir, hasDemo: house.hasDemo })}\n`,
  );
}

function fail(error) {
  if (house.stopping) return;
  tellFailure(error);
  void stop(1, "Ending what was started …");
}

/** Sets everything up, runs the product and stays with it until a signal ends it. */
export function runProduct() {
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) {
    process.on(signal, () => void stop(0, `Ending (${signal}) …`));
  }
  process.on("uncaughtException", fail);
  process.on("unhandledRejection", fail);
  whenGone(keepers(), () => void stop(0, "npm has gone; ending …"));
  start().catch(fail);
}
