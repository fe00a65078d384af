import { existsSync, mkdirSync, rmSync, writeFileSync } from "node:fs";
import { run, tailOf } from "./processes.mjs";
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
    await run("apt-get", ["update", "-qq"], { env: aptEnv });
    result = await aptInstall(names);
  }
  if (result.code !== 0) {
    throw new Problem(`Debian's ${list} could not be installed:\n${tailOf(result.err || result.out)}`);
  }
}

async function aptInstall(names) {
  // Another apt-get may hold dpkg's lock: wait for it in turn.
  const options = ["-y", "-qq", "--no-install-recommends", "-o", "DPkg::Lock::Timeout=300"];
  return await run("apt-get", ["install", ...options, ...names], { env: aptEnv });
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
