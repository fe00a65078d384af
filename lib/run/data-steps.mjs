import { join } from "node:path";
import { run, tailOf } from "./commands.mjs";
import { treeDir } from "./folders.mjs";
import { Problem, say } from "./words.mjs";

/**
 * Runs one of the project's TypeScript programs to its end, showing its lines as progress.
 * @param {readonly string[]} path parts below the root
 * @param {NodeJS.ProcessEnv} env
 * @param {string} failure the sentence for a failure
 * @param {(sentence: string) => void} [tell]
 */
export async function runProgram(path, env, failure, tell = say) {
  const args = ["--import", "tsx", join(treeDir, ...path)];
  const onLine = (line) => line.trim() !== "" && tell(`  ${line.trim()}`);
  const result = await run(process.execPath, args, { cwd: treeDir, env, onLine });
  if (result.code !== 0) throw new Problem(`${failure}\n${tailOf(result.err || result.out, 30)}`);
}

/**
 * Brings a database to the newest schema.
 * @param {NodeJS.ProcessEnv} env
 */
export async function migrate(env) {
  await runProgram(["db", "migrate.ts"], env, "The database could not be brought up to date:");
}

/**
 * Seeds the invented demo, or refreshes its element sets.
 * @param {NodeJS.ProcessEnv} env
 */
export async function seedDemo(env) {
  await runProgram(["seed", "demo.ts"], env, "The demo could not be written:");
}

/**
 * Whether an outside database has nobody in it yet: only then may a demo go there.
 * @param {string} databaseUrl
 * @returns {Promise<boolean>}
 */
export async function hasNoPeople(databaseUrl) {
  // Loaded here, for the packages may not have been installed when this file was.
  const { default: pg } = await import("pg");
  const client = new pg.Client({ connectionString: databaseUrl, connectionTimeoutMillis: 10_000 });
  try {
    await client.connect();
    const { rows } = await client.query("select exists (select from people) as found");
    return rows[0].found === false;
  } catch (error) {
    throw new Problem(`The database in DATABASE_URL cannot be read: ${error.message}.`);
  } finally {
    await client.end().catch(() => {});
  }
}
