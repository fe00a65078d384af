import { spawn } from "node:child_process";
import { closeSync, existsSync, mkdirSync, openSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { tailOf } from "./commands.mjs";
import { Problem, say } from "./words.mjs";

const aptEnv = { ...process.env, DEBIAN_FRONTEND: "noninteractive", LC_ALL: "C.UTF-8" };

/** Debian would make and start a cluster of its own beside the package; ours is enough. */
const clusterSettings = "/etc/postgresql-common/createcluster.d";
const clusterSetting = `${clusterSettings}/dwellbook.conf`;

/**
 * Installs Debian packages. Needs root and apt-get; anything else is told in a sentence.
 * @param {readonly string[]} names
 * @param {string} purpose completes "… is needed for"
 */
export async function installPackages(names, purpose) {
  const list = names.join(" and ");
  if (!existsSync("/usr/bin/apt-get")) {
    throw new Problem(
      `${list} is needed for ${purpose} and is not installed; without apt-get you must install it.`,
    );
  }
  if (process.getuid?.() !== 0) {
    throw new Problem(
      `${list} is needed for ${purpose} and is not installed. Installing needs root: run "apt-get install ${names.join(" ")}" as root, then start again.`,
    );
  }
  say(`Installing Debian's ${list} for ${purpose} …`);
  let result = await aptInstall(names);
  if (result.code !== 0) {
    // A fresh machine has no package lists yet, an old one has stale ones.
    say("Refreshing the package lists …");
    await aptGet(["update", "-qq"]);
    result = await aptInstall(names);
  }
  if (result.code !== 0) {
    throw new Problem(`Debian's ${list} could not be installed:\n${tailOf(result.words)}`);
  }
}

async function aptInstall(names) {
  // Another apt-get may hold dpkg's lock: wait for it in turn.
  const options = ["-y", "-qq", "--no-install-recommends", "-o", "DPkg::Lock::Timeout=300"];
  return await aptGet(["install", ...options, ...names]);
}

/**
 * Runs apt-get with its words in a file and in a session of its own: a stop of ours must not leave dpkg half done.
 * @returns {Promise<{ code: number, words: string }>}
 */
function aptGet(args) {
  const path = join(tmpdir(), `dwellbook-apt-get-${process.pid}.log`);
  const log = openSync(path, "w", 0o600);
  return new Promise((done) => {
    const child = spawn("apt-get", args, { env: aptEnv, detached: true, stdio: ["ignore", log, log] });
    const finish = (code) => {
      closeSync(log);
      const words = readFileSync(path, "utf8");
      rmSync(path, { force: true });
      done({ code, words });
    };
    child.on("error", () => finish(-1));
    child.on("close", (code) => finish(code ?? -1));
  });
}

/** Installs PostgreSQL without a cluster of Debian's own. An existing installation keeps whatever it has. */
export async function installPostgres() {
  const ours = process.getuid?.() === 0 && !existsSync(clusterSetting);
  if (ours) {
    mkdirSync(clusterSettings, { recursive: true });
    writeFileSync(clusterSetting, "create_main_cluster = false\n");
  }
  try {
    await installPackages(["postgresql"], "the database");
  } finally {
    if (ours) rmSync(clusterSetting, { force: true });
  }
}
