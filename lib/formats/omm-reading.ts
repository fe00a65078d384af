import { fullRejection, isFull, quote, rejectionOf } from "./faults";
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

/** Judges one OMM that begins at `offset` and adds it to the accepted or the rejected. */
export function takeOmm(
  reading: OmmReading,
  fields: ReadonlyMap<string, OmmField>,
  offset: number,
  raw: string,
): void {
  const read = readOmm(fields, offset);
  if (!read.ok) rejectOmm(reading, read.faults, raw);
  else {
    const { line } = reading.locate(offset);
    reading.result.accepted.push({ elements: read.elements, format: reading.format, raw, line });
  }
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
