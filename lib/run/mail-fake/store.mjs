import { randomBytes } from "node:crypto";
import { mkdir, open, readdir, readFile, rename, rm } from "node:fs/promises";
import { join } from "node:path";
import { parseMail } from "./parse.mjs";

/** How many mails are kept; the oldest go first. */
export const capacity = 2_000;

const idPattern = /^\d{13}-[0-9a-f]{8}$/;

/** Whether a text has the form of a mail's number: only such a one may become part of a path.
 * @param {string} text
 */
export const isMailId = (text) => idPattern.test(text);

async function writeWhole(path, content) {
  const file = await open(`${path}.draft`, "w", 0o600);
  try {
    await file.writeFile(content);
    // The sender is told "accepted" after this: it must survive us.
    await file.sync();
  } finally {
    await file.close();
  }
  await rename(`${path}.draft`, path);
}

async function readKept(folder, id) {
  try {
    return JSON.parse(await readFile(join(folder, `${id}.json`), "utf8"));
  } catch {
    const raw = await readFile(join(folder, `${id}.eml`));
    const envelope = {
      id,
      receivedAt: new Date(Number(id.slice(0, 13))).toISOString(),
      envelopeFrom: "",
      envelopeTo: [],
    };
    return { ...envelope, ...(await parseMail(raw)) };
  }
}

/**
 * Opens the folder of mails and reads what is there, newest first.
 * @param {string} folder
 */
export async function openStore(folder) {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const names = await readdir(folder);
  const ids = names.filter((name) => name.endsWith(".eml")).map((name) => name.slice(0, -4));
  /** @type {any[]} */
  const mails = [];
  for (const id of ids.filter(isMailId).sort().reverse()) mails.push(await readKept(folder, id));

  async function dropOldest() {
    for (const gone of mails.splice(capacity)) {
      await rm(join(folder, `${gone.id}.eml`), { force: true });
      await rm(join(folder, `${gone.id}.json`), { force: true });
    }
  }

  return {
    mails,
    find: (id) => mails.find((mail) => mail.id === id) ?? null,
    rawOf: (id) => readFile(join(folder, `${id}.eml`)),
    /**
     * Keeps a mail; resolves when it is safe on disk.
     * @param {Buffer} raw
     * @param {{ from: string, to: string[] }} envelope
     * @param {number} nowMs
     */
    async add(raw, envelope, nowMs) {
      // Two mails of the same millisecond still get their order from the one received last.
      const lastMs = mails[0] ? Number(mails[0].id.slice(0, 13)) : 0;
      const atMs = Math.max(nowMs, lastMs + 1);
      const id = `${String(atMs).padStart(13, "0")}-${randomBytes(4).toString("hex")}`;
      const parsed = await parseMail(raw);
      const again = parsed.messageId !== null && mails.some((other) => other.messageId === parsed.messageId);
      const mail = {
        id,
        receivedAt: new Date(nowMs).toISOString(),
        envelopeFrom: envelope.from,
        envelopeTo: envelope.to,
        ...parsed,
        again,
      };
      await writeWhole(join(folder, `${id}.eml`), raw);
      await writeWhole(join(folder, `${id}.json`), JSON.stringify(mail));
      const place = mails.findIndex((other) => other.id < id);
      mails.splice(place === -1 ? mails.length : place, 0, mail);
      await dropOldest();
      return mail;
    },
  };
}
