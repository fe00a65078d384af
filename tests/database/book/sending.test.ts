import { sql } from "drizzle-orm";
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { sendNoticeTask } from "@/lib/jobs/tasks/send-notice";
import { startWorker } from "@/lib/jobs/worker";
import { moveEngagement } from "@/lib/services/move-engagement";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { MAX_ATTEMPTS, sendNotice } from "@/lib/services/send-notice";
import { ownDatabase } from "../support";
import { NOW } from "../world";
import { bookIn, rowsOf } from "./asks";
import { calendarProperty, MailServer } from "./mail-server";
import { dwellIn, makeScene, type Scene } from "./scene";

const server = new MailServer();
ownDatabase();
let scene: Scene;
beforeAll(async () => {
  process.env.SMTP_URL = await server.listen();
  scene = await makeScene();
});
afterAll(() => server.close());
beforeEach(() => {
  server.manners = "take";
  server.inbox = [];
});

afterEach(async () => {
  for (const { id } of await rowsOf(sql`select id from engagements where state = 'proposed'`)) {
    await scrubEngagement(scene.planner, String(id), { reason: "test over" }, NOW);
  }
  await database().execute(sql`delete from graphile_worker._private_jobs`);
});

/** Runs every waiting job of sending, as a worker would; gives how many failed. */
async function runJobs(): Promise<number> {
  const jobs = await rowsOf(sql`
    select j.id, j.payload from graphile_worker._private_jobs j
    join graphile_worker._private_tasks t on t.id = j.task_id where t.identifier = 'send-notice' order by j.id`);
  let failed = 0;
  for (const { id, payload } of jobs) {
    try {
      await sendNotice((payload as { noticeId: string }).noticeId);
      await database().execute(sql`delete from graphile_worker._private_jobs where id = ${id}`);
    } catch {
      failed += 1;
    }
  }
  return failed;
}

const WAITING = sql`select 1 from graphile_worker.jobs where task_identifier = 'send-notice'`;

