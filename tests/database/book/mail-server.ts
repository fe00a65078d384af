import { type AddressObject, type ParsedMail, simpleParser } from "mailparser";
import { SMTPServer } from "smtp-server";

/** What the server does with the next mail. */
export type Manners = "take" | "refuse for now" | "refuse for good" | "drop after the text";

/** A mail as it came in, parsed and raw. */
export interface ReceivedMail {
  readonly mail: ParsedMail;
  readonly raw: string;
}

/** A mail server on loopback whose manners a test chooses; it keeps what it receives. */
export class MailServer {
  manners: Manners = "take";
  inbox: ReceivedMail[] = [];
  readonly #server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS"],
    onRcptTo: (_address, _session, callback) => {
      if (this.manners === "take" || this.manners === "drop after the text") return callback();
      const error: Error & { responseCode?: number } = new Error("mailbox says no");
      error.responseCode = this.manners === "refuse for good" ? 550 : 451;
      callback(error);
    },
    onData: (stream, _session, callback) => {
      const chunks: Buffer[] = [];
      stream.on("data", (chunk: Buffer) => chunks.push(chunk));
      stream.on("end", () => void this.#keep(Buffer.concat(chunks).toString("utf8")).then(() => callback()));
    },
  });

  /** Listens on a free port; gives the address for SMTP_URL. */
  async listen(): Promise<string> {
    await new Promise<void>((resolve) => this.#server.listen(0, "127.0.0.1", resolve));
    const address = this.#server.server.address();
    if (address === null || typeof address === "string") throw new Error("the mail server has no port");
    return `smtp://127.0.0.1:${address.port}`;
  }

  close(): Promise<void> {
    return new Promise((resolve) => this.#server.close(() => resolve()));
  }

  mailsTo(email: string): ReceivedMail[] {
    return this.inbox.filter(({ mail }) =>
      (mail.to as AddressObject).value.some(({ address }) => address === email),
    );
  }

  async #keep(raw: string): Promise<void> {
    this.inbox.push({ raw, mail: await simpleParser(raw) });
    if (this.manners !== "drop after the text") return;
    // The text is with the server, its word never reaches the sender.
    this.manners = "take";
    for (const connection of this.#server.connections as Set<{ _socket: { destroy(): void } }>) {
      connection._socket.destroy();
    }
  }
}

/** A property of a mail's calendar part, after undoing the folding of RFC 5545, section 3.1. */
export function calendarProperty(mail: ParsedMail, name: string): string | undefined {
  const part = mail.attachments.find(({ contentType }) => contentType.startsWith("text/calendar"));
  const lines = part?.content.toString("utf8").replaceAll("\r\n ", "").split("\r\n");
  const line = lines?.find((text) => text.startsWith(`${name}:`) || text.startsWith(`${name};`));
  return line?.replace(/^[^:]*:/, "");
}
