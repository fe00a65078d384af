import { chmodSync, existsSync } from "node:fs";
import { join } from "node:path";
import { readJson } from "./folders.mjs";

/**
 * The demo sign-ins as a table for people; tokens stay in the file.
 * @param {unknown} entries what demo-access.json holds
 * @returns {string} empty when there is nothing to show
 */
export function accessTable(entries) {
  if (!Array.isArray(entries) || entries.length === 0) return "";
  const header = ["Name", "Role", "E-mail", "Password"];
  const rows = entries.map((entry) => [entry.name, entry.role, entry.email, entry.password].map(String));
  const widths = header.map((title, at) => Math.max(title.length, ...rows.map((row) => row[at].length)));
  const line = (cells) => `  ${cells.map((cell, at) => cell.padEnd(widths[at])).join("   ")}`.trimEnd();
  return [line(header), line(widths.map((width) => "-".repeat(width))), ...rows.map(line)].join("\n");
}

const accessFile = (dataDir) => join(dataDir, "demo-access.json");

/**
 * Closes the file of demo sign-ins to other accounts: it holds passwords and tokens.
 * @param {string} dataDir
 */
export function protectAccess(dataDir) {
  if (existsSync(accessFile(dataDir))) chmodSync(accessFile(dataDir), 0o600);
}

/**
 * Reads the demo sign-ins of a data folder as a table.
 * @param {string} dataDir
 */
export function readAccessTable(dataDir) {
  return accessTable(readJson(accessFile(dataDir)));
}
