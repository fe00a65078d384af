import { quote } from "./faults";
import { MAX_ITEM_CHARS, MAX_LINE_CHARS } from "./limits";
import type { OmmFault, OmmField } from "./omm-fields";
import { NUMBER_KEYWORDS, READ_KEYWORDS } from "./omm-keywords";
import { beginReading, type OmmReading, rejectOmm, stopsHere, takeOmm, twiceFault } from "./omm-reading";
import type { ParsedText } from "./set-types";
import { splitLines, type TextLine } from "./text-lines";

const LINE = /^[ \t]*([A-Z][A-Z0-9_]*)[ \t]*=[ \t]*(.*)$/u;
const VERSION = /^CCSDS_[A-Z]+_VERS$/;

/** One set while its lines come in. */
interface OpenSet {
  readonly first: TextLine;
  last: TextLine;
  readonly firstKeyword: string;
  readonly fields: Map<string, OmmField>;
  readonly faults: OmmFault[];
}

/** True when a text is in keyword-value notation, by its first line, which must not be blank. */
export function looksLikeKvn(text: string): boolean {
  return /^(?:CCSDS_[A-Z]+_VERS\b(?!\s*,)|COMMENT\s|[A-Z][A-Z0-9_]*[ \t]*=)/.test(text);
}

/**
 * Reads OMMs in keyword-value notation (CCSDS 502.0-B-3): one "KEYWORD = value" a
 * line, units in brackets, COMMENT lines passed over. A set begins at its version
 * keyword; in files without one, where the first keyword or OBJECT_NAME comes again.
 * Each bad set gives one rejection. Never throws.
 */
export function parseOmmKvn(text: string): ParsedText {
  const reading = beginReading(text, "omm-kvn");
  let open: OpenSet | null = null;
  for (const line of splitLines(text)) {
    if (/^[ \t]*(?:COMMENT\b.*)?$/u.test(line.text.slice(0, MAX_LINE_CHARS))) continue;
    const keyword = LINE.exec(line.text.slice(0, MAX_LINE_CHARS))?.[1] ?? "";
    if (!open || beginsSet(open, keyword)) {
      if (open) close(reading, open);
      if (stopsHere(reading, line.start)) return reading.result;
      open = { first: line, last: line, firstKeyword: keyword, fields: new Map(), faults: [] };
    }
    open.last = line;
    addLine(open, line);
  }
  if (open) close(reading, open);
  return reading.result;
}

function beginsSet(open: OpenSet, keyword: string): boolean {
  if (VERSION.test(keyword)) return true;
  return open.fields.has(keyword) && (keyword === open.firstKeyword || keyword === "OBJECT_NAME");
}

function addLine(open: OpenSet, line: TextLine): void {
  const { fields, faults } = open;
  const tooLong = line.text.length > MAX_LINE_CHARS;
  const found = tooLong ? null : LINE.exec(line.text);
  if (!found) {
    const problem = tooLong
      ? `has more than ${MAX_LINE_CHARS} characters`
      : "is not of the form KEYWORD = value";
    const message = `The line ${quote(line.text)} ${problem}.`;
    // A report shows four faults of a set; a file of a million stray lines needs no more of them.
    if (faults.length <= 4) faults.push({ offset: line.start, message });
    return;
  }
  const [, keyword = "", written = ""] = found;
  const offset = line.start + line.text.length - written.length;
  if (VERSION.test(keyword) && keyword !== "CCSDS_OMM_VERS") {
    faults.push({ offset: line.start, message: `${keyword} begins another message than an OMM.` });
  }
  // Keywords that are not read, such as COMMENT or user-defined ones, may come again.
  if (!READ_KEYWORDS.has(keyword)) return;
  if (fields.has(keyword)) faults.push(twiceFault(keyword, line.start));
  else fields.set(keyword, { ...splitUnit(keyword, written), offset, notAValue: null });
}

/** Takes "[deg]" off a number. A name may well end in brackets, so texts are left whole. */
function splitUnit(keyword: string, written: string): { text: string; unit: string | null } {
  const bracket = written.lastIndexOf("[");
  const isNumber = NUMBER_KEYWORDS.some((n) => n.keyword === keyword);
  if (!isNumber || bracket < 0 || !written.endsWith("]")) return { text: written, unit: null };
  return { text: written.slice(0, bracket), unit: written.slice(bracket + 1, -1).trim() };
}

function close(reading: OmmReading, open: OpenSet): void {
  const { first, last, fields } = open;
  const raw = reading.text.slice(first.start, last.end);
  if (raw.length > MAX_ITEM_CHARS) {
    open.faults.push({
      offset: first.start,
      message: `This set has more than ${MAX_ITEM_CHARS} characters.`,
    });
  }
  const [fault, ...further] = open.faults;
  if (fault) rejectOmm(reading, [fault, ...further], raw);
  else takeOmm(reading, fields, first.start, raw);
}
