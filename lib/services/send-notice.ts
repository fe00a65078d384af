import { database, type Transaction } from "@/db/client";
import { type NoticeRow, nextToSend, noticeById, recordAttempt } from "@/db/queries/notices";
import { inTransaction } from "@/db/transaction";
import { config } from "@/lib/config";
import { readMailbox } from "@/lib/notices/mail-names";
import { type SendResult, sendNoticeMail } from "@/lib/notices/transport";
import { SYSTEM, writeLedger } from "./ledger";

/** After this many attempts a notice counts as failed; the waits between them grow to hours. */
export const MAX_ATTEMPTS = 12;

/**
 * Sends a notice, after any older one to the same authority about the same
 * engagement that has not gone out yet. Each is locked while it is sent and marked in
 * the same transaction, so it goes out once; only a crash between the server's word and
 * ours repeats it, under the same Message-ID. Throws to be tried again later.
 */
export async function sendNotice(noticeId: string): Promise<void> {
  const notice = await noticeById(database(), noticeId);
  if (notice === null) return;
  for (;;) {
    const outcome = await inTransaction((tx) => sendNext(tx, notice));
    if (outcome === "nothing left") return;
    if (outcome.delivery === "queued")
      throw new Error(`A notice could not be sent yet: ${outcome.lastError}`);
  }
}

interface Attempt {
  readonly delivery: "queued" | "sent" | "failed";
  readonly lastError: string | null;
}

async function sendNext(tx: Transaction, upTo: NoticeRow): Promise<"nothing left" | Attempt> {
  const next = await nextToSend(tx, upTo);
  if (next === null) return "nothing left";
  const { notice } = next;
  const { SMTP_URL, MAIL_FROM } = config();
  const result = await sendNoticeMail(SMTP_URL, {
    noticeId: notice.id,
    messageId: notice.messageId,
    from: readMailbox(MAIL_FROM),
    to: { name: next.authorityName, email: notice.toEmail },
    subject: notice.subject,
    textBody: notice.textBody,
    htmlBody: notice.htmlBody,
    calendarMethod: notice.calendarMethod,
    calendarBody: notice.calendarBody,
  });
  const attempt = attemptOf(result, notice.attempts + 1);
  const sentAt = attempt.delivery === "sent" ? new Date() : null;
  await recordAttempt(tx, notice.id, { ...attempt, sentAt });
  if (attempt.delivery !== "queued") await tell(tx, notice, next, attempt);
  return attempt;
}

function attemptOf(result: SendResult, attempts: number): Attempt {
  if (result.ok) return { delivery: "sent", lastError: null };
  const given = result.permanent || attempts >= MAX_ATTEMPTS;
  return { delivery: given ? "failed" : "queued", lastError: result.reason };
}

async function tell(
  tx: Transaction,
  notice: NoticeRow,
  names: { authorityName: string; engagementNumber: number },
  attempt: Attempt,
): Promise<void> {
  const sent = attempt.delivery === "sent";
  await writeLedger(tx, SYSTEM, {
    action: `${sent ? "sent" : "could not deliver"} ${notice.kind} to ${names.authorityName}`,
    subjectKind: "engagement",
    subjectId: notice.engagementId,
    subjectLabel: `E-${names.engagementNumber}`,
    reason: attempt.lastError,
    newValues: { noticeId: notice.id, to: notice.toEmail, messageId: notice.messageId },
  });
}
