import { createReadStream } from "node:fs";
import { createServer } from "node:http";
import { join } from "node:path";
import { treeDir } from "../folders.mjs";
import { listPage, mailPage, sentencePage } from "./pages.mjs";
import { attachmentBytes } from "./parse.mjs";
import { isMailId } from "./store.mjs";
import { style } from "./style.mjs";

const fonts = {
  "/fonts/text.woff2": "atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2",
  "/fonts/figures.woff2":
    "atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2",
};
const pagePolicy =
  "default-src 'none'; style-src 'self'; font-src 'self'; img-src 'self' data:; frame-src 'self'; form-action 'self'; base-uri 'none'; frame-ancestors 'none'";
/** What a mail's own HTML may do: show itself. No scripts, no requests, no origin. */
const mailPolicy =
  "default-src 'none'; style-src 'unsafe-inline'; img-src data:; form-action 'none'; frame-ancestors 'self'; sandbox allow-popups allow-popups-to-escape-sandbox";

function send(response, status, type, body, headers = {}) {
  response.writeHead(status, {
    "Content-Type": type,
    "X-Content-Type-Options": "nosniff",
    "Referrer-Policy": "no-referrer",
    "Cache-Control": "no-store",
    "Content-Security-Policy": pagePolicy,
    ...headers,
  });
  response.end(body);
  return true;
}

const sendPage = (response, status, html) => send(response, status, "text/html; charset=utf-8", html);
const sendJson = (response, status, value) =>
  send(response, status, "application/json; charset=utf-8", JSON.stringify(value, null, 2));

/**
 * A mail as the outside sees it: its recipients are those of the envelope, so hidden ones show too.
 * @param {any} mail
 */
export function presentMail(mail) {
  const { envelopeFrom, envelopeTo, fromHeader, ...rest } = mail;
  return { ...rest, from: fromHeader || envelopeFrom, to: envelopeTo };
}

const brief = ({ id, from, to, subject, messageId, receivedAt, method }) => {
  return { id, from, to, subject, messageId, receivedAt, method };
};

/**
 * Whether a mail has the words in its subject or in one of its addresses.
 * @param {{ subject: string, to: string[], from: string }} mail
 * @param {string} words
 */
export function matches(mail, words) {
  return [mail.subject, mail.from, ...mail.to].some((text) =>
    text.toLowerCase().includes(words.toLowerCase()),
  );
}

async function sendPart(response, store, mail, part) {
  if (part === "/html" && mail.html) {
    // Links open beside the mail, never inside its frame.
    const html = `<!doctype html><meta charset="utf-8"><base target="_blank">${mail.html}`;
    return send(response, 200, "text/html; charset=utf-8", html, { "Content-Security-Policy": mailPolicy });
  }
  const at = Number(/^\/attachments\/(\d{1,3})$/.exec(part)?.[1] ?? -1);
  const facts = mail.attachments[at];
  const bytes = facts ? await attachmentBytes(await store.rawOf(mail.id), at) : null;
  if (bytes === null) return null;
  const type = facts.type === "text/calendar" ? "text/calendar; charset=utf-8" : "application/octet-stream";
  const name = encodeURIComponent(facts.name.replace(/[/\\]/g, "_")).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16)}`,
  );
  return send(response, 200, type, bytes, { "Content-Disposition": `attachment; filename*=UTF-8''${name}` });
}

async function sendMail(response, store, path, bookUrl) {
  const [, id, part] = /^\/messages\/([0-9a-f-]+)(\.json|\.eml|\/.*)?$/.exec(path) ?? [];
  const kept = id && isMailId(id) ? store.find(id) : null;
  if (kept === null) return null;
  const mail = presentMail(kept);
  if (part === ".json") return sendJson(response, 200, mail);
  if (part === ".eml") {
    const headers = { "Content-Disposition": `attachment; filename="${id}.eml"` };
    return send(response, 200, "message/rfc822", await store.rawOf(id), headers);
  }
  if (part !== undefined) return sendPart(response, store, kept, part);
  const at = store.mails.indexOf(kept);
  const [newer, older] = [store.mails[at - 1]?.id ?? null, store.mails[at + 1]?.id ?? null];
  return sendPage(response, 200, mailPage({ mail, newer, older, bookUrl }));
}

async function answer(request, response, store, bookUrl) {
  const url = new URL(`http://mail-fake${request.url}`);
  const path = url.pathname;
  if (request.method !== "GET")
    return sendPage(response, 405, sentencePage("This page can only be read.", bookUrl));
  if (path === "/style.css") return send(response, 200, "text/css; charset=utf-8", style);
  if (path in fonts) {
    response.writeHead(200, { "Content-Type": "font/woff2", "Cache-Control": "max-age=86400" });
    return createReadStream(join(treeDir, "node_modules/@fontsource-variable", fonts[path]))
      .on("error", () => response.destroy())
      .pipe(response);
  }
  if (path === "/" || path === "/messages.json") {
    const words = (url.searchParams.get("q") ?? "").trim();
    const mails = store.mails.map((mail) => presentMail(mail)).filter((mail) => matches(mail, words));
    if (path !== "/") return sendJson(response, 200, mails.map(brief));
    const start = Math.max(0, Math.floor(Number(url.searchParams.get("from")) || 0));
    return sendPage(response, 200, listPage({ mails, start, words, bookUrl }));
  }
  return (
    (await sendMail(response, store, path, bookUrl)) ??
    sendPage(response, 404, sentencePage("There is no such mail here.", bookUrl))
  );
}

/** Only this machine's own names: a page elsewhere must not reach the mails by a name that points here. */
const localHost = (host) => /^(localhost|127\.0\.0\.1|\[::1\])(:\d+)?$/.test(host ?? "");

/**
 * The reading side: pages and JSON.
 * @param {any} store
 * @param {string | undefined} bookUrl the product's address
 */
export function createMailPages(store, bookUrl) {
  return createServer((request, response) => {
    if (!localHost(request.headers.host)) {
      send(response, 403, "text/plain; charset=utf-8", "Only by the address localhost or 127.0.0.1.\n");
      return;
    }
    answer(request, response, store, bookUrl).catch((error) => {
      console.error(error);
      if (!response.headersSent)
        sendPage(response, 500, sentencePage("The mail fake stumbled; its log says why.", bookUrl));
      else response.destroy();
    });
  });
}
