import { randomBytes } from "node:crypto";
import { chmodSync, mkdirSync, readFileSync, renameSync, writeFileSync } from "node:fs";
import { dirname, join, resolve } from "node:path";
import { fileURLToPath } from "node:url";
import { Problem } from "./words.mjs";

/** The root of the tree this file lies in. */
export const treeDir = resolve(dirname(fileURLToPath(import.meta.url)), "..", "..");

/**
 * The folder for everything a running Dwellbook keeps, absolute: DWELLBOOK_DATA_DIR, else .data in the tree.
 * @param {NodeJS.ProcessEnv} env
 */
export function dataDirOf(env = process.env) {
  return env.DWELLBOOK_DATA_DIR ? resolve(treeDir, env.DWELLBOOK_DATA_DIR) : join(treeDir, ".data");
}

/**
 * Makes a folder with exactly this mode, whatever the umask says.
 * @param {string} path
 * @param {number} mode
 */
export function ensureFolder(path, mode = 0o700) {
  try {
    mkdirSync(path, { recursive: true });
    chmodSync(path, mode);
  } catch (error) {
    throw new Problem(`The folder ${path} cannot be made or used: ${error.message}.`);
  }
}

/** Makes the data folder: others may pass through it (PostgreSQL's account does), but not list it. */
export function ensureDataDir(dataDir) {
  ensureFolder(dataDir, 0o711);
}

/**
 * Reads a JSON file; null when it does not exist or is not JSON.
 * @param {string} path
 */
export function readJson(path) {
  try {
    return JSON.parse(readFileSync(path, "utf8"));
  } catch {
    return null;
  }
}

/**
 * Writes a JSON file whole or not at all, readable by its owner only.
 * @param {string} path
 * @param {unknown} value
 */
export function writeJson(path, value) {
  const draft = `${path}.${process.pid}.${randomBytes(4).toString("hex")}`;
  writeFileSync(draft, `${JSON.stringify(value, null, 2)}\n`, { mode: 0o600 });
  renameSync(draft, path);
}

/**
 * A random word that is safe in URLs and SQL.
 * @param {number} bytes
 */
export function randomWord(bytes = 24) {
  return randomBytes(bytes).toString("hex");
}
