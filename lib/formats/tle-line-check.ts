import { codePoint, quote } from "./faults";
import type { Fault } from "./set-types";
import type { TextLine } from "./text-lines";
import { tleChecksum } from "./tle-checksum";
import { BLANKS1, BLANKS2, LINE1, LINE2, type TleField, textOf } from "./tle-fields";

/** Columns of an element line. */
const COLUMNS = 69;

/** All faults of form on a line 1 or line 2, by column; ranges and sense are judged elsewhere. */
export function checkTleLine(line: TextLine, which: 1 | 2): Fault[] {
  const at = (column: number, message: string): Fault => ({ line: line.number, column, message });
  const odd = /[^ -~]/u.exec(line.text);
  if (odd) return [at(odd.index + 1, strangeCharacter(odd[0]))];
  const length = lengthFault(line.text, which);
  const faults = fieldFaults(line.text, which).map((f) => at(f.column, f.message));
  if (length) {
    // A shifted line has many fields out of place: the first tells most, the rest follows from it.
    const both = [at(length.column, length.message), ...faults.slice(0, 1)];
    return line.text.length < COLUMNS ? both : both.sort((a, b) => a.column - b.column);
  }
  const sum = checksumMessage(line.text, which);
  return sum ? [...faults, at(COLUMNS, sum)] : faults;
}

function strangeCharacter(c: string): string {
  if (c === "\t") return "A tab stands here; element lines hold single blanks.";
  return `The character ${codePoint(c)} stands here; element lines hold plain ASCII only.`;
}

interface Found {
  readonly column: number;
  readonly message: string;
}

/**
 * Text after column 69 is let through on line 2 only, as blank-separated numbers:
 * the published verification files carry start, stop and step there.
 */
function lengthFault(text: string, which: 1 | 2): Found | null {
  if (text.length < COLUMNS) {
    const message = `Line ${which} has ${text.length} columns; ${COLUMNS} are expected.`;
    return { column: text.length + 1, message };
  }
  const rest = text.slice(COLUMNS);
  if (rest === "") return null;
  if (which === 2 && /^(?: +-?\d+(?:\.\d*)?)+$/.test(rest)) return null;
  const message = `Line ${which} goes on after column ${COLUMNS} with ${quote(rest.trim())}.`;
  return { column: COLUMNS + 1, message };
}

function fieldFaults(text: string, which: 1 | 2): Found[] {
  const fields: readonly TleField[] = Object.values(which === 1 ? LINE1 : LINE2);
  const found: Found[] = [];
  for (const f of fields) {
    if (f.to > text.length || f.form.test(textOf(text, f))) continue;
    const columns = f.from === f.to ? `column ${f.from}` : `columns ${f.from} to ${f.to}`;
    const message = `The ${f.name} (${columns}) is ${quote(textOf(text, f))}; expected: ${f.expected}.`;
    found.push({ column: f.from, message });
  }
  for (const column of which === 1 ? BLANKS1 : BLANKS2) {
    const c = text.charAt(column - 1);
    if (c === "" || c === " ") continue;
    found.push({ column, message: `Column ${column} of line ${which} is ${quote(c)}; a blank is expected.` });
  }
  return found.sort((a, b) => a.column - b.column);
}

function checksumMessage(text: string, which: 1 | 2): string | null {
  const printed = text.charAt(COLUMNS - 1);
  const computed = String(tleChecksum(text));
  if (printed === computed) return null;
  return `The checksum of line ${which} is printed as ${quote(printed)} but its 68 columns give ${computed}.`;
}
