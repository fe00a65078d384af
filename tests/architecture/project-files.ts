import { readdirSync, readFileSync } from "node:fs";
import { join, relative, sep } from "node:path";
import { fileURLToPath } from "node:url";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));
const FOLDERS = ["app", "db", "lib", "seed", "tests"];

/** A source file of the project: its path from the root with forward slashes, and its text. */
export interface SourceFile {
  readonly path: string;
  readonly text: string;
}

/** Every TypeScript and JavaScript file of ours, the ones at the top included. */
export function projectFiles(): SourceFile[] {
  const top = readdirSync(ROOT, { withFileTypes: true })
    // Names with a dot in front are scratch or tools.
    .filter((entry) => entry.isFile() && isSource(entry.name) && !entry.name.startsWith("."))
    .map((entry) => join(ROOT, entry.name));
  const below = FOLDERS.flatMap((folder) =>
    readdirSync(join(ROOT, folder), { withFileTypes: true, recursive: true })
      .filter((entry) => entry.isFile() && isSource(entry.name))
      .map((entry) => join(entry.parentPath, entry.name)),
  );
  return [...top, ...below]
    .map((path) => ({ path: relative(ROOT, path).split(sep).join("/"), text: readFileSync(path, "utf8") }))
    .filter(({ path }) => path !== "next-env.d.ts");
}

function isSource(name: string): boolean {
  return /\.(ts|tsx|mts|cts|mjs|cjs|js|jsx)$/.test(name);
}
