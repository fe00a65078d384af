import { join } from "node:path";
import { readAccessTable } from "./access.mjs";
import { workerCount } from "./environment.mjs";
import { treeDir } from "./folders.mjs";

/**
 * The processes of the product, in the order they start: mail fake, workers, web server.
 * @param {NodeJS.ProcessEnv} env
 * @param {{ smtp: number, mailPage: number } | null} mail null when an outside server takes the mail
 * @returns {{ name: string, args: string[], env: NodeJS.ProcessEnv }[]}
 */
export function productParts(env, mail) {
  const parts = [];
  if (mail) {
    const mailEnv = { ...env, MAIL_SMTP_PORT: String(mail.smtp), MAIL_PAGE_PORT: String(mail.mailPage) };
    parts.push({ name: "mail fake", args: [join(treeDir, "lib/run/mail-fake/main.mjs")], env: mailEnv });
  }
  for (let at = 1; at <= workerCount(env.DWELLBOOK_WORKERS); at += 1) {
    const args = ["--import", "tsx", join(treeDir, "lib/jobs/worker-main.ts")];
    parts.push({ name: `worker ${at}`, args, env });
  }
  const next = join(treeDir, "node_modules/next/dist/bin/next");
  parts.push({ name: "web server", args: [next, "start", "-H", "127.0.0.1", "-p", env.PORT ?? ""], env });
  return parts;
}

/**
 * What is said once everything works: the addresses and the demo sign-ins, never a token.
 * @param {{ address: string, mailPage: string | undefined, dataDir: string, hasDemo: boolean }} product hasDemo is false
 *   for an outside database with people of its own: the sign-ins kept here are not theirs
 */
export function readyWords({ address, mailPage, dataDir, hasDemo }) {
  const lines = ["", `Dwellbook is ready: ${address}`];
  if (mailPage) lines.push(`Its mail, which stays on this machine: ${mailPage}`);
  const table = hasDemo ? readAccessTable(dataDir) : "";
  if (table !== "") lines.push("", "Demo sign-ins:", table);
  lines.push("", `Logs are in ${join(dataDir, "logs")}. Ctrl-C ends all of it.`, "");
  return lines.join("\n");
}
