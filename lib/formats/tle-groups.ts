import { quote, rejectionOf } from "./faults";
import { MAX_LINE_CHARS } from "./limits";
import type { RejectedSet } from "./set-types";
import type { TextLine } from "./text-lines";
import type { TleGroup } from "./tle-lines";

/** The lines of a group in file order. */
export function linesOf(group: TleGroup): readonly [TextLine, ...TextLine[]] {
  if (group.kind === "stray") return group.lines;
  const named = group.name ? [group.name] : [];
  if (group.kind === "pair") return headed([...named, group.first], group.second);
  return headed(named, group.kind === "no first" ? group.second : group.first);
}

function headed(before: readonly TextLine[], last: TextLine): readonly [TextLine, ...TextLine[]] {
  const [first, ...rest] = [...before, last];
  return [first ?? last, ...rest];
}

/**
 * The group's own lines as they stand in the text, with the breaks between them.
 * Comments and blank lines between them are left out, and the break after the last.
 */
export function rawOf(group: TleGroup, text: string): string {
  const lines = linesOf(group);
  return lines
    .map((line, i) => text.slice(line.start, line.end) + (i + 1 < lines.length ? line.lineBreak : ""))
    .join("");
}

/** The rejection of a group that is no pair: a lone line 1 or line 2, or text that belongs to no set. */
export function rejectUnpaired(group: Exclude<TleGroup, { kind: "pair" }>, text: string): RejectedSet {
  const raw = rawOf(group, text);
  const at = (line: TextLine, message: string): RejectedSet =>
    rejectionOf([{ line: line.number, column: 1, message }], raw);
  switch (group.kind) {
    case "no second":
      return at(group.first, `Line 1 of object ${numberOf(group.first)} is not followed by its line 2.`);
    case "no first":
      return at(group.second, `Line 2 of object ${numberOf(group.second)} has no line 1 before it.`);
    case "stray": {
      const [first, ...further] = group.lines;
      const more =
        further.length === 1
          ? " Nor does the line after it."
          : ` Nor do the ${further.length} lines after it.`;
      return at(
        first,
        `The text ${quote(first.text)} belongs to no element set.${further.length > 0 ? more : ""}`,
      );
    }
  }
}

function numberOf(line: TextLine): string {
  return quote(line.text.slice(2, 7));
}

/** The rejection of a group with a line longer than any element set's, or null. */
export function rejectOverlong(group: TleGroup, text: string): RejectedSet | null {
  const line = linesOf(group).find((l) => l.end - l.start > MAX_LINE_CHARS);
  if (!line) return null;
  const message = `This line has ${line.end - line.start} characters; ${MAX_LINE_CHARS} are allowed.`;
  return rejectionOf([{ line: line.number, column: MAX_LINE_CHARS + 1, message }], rawOf(group, text));
}