/** Waits for something that another process or timer brings about; fails after 20 s. */
async function until(holds: () => Promise<boolean>): Promise<void> {
  const deadline = Date.now() + 20_000;
  while (!(await holds())) {
    if (Date.now() > deadline) throw new Error("it did not come about within 20 s");
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

async function noticesOfEngagement(id: string) {
  return rowsOf(sql`
    select kind, delivery, attempts, last_error, message_id from notices where engagement_id = ${id}
      and authority_id = ${scene.clearing.id} order by sequence`);
}

describe("mail about an engagement", () => {
  it("goes out once per authority: text, HTML and calendar as alternatives, the same UID, a rising SEQUENCE", async () => {
    const body = await bookIn(scene);
    expect(await runJobs()).toBe(0);
    await moveEngagement(scene.planner, body.id, { ...dwellIn(scene.pass, 10), version: body.version }, NOW);
    expect(await runJobs()).toBe(0);
    await scrubEngagement(scene.planner, body.id, { reason: "dome stuck" }, NOW);
    expect(await runJobs()).toBe(0);
    const mails = server.mailsTo(scene.clearing.email);
    expect(mails.map(({ mail }) => calendarProperty(mail, "METHOD"))).toEqual([
      "REQUEST",
      "REQUEST",
      "CANCEL",
    ]);
    expect(mails.map(({ mail }) => calendarProperty(mail, "UID"))).toEqual(
      Array(3).fill(`${body.id}@dwellbook.invalid`),
    );
    expect(mails.map(({ mail }) => calendarProperty(mail, "SEQUENCE"))).toEqual(["0", "1", "2"]);
    expect(mails.map(({ mail }) => calendarProperty(mail, "STATUS"))).toEqual([
      "TENTATIVE",
      "TENTATIVE",
      "CANCELLED",
    ]);
    const stamp = (iso: string) => iso.replace(/[-:]|\.000/g, "");
    expect(mails.map(({ mail }) => calendarProperty(mail, "DTSTART"))).toEqual([
      stamp(body.from),
      stamp(dwellIn(scene.pass, 10).from),
      stamp(dwellIn(scene.pass, 10).from),
    ]);
    expect(server.mailsTo(scene.airUnit.email)).toHaveLength(3);
    expect(server.inbox).toHaveLength(6);
  });

  it("is sent by the worker's own task from the queue, and tried again later when that failed", async () => {
    const body = await bookIn(scene);
    server.manners = "refuse for now";
    const worker = await startWorker([sendNoticeTask]);
    try {
      const refused = sql`select 1 from notices where engagement_id = ${body.id} and attempts > 0`;
      await until(async () => (await rowsOf(refused)).length === 2);
      expect(server.inbox).toEqual([]);
      server.manners = "take";
      // The library waits e seconds after the first failure, then tries by itself.
      await until(async () => (await rowsOf(WAITING)).length === 0);
    } finally {
      await worker.stop(5000);
    }
    const [sent] = await noticesOfEngagement(body.id);
    expect(sent?.delivery).toBe("sent");
    expect(Number(sent?.attempts)).toBeGreaterThan(1);
    expect(server.inbox).toHaveLength(2);
  });

  it("has the parts, headers and link that the notice was given", async () => {
    const body = await bookIn(scene);
    await runJobs();
    const [received] = server.mailsTo(scene.clearing.email);
    if (!received) throw new Error("no mail has come");
    const { mail, raw } = received;
    const [row] = await rowsOf(sql`
      select id, message_id, subject, text_body, html_body from notices
      where engagement_id = ${body.id} and authority_id = ${scene.clearing.id}`);
    expect(mail.messageId).toBe(row?.message_id);
    expect(mail.messageId).toBe(`<${row?.id}@dwellbook.invalid>`);
    expect(mail.headers.get("x-notice-id")).toBe(row?.id);
    expect(mail.subject).toBe(row?.subject);
    expect(mail.from?.value[0]?.address).toBe("book@dwellbook.invalid");
    expect(mail.text?.trim()).toBe(String(row?.text_body).trim());
    expect(String(mail.html).trim()).toBe(String(row?.html_body).trim());
    expect(raw).toMatch(/Content-Type: multipart\/alternative/);
    expect(raw).toMatch(/Content-Type: text\/calendar; charset=utf-8; method=REQUEST/i);
    expect(mail.text).toMatch(/http:\/\/127\.0\.0\.1:3000\/answer\/[\w-]+\.[\w-]+/);
    expect(calendarProperty(mail, "ATTENDEE")?.toLowerCase()).toBe(`mailto:${scene.clearing.email}`);
    expect(calendarProperty(mail, "ORGANIZER")?.toLowerCase()).toBe("mailto:book@dwellbook.invalid");
  });

  it("is tried again while the server refuses for now, and then goes out with the same Message-ID", async () => {
    const body = await bookIn(scene);
    server.manners = "refuse for now";
    expect(await runJobs()).toBe(2);
    const [waiting] = await noticesOfEngagement(body.id);
    expect(waiting).toMatchObject({ delivery: "queued", attempts: 1 });
    expect(String(waiting?.last_error)).toContain("mailbox says no");
    server.manners = "take";
    expect(await runJobs()).toBe(0);
    expect(await noticesOfEngagement(body.id)).toMatchObject([
      { delivery: "sent", attempts: 2, last_error: null },
    ]);
    expect(server.mailsTo(scene.clearing.email).map(({ mail }) => mail.messageId)).toEqual([
      waiting?.message_id,
    ]);
  });

  it("keeps its order: a cancellation waits for the request before it", async () => {
    const body = await bookIn(scene);
    server.manners = "refuse for now";
    await runJobs();
    await scrubEngagement(scene.planner, body.id, { reason: "cloud" }, NOW);
    server.manners = "take";
    const [cancellation] = await rowsOf(sql`
      select id from notices where engagement_id = ${body.id} and authority_id = ${scene.clearing.id} and kind = 'cancellation'`);
    await sendNotice(String(cancellation?.id));
    expect(server.mailsTo(scene.clearing.email).map(({ mail }) => calendarProperty(mail, "METHOD"))).toEqual([
      "REQUEST",
      "CANCEL",
    ]);
    await runJobs();
    expect(server.mailsTo(scene.clearing.email)).toHaveLength(2);
  });

  it("counts as failed, with the reason and a ledger row, once the server refuses for good", async () => {
    const body = await bookIn(scene);
    server.manners = "refuse for good";
    expect(await runJobs()).toBe(0);
    expect(await noticesOfEngagement(body.id)).toMatchObject([{ delivery: "failed", attempts: 1 }]);
    const [row] = await rowsOf(sql`
      select actor_name, reason from ledger where subject_id = ${body.id} and action = 'could not deliver request to Tessel Clearing Desk'`);
    expect(row?.actor_name).toBe("the book");
    expect(row?.reason).toContain("mailbox says no");
  });

  it("counts as failed after the last attempt, and is given up then", async () => {
    const body = await bookIn(scene);
    server.manners = "refuse for now";
    for (let attempt = 1; attempt < MAX_ATTEMPTS; attempt++) expect(await runJobs()).toBe(2);
    expect(await runJobs()).toBe(0);
    expect(await noticesOfEngagement(body.id)).toMatchObject([
      { delivery: "failed", attempts: MAX_ATTEMPTS },
    ]);
  });

  it("goes out once when several workers try at the same moment", async () => {
    const body = await bookIn(scene);
    const ids = await rowsOf(sql`select id from notices where engagement_id = ${body.id}`);
    await Promise.all([...ids, ...ids, ...ids].map(({ id }) => sendNotice(String(id))));
    expect(server.inbox).toHaveLength(2);
    await runJobs();
    expect(server.inbox).toHaveLength(2);
  });

  it("repeats only under the same Message-ID when the server's word is lost after the text", async () => {
    const body = await bookIn(scene);
    server.manners = "drop after the text";
    await runJobs();
    await runJobs();
    const mails = server.mailsTo(scene.airUnit.email);
    const all = [...mails, ...server.mailsTo(scene.clearing.email)];
    expect(all).toHaveLength(3);
    expect(new Set(all.map(({ mail }) => mail.messageId)).size).toBe(2);
    expect(await noticesOfEngagement(body.id)).toMatchObject([{ delivery: "sent" }]);
  });
});
