/** Everything a reader could take for a line break. */
const LINE_BREAKS = /\r\n|[\n\r\v\f\u0085\u2028\u2029]/g;

/** Control characters but tab and line feed, lone surrogates, and characters that reorder text. */
const UNWANTED = /(?![\t\n])\p{Cc}|\p{Cs}|[\u200E\u200F\u202A-\u202E\u2066-\u2069]/gu;

/** Free text fit for iCalendar: line breaks become LF, which the writer escapes; nothing can open a new line. */
export function cleanText(text: string): string {
  return text.replace(LINE_BREAKS, "\n").replace(UNWANTED, "");
}

/**
 * A person's or unit's name fit for a quoted parameter: on one line, without the
 * double quote and the backslash, which RFC 5545 section 3.2 cannot hold there, and
 * with the caret doubled as RFC 6868 asks.
 */
export function cleanName(name: string): string {
  return cleanText(name)
    .replace(/\s+/g, " ")
    .replaceAll('"', "'")
    .replaceAll("\\", "/")
    .replaceAll("^", "^^")
    .trim();
}

/** A mail address as it is. Throws a RangeError unless it is a plain local@host without anything that has a meaning in iCalendar. */
export function checkAddress(address: string): string {
  if (/^[A-Za-z0-9.!#$%&'*+/=?^_`{|}~-]{1,64}@[A-Za-z0-9.-]{1,255}$/.test(address)) return address;
  throw new RangeError("The mail address has a form that cannot stand in a calendar entry.");
}

/**
 * An http or https address, normalised. Comma and semicolon are percent-encoded,
 * since the writer would put a backslash before them, which is wrong in a URI.
 * Throws a RangeError for anything else.
 */
export function checkUrl(url: string): string {
  const parsed = URL.canParse(url) ? new URL(url) : null;
  if (parsed?.protocol !== "https:" && parsed?.protocol !== "http:") {
    throw new RangeError("The link of a calendar entry must be an http or https address.");
  }
  return parsed.href.replaceAll(",", "%2C").replaceAll(";", "%3B").replaceAll("\\", "%5C");
}

/** A UID as it is. Throws a RangeError unless it is 1 to 255 letters, digits and . _ @ : + - */
export function checkUid(uid: string): string {
  if (/^[A-Za-z0-9._@:+-]{1,255}$/.test(uid)) return uid;
  throw new RangeError("The UID of a calendar entry may hold letters, digits and . _ @ : + - only.");
}
