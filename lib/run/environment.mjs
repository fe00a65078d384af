import { availableParallelism } from "node:os";
import { Problem } from "./words.mjs";

/**
 * How many worker processes to run: DWELLBOOK_WORKERS, else one for each core.
 * @param {string | undefined} text
 * @param {number} cores
 */
export function workerCount(text, cores = availableParallelism()) {
  if (text === undefined || text.trim() === "") return cores;
  const count = Number(text);
  if (!/^\d+$/.test(text.trim()) || count < 1 || count > 64) {
    throw new Problem(`DWELLBOOK_WORKERS must be a whole number from 1 to 64, not "${text}".`);
  }
  return count;
}

/**
 * The environment that every part of the product is started with. What the surroundings set stands.
 * @param {{ surroundings: Record<string, string | undefined>, dataDir: string, port: number, databaseUrl: string, ownerUrl: string,
 *   secrets: { session: string, link: string }, mail: { smtp: number, mailPage: number } | null }} parts
 *   mail is null when SMTP_URL replaces the mail fake
 * @returns {Record<string, string | undefined>}
 */
export function childEnvironment(parts) {
  const { surroundings, dataDir, port, databaseUrl, ownerUrl, secrets, mail } = parts;
  const baseUrl = surroundings.DWELLBOOK_BASE_URL || `http://127.0.0.1:${port}`;
  const env = {
    ...surroundings,
    NODE_ENV: "production",
    NEXT_TELEMETRY_DISABLED: "1",
    TZ: "UTC",
    PORT: String(port),
    DATABASE_URL: databaseUrl,
    DATABASE_OWNER_URL: ownerUrl,
    DWELLBOOK_DATA_DIR: dataDir,
    DWELLBOOK_BASE_URL: baseUrl,
    DWELLBOOK_LINK_SECRET: surroundings.DWELLBOOK_LINK_SECRET || secrets.link,
    NEXTAUTH_URL: surroundings.NEXTAUTH_URL || baseUrl,
    NEXTAUTH_SECRET: surroundings.NEXTAUTH_SECRET || secrets.session,
  };
  // Only for developers' builds beside a running server; ours is always the usual folder.
  delete env.NEXT_DIST_DIR;
  if (mail === null) return env;
  return {
    ...env,
    SMTP_URL: `smtp://127.0.0.1:${mail.smtp}`,
    DWELLBOOK_MAIL_PAGE_URL: `http://127.0.0.1:${mail.mailPage}`,
  };
}
