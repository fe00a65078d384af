// npm run bench: sets up the packages and hands over to tests/bench.
import { nodeVersionProblem } from "./version.mjs";

async function main() {
  const { join } = await import("node:path");
  const { endCommands, runShown } = await import("./commands.mjs");
  const { ensureDataDir, treeDir } = await import("./folders.mjs");
  const { ensureNodeModules } = await import("./node-modules.mjs");
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) {
    process.on(signal, () => endCommands(500).then(() => process.exit(1)));
  }
  ensureDataDir(join(treeDir, ".data"));
  await ensureNodeModules();
  const args = ["--import", "tsx", join(treeDir, "tests", "bench", "bench.ts"), ...process.argv.slice(2)];
  const code = await runShown(process.execPath, args, { cwd: treeDir, env: { ...process.env, TZ: "UTC" } });
  process.exitCode = code === 0 ? 0 : 1;
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
