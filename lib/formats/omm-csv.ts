import { quote } from "./faults";
import { MAX_LINE_CHARS } from "./limits";
import type { OmmFault, OmmField } from "./omm-fields";
import { NUMBER_KEYWORDS, READ_KEYWORDS } from "./omm-keywords";
import {
  beginReading,
  controlFault,
  type OmmReading,
  rejectOmm,
  stopsHere,
  takeOmm,
  twiceFault,
} from "./omm-reading";
import type { ParsedText } from "./set-types";
import { splitLines, type TextLine } from "./text-lines";

interface Cell {
  readonly text: string;
  readonly offset: number;
}

type Cells =
  | { readonly ok: true; readonly cells: readonly Cell[] }
  | { readonly ok: false; readonly fault: OmmFault };

/** True when a text begins with a line of OMM keywords between commas. */
export function looksLikeOmmCsv(text: string): boolean {
  const head = /^[^\r\n]*/.exec(text.slice(0, MAX_LINE_CHARS))?.[0] ?? "";
  const names = head.split(",").map((name) => name.trim().replace(/^"(.*)"$/, "$1"));
  return names.length > 3 && names.filter((name) => READ_KEYWORDS.has(name)).length > 2;
}

/**
 * Reads OMMs in CSV: a header line of OMM keywords in any order, then one set a line
 * (RFC 4180 quotes, no line breaks within them). A header that lacks or repeats a
 * keyword refuses the file; a bad row gives one rejection. The raw text of a set is
 * the header line and its row, since neither says anything alone. Never throws.
 */
export function parseOmmCsv(text: string): ParsedText {
  const reading = beginReading(text, "omm-csv");
  const [head, ...rows] = splitLines(text).filter((line) => line.text.trim() !== "");
  if (!head) return reading.result;
  const columns = readCells(head);
  const control = controlFault(head.text, head.start);
  const faults = control ? [control] : columns.ok ? headerFaults(columns.cells, head.start) : [columns.fault];
  const [fault, ...further] = faults;
  if (!columns.ok || fault) {
    if (fault) rejectOmm(reading, [fault, ...further], text.slice(head.start, head.end));
    return reading.result;
  }
  const keywords = columns.cells.map((cell) => cell.text);
  for (const row of rows) {
    if (stopsHere(reading, row.start)) break;
    takeRow(reading, head, keywords, row);
  }
  return reading.result;
}

function headerFaults(columns: readonly Cell[], offset: number): OmmFault[] {
  const names = columns.map((cell) => cell.text);
  const required = [
    "NORAD_CAT_ID",
    "EPOCH",
    ...NUMBER_KEYWORDS.filter((n) => n.required).map((n) => n.keyword),
  ];
  const missing = required.filter((keyword) => !names.includes(keyword));
  const repeated = columns.filter((cell, i) => READ_KEYWORDS.has(cell.text) && names.indexOf(cell.text) < i);
  return [
    ...missing.map((keyword) => ({ offset, message: `The header has no column ${keyword}.` })),
    ...repeated.map((cell) => twiceFault(cell.text, cell.offset)),
  ];
}

function takeRow(reading: OmmReading, head: TextLine, keywords: readonly string[], row: TextLine): void {
  const lead = reading.text.slice(head.start, head.end) + head.lineBreak;
  const own = reading.text.slice(row.start, row.end);
  const read = readCells(row);
  const fault = read.ok ? lengthFault(read.cells.length, keywords.length, row) : read.fault;
  if (!read.ok || fault) {
    if (fault) rejectOmm(reading, [fault], lead + own);
    return;
  }
  const fields = new Map<string, OmmField>();
  for (const [i, cell] of read.cells.entries()) {
    fields.set(keywords[i] ?? "", { text: cell.text, offset: cell.offset, notAValue: null, unit: null });
  }
  takeOmm(reading, fields, row.start, own, lead);
}

function lengthFault(cells: number, columns: number, row: TextLine): OmmFault | null {
  if (cells === columns) return null;
  return { offset: row.start, message: `This row has ${cells} values; the header has ${columns}.` };
}

/** The cells of one line with their offsets, or the first place where it is no CSV. */
function readCells(line: TextLine): Cells {
  if (line.text.length > MAX_LINE_CHARS) {
    const message = `This line has ${line.text.length} characters; ${MAX_LINE_CHARS} are allowed.`;
    return { ok: false, fault: { offset: line.start + MAX_LINE_CHARS, message } };
  }
  const cells: Cell[] = [];
  const cell = /(?:[ \t]*"((?:[^"]|"")*)"[ \t]*|([^",]*))(,|$)/uy;
  for (;;) {
    const from = cell.lastIndex;
    const found = cell.exec(line.text);
    if (!found) {
      const message = `The value ${quote(line.text.slice(from))} has a quote in the wrong place or never closed.`;
      return { ok: false, fault: { offset: line.start + from, message } };
    }
    cells.push({
      text: (found[1]?.replaceAll('""', '"') ?? found[2] ?? "").trim(),
      offset: line.start + from,
    });
    if (found[3] === "") return { ok: true, cells };
  }
}
