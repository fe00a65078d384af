import { mkdtempSync, rmSync } from "node:fs";
import type { Server } from "node:http";
import { request } from "node:http";
import type { AddressInfo } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { createTransport } from "nodemailer";
import { afterAll, beforeAll, expect, test } from "vitest";
import { createMailPages } from "@/lib/run/mail-fake/http.mjs";
import { calendarMethod } from "@/lib/run/mail-fake/parse.mjs";
import { createSmtpServer } from "@/lib/run/mail-fake/smtp.mjs";
import { openStore } from "@/lib/run/mail-fake/store.mjs";
import { escapeHtml, withLinks } from "@/lib/run/mail-fake/text.mjs";

const folder = mkdtempSync(join(tmpdir(), "dwellbook-mail-"));
const calendar = "BEGIN:VCALENDAR\r\nVERSION:2.0\r\nMETHOD:CANCEL\r\nEND:VCALENDAR\r\n";
let pages: Server;
let smtp: ReturnType<typeof createSmtpServer>;
let address = "";

const portOf = (server: { address(): AddressInfo | string | null }) => (server.address() as AddressInfo).port;

beforeAll(async () => {
  const store = await openStore(folder);
  smtp = createSmtpServer(store);
  pages = createMailPages(store, "http://127.0.0.1:3000");
  await new Promise<void>((done) => smtp.listen(0, "127.0.0.1", () => done()));
  await new Promise<void>((done) => pages.listen(0, "127.0.0.1", () => done()));
  address = `http://127.0.0.1:${portOf(pages)}`;
  const transport = createTransport({ host: "127.0.0.1", port: portOf(smtp.server), secure: false });
  await transport.sendMail({
    from: "Dwellbook <book@dwellbook.invalid>",
    to: "unit@air.invalid",
    bcc: "hidden@air.invalid",
    messageId: "<one@dwellbook.invalid>",
    subject: "Scrubbed <b>QL-0412</b>",
    text: "See https://book.invalid/answer/abc.",
    html: "<p>Scrubbed</p><script>alert(1)</script>",
    icalEvent: { method: "CANCEL", filename: "dwell.ics", content: calendar },
  });
});

afterAll(async () => {
  await new Promise<void>((done) => smtp.close(() => done()));
  await new Promise((done) => pages.close(done));
  rmSync(folder, { recursive: true, force: true });
});

async function firstMail() {
  const [first] = await (await fetch(`${address}/messages.json`)).json();
  return await (await fetch(`${address}/messages/${first.id}.json`)).json();
}

test("a mail that was sent is told whole as JSON, hidden recipients too", async () => {
  const mail = await firstMail();
  expect(mail).toMatchObject({
    to: ["unit@air.invalid", "hidden@air.invalid"],
    subject: "Scrubbed <b>QL-0412</b>",
    messageId: "<one@dwellbook.invalid>",
    method: "CANCEL",
    again: false,
  });
  expect(mail.from).toContain("book@dwellbook.invalid");
  expect(mail.text).toContain("https://book.invalid/answer/abc");
  expect(mail.icalendar).toBe(calendar);
  expect(mail.headers.subject).toContain("Scrubbed");
  expect(Math.abs(Date.now() - Date.parse(mail.receivedAt))).toBeLessThan(60_000);
});

test("its page is harmless text, its HTML stays in a frame without scripts or origin", async () => {
  const { id } = await firstMail();
  const page = await (await fetch(`${address}/messages/${id}`)).text();
  expect(page).toContain("Scrubbed &lt;b&gt;QL-0412&lt;/b&gt;");
  expect(page).not.toContain("<script");
  expect(page).toContain('href="https://book.invalid/answer/abc"');
  expect(page).toMatch(/<iframe[^>]*sandbox="allow-popups allow-popups-to-escape-sandbox"/);
  const frame = await fetch(`${address}/messages/${id}/html`);
  expect(frame.headers.get("content-security-policy")).toMatch(/^default-src 'none';.*sandbox allow-popups/);
});

test("attachments come back as they were sent", async () => {
  const { id, attachments } = await firstMail();
  const at = attachments.findIndex((one: { name: string }) => one.name === "dwell.ics");
  const answer = await fetch(`${address}/messages/${id}/attachments/${at}`);
  expect(answer.headers.get("content-disposition")).toBe("attachment; filename*=UTF-8''dwell.ics");
  expect(await answer.text()).toBe(calendar);
});

test("what is not there is 404, and nothing can be changed", async () => {
  const { id } = await firstMail();
  const wrong = [
    "/messages/0",
    `/messages/${id}/attachments/9`,
    "/messages/..%2f..%2fsecrets.json",
    "/other",
    "//",
  ];
  for (const path of wrong) expect((await fetch(`${address}${path}`)).status, path).toBe(404);
  expect((await fetch(address, { method: "POST" })).status).toBe(405);
});

test("a page elsewhere can't read the mails by a name that points here", async () => {
  const status = await new Promise((done) => {
    const options = { port: portOf(pages), host: "127.0.0.1", headers: { Host: "elsewhere.example" } };
    request(options, (answer) => done(answer.resume().statusCode)).end();
  });
  expect(status).toBe(403);
});

test("the mails outlive a restart", async () => {
  const again = await openStore(folder);
  expect(again.mails.map((mail) => mail.messageId)).toEqual(["<one@dwellbook.invalid>"]);
});

test("a second mail with the same Message-ID is marked, and the newest comes first", async () => {
  const store = await openStore(join(folder, "second"));
  const raw = Buffer.from("Message-ID: <x@y.invalid>\r\nSubject: s\r\n\r\nbody\r\n");
  const first = await store.add(raw, { from: "a@b.invalid", to: ["c@d.invalid"] }, 1_000);
  const second = await store.add(raw, { from: "a@b.invalid", to: ["c@d.invalid"] }, 1_000);
  expect([first.again, second.again]).toEqual([false, true]);
  expect(store.mails.map((mail) => mail.id)).toEqual([second.id, first.id]);
});

test("only web addresses become links, and the full stop after one stays outside", () => {
  expect(withLinks("Go to https://a.invalid/x?a=1&b=2. Not javascript:alert(1)")).toBe(
    'Go to <a href="https://a.invalid/x?a=1&amp;b=2" target="_blank" rel="noopener noreferrer">https://a.invalid/x?a=1&amp;b=2</a>. Not javascript:alert(1)',
  );
  expect(escapeHtml(`<a href="x" id='y'>&`)).toBe("&lt;a href=&quot;x&quot; id=&#39;y&#39;&gt;&amp;");
});

test("the method of a calendar entry is read from the entry itself", () => {
  expect(calendarMethod(calendar)).toBe("CANCEL");
  expect(calendarMethod("BEGIN:VCALENDAR\nmethod is not here\n")).toBeNull();
  expect(calendarMethod(null)).toBeNull();
});
