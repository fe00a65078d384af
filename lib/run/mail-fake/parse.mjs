import { simpleParser } from "mailparser";

/** One header's values as plain text, whatever shape the parser gave them. */
function headerLines(parsed) {
  const headers = {};
  for (const { key, line } of parsed.headerLines ?? []) {
    const value = line
      .slice(line.indexOf(":") + 1)
      .replace(/\r?\n[ \t]+/g, " ")
      .trim();
    headers[key] = key in headers ? [headers[key], value].flat() : value;
  }
  return headers;
}

/**
 * The calendar part of a mail, as text, or null.
 * @param {readonly any[]} attachments
 */
function calendarText(attachments) {
  const part = attachments.find(
    ({ contentType }) => contentType === "text/calendar" || contentType === "application/ics",
  );
  return part ? part.content.toString("utf8") : null;
}

/**
 * The METHOD of an iCalendar text in capitals, or null.
 * @param {string | null} text
 */
export function calendarMethod(text) {
  const found = text === null ? null : /^METHOD:([A-Za-z-]+)\s*$/m.exec(text);
  return found ? found[1].toUpperCase() : null;
}

/**
 * Reads a raw mail. Never throws: a mail that can't be read is kept too, and says so.
 * @param {Buffer} raw
 * @returns {Promise<{ fromHeader: string, toHeader: string, subject: string, messageId: string | null,
 *   headers: Record<string, string | string[]>, text: string, html: string | null, icalendar: string | null,
 *   method: string | null, attachments: { name: string, type: string, bytes: number }[] }>}
 */
export async function parseMail(raw) {
  try {
    const parsed = await simpleParser(raw);
    const attachments = parsed.attachments ?? [];
    const icalendar = calendarText(attachments);
    return {
      fromHeader: parsed.from?.text ?? "",
      toHeader: [parsed.to ?? []]
        .flat()
        .map((one) => one.text)
        .join(", "),
      subject: parsed.subject ?? "",
      messageId: parsed.messageId ?? null,
      headers: headerLines(parsed),
      text: parsed.text ?? "",
      html: parsed.html || null,
      icalendar,
      method: calendarMethod(icalendar),
      attachments: attachments.map((one, at) => ({
        name: one.filename || (one.contentType === "text/calendar" ? "calendar-part.ics" : `part-${at + 1}`),
        type: one.contentType,
        bytes: one.size,
      })),
    };
  } catch (error) {
    return {
      ...{
        fromHeader: "",
        toHeader: "",
        subject: "(a mail that cannot be read)",
        messageId: null,
        headers: {},
      },
      ...{
        text: `The parser says: ${error.message}`,
        html: null,
        icalendar: null,
        method: null,
        attachments: [],
      },
    };
  }
}

/**
 * The bytes of one attachment, or null.
 * @param {Buffer} raw
 * @param {number} at counted from 0
 */
export async function attachmentBytes(raw, at) {
  const parsed = await simpleParser(raw);
  return parsed.attachments[at]?.content ?? null;
}
