import { createHash } from "node:crypto";
import { existsSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { join } from "node:path";
import { run, tailOf } from "./commands.mjs";
import { readJson, treeDir, writeJson } from "./folders.mjs";
import { withLock } from "./lock.mjs";
import { Problem, say } from "./words.mjs";

const folders = ["app", "db", "lib", "public"];
const files = [
  "package.json",
  "package-lock.json",
  "next.config.mjs",
  "postcss.config.mjs",
  "tailwind.config.ts",
  "proxy.ts",
  "instrumentation.ts",
];

function listFiles(folder) {
  if (!existsSync(folder)) return [];
  const entries = readdirSync(folder, { withFileTypes: true, recursive: true });
  return entries.filter((entry) => entry.isFile()).map((entry) => join(entry.parentPath, entry.name));
}

function hashOf(root, paths) {
  const hash = createHash("sha256");
  for (const path of paths.sort()) {
    if (existsSync(path))
      hash
        .update(`${path.slice(root.length)}\0`)
        .update(readFileSync(path))
        .update("\0");
  }
  return hash.digest("hex");
}

/**
 * What a build depends on, as two hashes. tsconfig.json stands apart because Next may rewrite it while it builds.
 * @param {string} root
 */
export function sourceMark(root) {
  const ours = join(root, "lib", "run");
  const paths = folders.flatMap((folder) => listFiles(join(root, folder)));
  const sources = paths
    .filter((path) => !path.startsWith(ours))
    .concat(files.map((name) => join(root, name)));
  return { sources: hashOf(root, sources), compiler: hashOf(root, [join(root, "tsconfig.json")]) };
}

const sameMark = (one, other) => one?.sources === other.sources && one?.compiler === other.compiler;

/**
 * Builds the web application when its sources have changed since the last build; the mark lies beside the output.
 * @param {NodeJS.ProcessEnv} env
 */
export async function ensureBuild(env) {
  const markPath = join(treeDir, ".next", "dwellbook-built.json");
  const current = () =>
    existsSync(join(treeDir, ".next", "BUILD_ID")) && sameMark(readJson(markPath), sourceMark(treeDir));
  if (current()) return;
  await withLock(
    join(treeDir, ".data", "build.lock"),
    async () => {
      if (current()) return;
      say("Building the web application (about a minute, only when the sources have changed) …");
      const before = sourceMark(treeDir);
      rmSync(markPath, { force: true });
      const next = join(treeDir, "node_modules", "next", "dist", "bin", "next");
      const result = await run(process.execPath, [next, "build"], {
        cwd: treeDir,
        env: { ...env, NODE_ENV: "production", NEXT_TELEMETRY_DISABLED: "1" },
      });
      if (result.code !== 0) {
        throw new Problem(
          `The web application could not be built:\n${tailOf(`${result.out}\n${result.err}`, 40)}`,
        );
      }
      writeJson(markPath, { sources: before.sources, compiler: sourceMark(treeDir).compiler });
    },
    900_000,
  );
}
