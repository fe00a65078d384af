import { spawn } from "node:child_process";
import { createWriteStream, rmSync } from "node:fs";
import { join } from "node:path";
import { createInterface } from "node:readline";
import { ensureDataDir, readJson, treeDir } from "./folders.mjs";
import { freePort } from "./ports.mjs";
import { discardCluster } from "./postgres.mjs";
import { isAlive, signalProcess, waitUntil } from "./processes.mjs";
import { Problem, say } from "./words.mjs";

/** Settings of the surroundings that would lead the product under test away from its own parts. */
const strange = [
  "DATABASE_URL",
  "DATABASE_OWNER_URL",
  "SMTP_URL",
  "DWELLBOOK_BASE_URL",
  "NEXTAUTH_URL",
  "NEXTAUTH_SECRET",
  "DWELLBOOK_LINK_SECRET",
  "NEXT_DIST_DIR",
];

/**
 * The surroundings without what could change the outcome of tests.
 * @param {NodeJS.ProcessEnv} env
 */
export function plainSurroundings(env) {
  return Object.fromEntries(Object.entries(env).filter(([name]) => !strange.includes(name)));
}

/**
 * Removes a test product's data, with its database wherever that lies.
 * @param {string} dataDir
 */
export async function discardProduct(dataDir) {
  await discardCluster({ dataDir });
  rmSync(dataDir, { recursive: true, force: true });
}

/** Shows the product's lines until it is ready, and keeps all of them in a file. */
function followWords(child, dataDir, onReady) {
  const log = createWriteStream(join(dataDir, "start.log"));
  let ready = false;
  for (const stream of [child.stdout, child.stderr]) {
    createInterface({ input: stream }).on("line", (line) => {
      log.write(`${line}\n`);
      if (!ready && line.trim() !== "") say(`  product: ${line.trim()}`);
      if (line.startsWith("Dwellbook is ready")) {
        ready = true;
        onReady();
      }
    });
  }
}

/**
 * Starts the whole product with fresh data on a free port, by the very command that people use.
 * @param {string} dataDir
 * @param {Record<string, string | undefined>} surroundings
 * @param {() => boolean} isEnding whether the tests are being ended: then nothing is started any more
 * @returns {Promise<{ untilReady: () => Promise<{ address: string, mailPage: string }>, stop: () => Promise<void> }>}
 */
export async function startProduct(dataDir, surroundings, isEnding) {
  await discardProduct(dataDir);
  ensureDataDir(dataDir);
  const port = await freePort();
  if (isEnding()) throw new Problem("The tests are being ended.");
  const child = spawn(process.execPath, [join(treeDir, "lib/run/start.mjs")], {
    cwd: treeDir,
    env: { ...plainSurroundings(surroundings), PORT: String(port), DWELLBOOK_DATA_DIR: dataDir },
    detached: true,
    stdio: ["ignore", "pipe", "pipe"],
  });
  let ready = false;
  followWords(child, dataDir, () => {
    ready = true;
  });
  const gone = () => !isAlive(child.pid ?? 0);
  return {
    async untilReady() {
      await waitUntil(() => ready || gone(), 600_000, 100);
      if (!ready) throw new Problem("The product did not start; its words are above.");
      const { mailPage } = readJson(join(dataDir, "ports.json"));
      return { address: `http://127.0.0.1:${port}`, mailPage: `http://127.0.0.1:${mailPage}` };
    },
    async stop() {
      signalProcess(child.pid, "SIGTERM");
      if (!(await waitUntil(gone, 6_000))) signalProcess(-child.pid, "SIGKILL");
    },
  };
}
