import { join } from "node:path";
import { randomWord, readJson, writeJson } from "./folders.mjs";
import { freePort } from "./ports.mjs";

/**
 * The secrets of this data folder, made once and kept, readable by their owner only.
 * @param {string} dataDir
 * @returns {{ session: string, link: string }} for signing sessions, and links in mails
 */
export function keptSecrets(dataDir) {
  const path = join(dataDir, "secrets.json");
  const kept = readJson(path);
  if (kept?.session && kept?.link) return kept;
  const made = { session: randomWord(32), link: randomWord(32) };
  writeJson(path, made);
  return made;
}

/**
 * Loopback ports for the mail fake, the same ones as last time where they are still free.
 * @param {string} dataDir
 * @returns {Promise<{ smtp: number, mailPage: number }>}
 */
export async function keptPorts(dataDir) {
  const path = join(dataDir, "ports.json");
  const kept = readJson(path);
  const smtp = await freePort(kept?.smtp);
  const mailPage = await freePort(kept?.mailPage === smtp ? undefined : kept?.mailPage);
  const ports = { smtp, mailPage: mailPage === smtp ? await freePort() : mailPage };
  writeJson(path, ports);
  return ports;
}
