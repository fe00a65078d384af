import { existsSync, readdirSync, realpathSync } from "node:fs";
import { dirname, join } from "node:path";
import { run } from "./commands.mjs";
import { installPostgres } from "./packages.mjs";
import { Problem } from "./words.mjs";

const debianRoot = "/usr/lib/postgresql";
const needed = ["postgres", "initdb", "psql", "pg_controldata"];
const oldestMajor = 15;

/**
 * Orders the majors found: the asked one only, else 15 first and then the newest.
 * @param {readonly number[]} majors
 * @param {number | null} wanted
 * @returns {number[]}
 */
export function orderMajors(majors, wanted) {
  if (wanted !== null) return majors.filter((major) => major === wanted);
  const fit = majors.filter((major) => major >= oldestMajor);
  return fit.sort((a, b) => Number(b === oldestMajor) - Number(a === oldestMajor) || b - a);
}

const complete = (folder) => needed.every((name) => existsSync(join(folder, name)));

function debianMajors() {
  try {
    return readdirSync(debianRoot).map(Number).filter(Number.isInteger);
  } catch {
    return [];
  }
}

/** The folders on PATH with PostgreSQL's programs, with links resolved: initdb looks for its files beside itself. */
function pathFolders() {
  const folders = (process.env.PATH ?? "").split(":").filter((folder) => folder !== "");
  const found = folders.filter((folder) => existsSync(join(folder, "postgres")));
  return found.map((folder) => dirname(realpathSync(join(folder, "postgres"))));
}

async function majorOf(folder) {
  const { out } = await run(join(folder, "postgres"), ["--version"]);
  return Number(/(\d+)/.exec(out)?.[1] ?? 0);
}

async function find(wanted) {
  for (const major of orderMajors(debianMajors(), wanted)) {
    const folder = join(debianRoot, String(major), "bin");
    if (complete(folder)) return { folder, major };
  }
  for (const folder of pathFolders().filter(complete)) {
    const major = await majorOf(folder);
    if (orderMajors([major], wanted).length > 0) return { folder, major };
  }
  return null;
}

/**
 * Finds PostgreSQL's programs, and installs Debian's if there are none.
 * @param {number | null} wanted the major version an existing cluster needs
 * @returns {Promise<{ folder: string, major: number }>}
 */
export async function ensurePostgresPrograms(wanted = null) {
  const present = await find(wanted);
  if (present) return present;
  if (wanted !== null && wanted !== undefined && (await find(null))) {
    throw new Problem(
      `The database was made by PostgreSQL ${wanted}, whose programs are no longer installed.`,
    );
  }
  await installPostgres();
  const installed = await find(wanted);
  if (installed) return installed;
  throw new Problem(
    `PostgreSQL ${wanted ?? oldestMajor} was not found, even after installing Debian's package.`,
  );
}
