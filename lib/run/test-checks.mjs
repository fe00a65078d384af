import { rmSync } from "node:fs";
import { join } from "node:path";
import { runShown } from "./commands.mjs";
import { readJson, treeDir } from "./folders.mjs";
import { countReport } from "./test-summary.mjs";
import { say } from "./words.mjs";

const program = (...path) => join(treeDir, "node_modules", ...path);
const limitMs = 900_000;

/**
 * Runs one of the packages' programs and shows what it says.
 * @param {string} title
 * @param {readonly string[]} args the program and its arguments
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<number>} its exit code
 */
async function runNode(title, args, env) {
  say(`${title} …`);
  const code = await runShown(process.execPath, args, { cwd: treeDir, env, limitMs });
  say(`${title}: ${code === 0 ? "passed" : `failed (${code})`}.`);
  return code;
}

const asCount = (code) => (code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 });

/**
 * Biome over the whole tree, as one check.
 * @param {NodeJS.ProcessEnv} env
 */
export async function lint(env) {
  const args = [program("@biomejs/biome/bin/biome"), "check", "."];
  return asCount(await runNode("Lint and format", args, env));
}

/**
 * The compiler over the whole tree, as one check. Next writes the types of its routes first.
 * @param {NodeJS.ProcessEnv} env
 */
export async function checkTypes(env) {
  const written = await runNode("Route types", [program("next/dist/bin/next"), "typegen"], env);
  if (written !== 0) return asCount(written);
  return asCount(await runNode("Types", [program("typescript/bin/tsc"), "--noEmit"], env));
}

/**
 * Runs vitest and counts its tests.
 * @param {string} title
 * @param {string} name of the report
 * @param {readonly string[]} filters
 * @param {NodeJS.ProcessEnv} env
 * @param {string} reportDir
 */
export async function runVitest(title, name, filters, env, reportDir) {
  const report = join(reportDir, `${name}.json`);
  rmSync(report, { force: true });
  const args = [program("vitest/vitest.mjs"), "run", ...filters];
  args.push("--reporter=default", "--reporter=json", `--outputFile.json=${report}`);
  const code = await runNode(title, args, env);
  return countReport(readJson(report), code);
}
