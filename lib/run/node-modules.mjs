import { createHash } from "node:crypto";
import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { run, tailOf } from "./commands.mjs";
import { readJson, treeDir } from "./folders.mjs";
import { withLock } from "./lock.mjs";
import { Problem, say } from "./words.mjs";

/**
 * Whether what npm says it installed is what the lock file asks for. Optional packages may be missing: they are for
 * other machines.
 * @param {any} wanted package-lock.json
 * @param {any} installed node_modules/.package-lock.json
 */
export function installMatches(wanted, installed) {
  if (!wanted?.packages || !installed?.packages) return false;
  const names = Object.keys(wanted.packages).filter((name) => name !== "");
  if (names.length === 0) return false;
  const same = (name) => {
    const have = installed.packages[name];
    if (have === undefined) return wanted.packages[name].optional === true;
    return have.version === wanted.packages[name].version;
  };
  return names.every(same) && Object.keys(installed.packages).every((name) => name in wanted.packages);
}

function npmCommand() {
  const beside = join(dirname(process.execPath), "npm");
  return existsSync(beside) ? beside : "npm";
}

async function install() {
  say("Installing the Node packages …");
  const env = { ...process.env };
  // In production mode npm would leave out what the build and the tests need.
  delete env.NODE_ENV;
  const args = ["ci", "--include=dev", "--no-audit", "--no-fund", "--loglevel=error"];
  const result = await run(npmCommand(), args, { cwd: treeDir, env });
  if (result.code !== 0) {
    throw new Problem(`The Node packages could not be installed:\n${tailOf(result.err || result.out)}`);
  }
}

/** Makes sure that node_modules holds what package-lock.json names. The mark lies in node_modules and goes with it. */
export async function ensureNodeModules() {
  const lockText = readFileSync(join(treeDir, "package-lock.json"), "utf8");
  const hash = createHash("sha256").update(lockText).digest("hex");
  const mark = join(treeDir, "node_modules", ".dwellbook-installed");
  const marked = () => existsSync(mark) && readFileSync(mark, "utf8") === hash;
  if (marked()) return;
  await withLock(
    join(treeDir, ".data", "packages.lock"),
    async () => {
      if (marked()) return;
      const installed = readJson(join(treeDir, "node_modules", ".package-lock.json"));
      if (!installMatches(JSON.parse(lockText), installed)) await install();
      writeFileSync(mark, hash);
    },
    900_000,
  );
}
