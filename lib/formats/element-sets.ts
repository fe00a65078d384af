import { looksLikeOmmCsv, parseOmmCsv } from "./omm-csv";
import { parseOmmJson } from "./omm-json";
import { looksLikeKvn, parseOmmKvn } from "./omm-kvn";
import { parseOmmXml } from "./omm-xml";
import type { ParsedSet, ParsedText, RejectedSet, SetFormat } from "./set-types";
import { withoutByteOrderMark } from "./text-lines";
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
const NAME_AND_LINE_1 = /^\s*[^\r\n]*[\r\n]+1 [0-9A-Z]\d{4}/;

/** The file form of a text, from its first characters; what looks like nothing else is read as TLE. */
export function detectFormat(text: string): SetFormat {
  if (NAME_AND_LINE_1.test(text)) return "tle";
  if (/^\s*[{[]/.test(text)) return "omm-json";
  if (/^\s*</.test(text)) return "omm-xml";
  if (looksLikeKvn(text)) return "omm-kvn";
  return looksLikeOmmCsv(text) ? "omm-csv" : "tle";
}

/**
 * Reads element sets from a text: TLE with or without name lines, or OMM in JSON,
 * keyword-value notation, XML or CSV. A byte order mark, CR LF, blank lines and blanks
 * at line ends are tolerated. Each set is judged by itself: a bad one gives one
 * rejection with its line and column (1-based; columns count UTF-16 units) and never
 * hides the next good one.
 *
 * Everything accepted is finite, in range, has right checksums where its form has
 * them, and can be propagated to its epoch. A text without any set gives one
 * rejection. At most 100,000 sets are read. Never throws, whatever the text.
 */
export function parseElementSets(text: string): ParsedText {
  const body = withoutByteOrderMark(text);
  if (looksBinary(body))
    return refused("This is not plain text in UTF-8; save the file as UTF-8 text and try again.");
  const result = READERS[detectFormat(body)](body);
  const nothing = result.accepted.length + result.rejected.length === 0;
  return nothing ? refused("The text holds no element set.") : result;
}

function refused(message: string): ParsedText {
  return { accepted: [], rejected: [{ line: 1, column: 1, message, raw: "" }] };
}

/** UTF-16 read as UTF-8 has a NUL at every other place; true text has none among its first characters. */
function looksBinary(text: string): boolean {
  return text.slice(0, 4).includes("\0");
}
