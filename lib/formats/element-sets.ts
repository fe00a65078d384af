import { MAX_LINE_CHARS, MAX_LINES, MAX_TEXT_CHARS } from "./limits";
import { looksLikeOmmCsv, parseOmmCsv } from "./omm-csv";
import { parseOmmJson } from "./omm-json";
import { looksLikeKvn, parseOmmKvn } from "./omm-kvn";
import { parseOmmXml } from "./omm-xml";
import type { ParsedSet, ParsedText, RejectedSet, SetFormat } from "./set-types";
import { hasMoreLines, withoutByteOrderMark } from "./text-lines";
import { parseTle } from "./tle";

export type { ParsedSet, ParsedText, RejectedSet, SetFormat };

const READERS: Readonly<Record<SetFormat, (text: string) => ParsedText>> = {
  tle: parseTle,
  "omm-json": parseOmmJson,
  "omm-kvn": parseOmmKvn,
  "omm-xml": parseOmmXml,
  "omm-csv": parseOmmCsv,
};

/** A first line of any kind, a name, and after it a line 1 with its catalogue number. */
const NAME_AND_LINE_1 = /^[^\r\n]*[\r\n]+1 [0-9A-Z]\d{4}/;

/** The file form of a text, from its first characters; what looks like nothing else is read as TLE. */
export function detectFormat(text: string): SetFormat {
  // Blanks first and by themselves: a pattern that skips them and then more would try every split of them.
  const start = Math.max(0, text.search(/\S/));
  const head = text.slice(start, start + 2 * MAX_LINE_CHARS);
  if (NAME_AND_LINE_1.test(head)) return "tle";
  if (/^[{[]/.test(head)) return "omm-json";
  if (head.startsWith("<")) return "omm-xml";
  if (looksLikeKvn(head)) return "omm-kvn";
  return looksLikeOmmCsv(head) ? "omm-csv" : "tle";
}

/**
 * Reads element sets from a text: TLE with or without name lines, or OMM in JSON,
 * keyword-value notation, XML or CSV. A byte order mark, CR LF, blank lines and blanks
 * at line ends are tolerated. Each set is judged by itself: a bad one gives one
 * rejection with its line and column (1-based; columns count UTF-16 units) and never
 * hides the next good one.
 *
 * Everything accepted is finite, in range, has right checksums where its form has
 * them, and can be propagated to its epoch. A text without any set, of more than 32
 * million characters or of more than a million lines gives one rejection; of more
 * than 100,000 sets the rest is not read, and that is said. Never throws.
 */
export function parseElementSets(text: string): ParsedText {
  const body = withoutByteOrderMark(text);
  const unreadable = whyUnreadable(body);
  if (unreadable) return refused(unreadable);
  const result = READERS[detectFormat(body)](body);
  const nothing = result.accepted.length + result.rejected.length === 0;
  return nothing ? refused("The text holds no element set.") : result;
}

function refused(message: string): ParsedText {
  return { accepted: [], rejected: [{ line: 1, column: 1, message, raw: "" }] };
}

function whyUnreadable(text: string): string | null {
  if (text.length > MAX_TEXT_CHARS) {
    return `The text has ${text.length} characters; ${MAX_TEXT_CHARS} can be read at once.`;
  }
  if (hasMoreLines(text, MAX_LINES))
    return `The text has more than ${MAX_LINES} lines; so many can be read at once.`;
  // UTF-16 read as UTF-8 has a NUL at every other place; true text has none among its first characters.
  if (text.slice(0, 4).includes("\0")) {
    return "This is not plain text in UTF-8; save the file as UTF-8 text and try again.";
  }
  return null;
}
