/** One line of a text. `end` is the offset after its last character, without the line break. */
export interface TextLine {
  readonly number: number;
  readonly start: number;
  readonly end: number;
  /** The line without its break and without blanks and tabs at its end. */
  readonly text: string;
  /** The line break that follows: "\n", "\r\n", "\r", or "" at the end of the text. */
  readonly lineBreak: string;
}

/** The text without a leading byte order mark. */
export function withoutByteOrderMark(text: string): string {
  return text.startsWith("\uFEFF") ? text.slice(1) : text;
}

/** All lines of a text; LF, CR LF and CR all end a line. Never throws. */
export function splitLines(text: string): TextLine[] {
  const lines: TextLine[] = [];
  const breaks = /\r\n|\n|\r/g;
  let start = 0;
  while (start < text.length) {
    const found = breaks.exec(text);
    const end = found ? found.index : text.length;
    lines.push({
      number: lines.length + 1,
      start,
      end,
      text: trimEndOfLine(text.slice(start, end)),
      lineBreak: found ? found[0] : "",
    });
    if (!found) break;
    start = end + found[0].length;
  }
  return lines;
}

/** Only blanks and tabs: a no-break space at the end of a line is a fault to be named, not trimmed. */
function trimEndOfLine(text: string): string {
  let end = text.length;
  while (end > 0 && (text[end - 1] === " " || text[end - 1] === "\t")) end -= 1;
  return text.slice(0, end);
}

/** True when a text has more line breaks than `most`. */
export function hasMoreLines(text: string, most: number): boolean {
  const breaks = /\r\n|\n|\r/g;
  for (let count = 0; count < most; count += 1) if (!breaks.test(text)) return false;
  return breaks.test(text);
}

/** Turns an offset into a 1-based line and column (UTF-16 units), by bisection over the line starts. */
export function makeLocator(text: string): (offset: number) => { line: number; column: number } {
  const starts = [0];
  const breaks = /\r\n|\n|\r/g;
  while (breaks.test(text)) starts.push(breaks.lastIndex);
  return (offset) => {
    let low = 0;
    let high = starts.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((starts[middle] ?? 0) <= offset) low = middle;
      else high = middle - 1;
    }
    return { line: low + 1, column: offset - (starts[low] ?? 0) + 1 };
  };
}
