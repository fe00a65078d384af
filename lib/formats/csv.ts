/** What a cell may hold; null gives an empty cell. */
export type CsvCell = string | number | boolean | null;

/** A spreadsheet takes a cell that begins so, after any blanks, for a formula; the wide forms count as well. */
const FORMULA_LEAD = /^(?:\s*[=+\-@＝＋－＠]|[\t\r\n])/u;

/** Text that is a plain number stays as it is: a formula needs more than a sign and digits. */
const PLAIN_NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

/**
 * Rows as CSV after RFC 4180: comma, CR LF after every row, quotes doubled. Text that
 * a spreadsheet would run as a formula gets an apostrophe before it (OWASP, "CSV
 * injection"); numbers, also negative ones and numbers as text, stay numbers. Throws
 * a RangeError for a number that is not finite: a table must not pretend to one.
 */
export function writeCsv(rows: readonly (readonly CsvCell[])[]): string {
  return rows.map((row) => `${row.map(writeCell).join(",")}\r\n`).join("");
}

function writeCell(cell: CsvCell): string {
  if (cell === null) return "";
  if (typeof cell === "number") {
    if (!Number.isFinite(cell)) throw new RangeError(`${cell} cannot stand in a CSV cell.`);
    return String(cell);
  }
  if (typeof cell === "boolean") return String(cell);
  const plain = PLAIN_NUMBER.test(cell) || !FORMULA_LEAD.test(cell);
  const text = plain ? cell : `'${cell}`;
  // A NUL ends the text in some readers and is refused by others.
  return quoteCell(text.replaceAll("\0", ""));
}

function quoteCell(text: string): string {
  return /[",\r\n]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
