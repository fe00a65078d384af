import { createHash } from "node:crypto";
import { chownSync, mkdirSync } from "node:fs";
import { join } from "node:path";
import { run } from "./commands.mjs";
import { ensureFolder } from "./folders.mjs";
import { Problem } from "./words.mjs";

/**
 * The account PostgreSQL runs as: under root Debian's "postgres", else one's own.
 * @returns {Promise<{ uid: number, gid: number } | null>} null for one's own
 */
export async function serverAccount() {
  if (process.getuid?.() !== 0) return null;
  const [uid, gid] = await Promise.all([run("id", ["-u", "postgres"]), run("id", ["-g", "postgres"])]);
  if (uid.code !== 0 || gid.code !== 0) {
    throw new Problem(
      "PostgreSQL must not run as root, and there is no account named postgres to run it as.",
    );
  }
  return { uid: Number(uid.out), gid: Number(gid.out) };
}

/**
 * Spawn options that give up root for good: Node also drops the supplementary groups.
 * @param {{ uid: number, gid: number } | null} account
 * @param {string} cwd a folder that account may enter
 */
export function asAccount(account, cwd) {
  const env = { PATH: process.env.PATH ?? "/usr/bin:/bin", LC_ALL: "C.UTF-8", TZ: "UTC" };
  return account === null ? { cwd, env } : { cwd, env, ...account };
}

/** Whether the account can reach a folder; asked of the kernel, for every parent has a say. */
async function reaches(account, folder) {
  if (account === null) return true;
  const { code } = await run("/bin/sh", ["-c", 'cd "$1"', "sh", folder], { ...asAccount(account, "/") });
  return code === 0;
}

/**
 * The folder that holds a cluster: in the data folder where the account can get there, else under /var/lib. The name
 * there depends on the path and on a random word of this data folder, so a new tree at an old path starts anew.
 * @param {{ account: { uid: number, gid: number } | null, dataDir: string, folder: string, instance: string }} where
 * @returns {Promise<string>}
 */
export async function chooseHome({ account, dataDir, folder, instance }) {
  if (await reaches(account, dataDir)) return join(dataDir, folder);
  const name = createHash("sha256").update(`${dataDir}\0${folder}\0${instance}`).digest("hex").slice(0, 16);
  ensureFolder("/var/lib/dwellbook", 0o755);
  return join("/var/lib/dwellbook", name);
}

/**
 * Makes the folder, owned by the account and closed to everybody else.
 * @param {{ uid: number, gid: number } | null} account
 * @param {string} home
 */
export function ensureHome(account, home) {
  mkdirSync(home, { recursive: true, mode: 0o700 });
  if (account !== null) chownSync(home, account.uid, account.gid);
}
