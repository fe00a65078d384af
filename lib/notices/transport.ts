import { createTransport } from "nodemailer";
import type { Mailbox } from "./mail-names";

/** A notice as the transport needs it. */
export interface OutgoingNotice {
  readonly noticeId: string;
  readonly messageId: string;
  readonly from: Mailbox;
  readonly to: Mailbox;
  readonly subject: string;
  readonly textBody: string;
  readonly htmlBody: string;
  readonly calendarMethod: string;
  readonly calendarBody: string;
}

/** `permanent` means that trying again would change nothing: the server refused this recipient or text. */
export type SendResult =
  | { readonly ok: true }
  | { readonly ok: false; readonly permanent: boolean; readonly reason: string };

const CONNECT_MS = 8_000;
const SILENCE_MS = 20_000;

/** Sends one notice over SMTP; never throws for what the network or the server does. */
export async function sendNoticeMail(smtpUrl: string, notice: OutgoingNotice): Promise<SendResult> {
  const transport = createTransport({
    url: smtpUrl,
    connectionTimeout: CONNECT_MS,
    greetingTimeout: CONNECT_MS,
    socketTimeout: SILENCE_MS,
    // Bodies are our own text; nothing in them may make us read files or fetch addresses.
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  try {
    await transport.sendMail(messageOf(notice));
    return { ok: true };
  } catch (error) {
    return failureOf(error);
  } finally {
    transport.close();
  }
}

function messageOf(notice: OutgoingNotice) {
  return {
    messageId: notice.messageId,
    from: { name: notice.from.name, address: notice.from.email },
    to: { name: notice.to.name, address: notice.to.email },
    subject: notice.subject,
    text: notice.textBody,
    html: notice.htmlBody,
    icalEvent: {
      method: notice.calendarMethod,
      filename: "engagement.ics",
      content: notice.calendarBody,
    },
    headers: { "X-Notice-Id": notice.noticeId, "Auto-Submitted": "auto-generated" },
  };
}

/** A refusal of the envelope or of the text by a code from 500 up is final; everything else may pass. */
function failureOf(error: unknown): SendResult {
  if (!(error instanceof Error)) return { ok: false, permanent: false, reason: String(error) };
  const { code, responseCode } = error as Error & { code?: unknown; responseCode?: unknown };
  const refused = code === "EENVELOPE" || code === "EMESSAGE";
  const final = typeof responseCode === "number" ? responseCode >= 500 : code === "EENVELOPE";
  return { ok: false, permanent: refused && final, reason: error.message.slice(0, 500) };
}
