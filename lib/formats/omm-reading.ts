import { codePoint, fullRejection, isFull, quote, rejectionOf } from "./faults";
import { type OmmFault, type OmmField, readOmm } from "./omm-fields";
import type { ParsedText, SetFormat } from "./set-types";
import { makeLocator } from "./text-lines";

/** An OMM text while it is being read, with what it has given so far. */
export interface OmmReading {
  readonly text: string;
  readonly format: SetFormat;
  readonly locate: (offset: number) => { line: number; column: number };
  readonly result: ParsedText;
}

/** Begins the reading of a text in one of the OMM encodings. */
export function beginReading(text: string, format: SetFormat): OmmReading {
  return { text, format, locate: makeLocator(text), result: { accepted: [], rejected: [] } };
}

/** Adds one rejection for all the faults; offsets become lines and columns. */
export function rejectOmm(
  reading: OmmReading,
  faults: readonly [OmmFault, ...OmmFault[]],
  raw: string,
): void {
  const placed = ({ offset, message }: OmmFault) => ({ ...reading.locate(offset), message });
  const [first, ...further] = faults;
  reading.result.rejected.push(rejectionOf([placed(first), ...further.map(placed)], raw));
}

/**
 * Judges one OMM, whose `own` text begins at `offset`, and adds it to the accepted or
 * the rejected. `lead` is other text that belongs to its raw text, a CSV header.
 */
export function takeOmm(
  reading: OmmReading,
  fields: ReadonlyMap<string, OmmField>,
  offset: number,
  own: string,
  lead = "",
): void {
  const raw = lead + own;
  const control = controlFault(own, offset);
  if (control) {
    rejectOmm(reading, [control], raw);
    return;
  }
  const read = readOmm(fields, offset);
  if (!read.ok) rejectOmm(reading, read.faults, raw);
  else {
    const { line } = reading.locate(offset);
    reading.result.accepted.push({ elements: read.elements, format: reading.format, raw, line });
  }
}

/**
 * The first control character of a text that begins at `offset`, tab and line breaks
 * apart. Raw text is kept in a database, which takes no NUL, even where nothing reads it.
 */
export function controlFault(text: string, offset: number): OmmFault | null {
  const odd = /(?![\t\r\n])\p{Cc}/u.exec(text);
  if (!odd) return null;
  return { offset: offset + odd.index, message: `The control character ${codePoint(odd[0])} stands here.` };
}

/** True, with a rejection that says so, when the text has given as many sets as may be read. */
export function stopsHere(reading: OmmReading, offset: number): boolean {
  if (!isFull(reading.result)) return false;
  const { line, column } = reading.locate(offset);
  reading.result.rejected.push(fullRejection(line, column));
  return true;
}

/** The fault of a keyword that comes a second time in one set. */
export function twiceFault(keyword: string, offset: number): OmmFault {
  return { offset, message: `The keyword ${quote(keyword)} comes twice in this set.` };
}
