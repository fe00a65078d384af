import { MAX_REJECTED_RAW, MAX_SETS } from "./limits";
import type { Fault, ParsedText, RejectedSet } from "./set-types";

const SHOWN_CHARS = 40;
const FURTHER_SHOWN = 3;

/** Text for a message: quoted, control and non-ASCII characters as U+XXXX, cut after 40 characters. */
export function quote(text: string): string {
  const shown = [...text.slice(0, SHOWN_CHARS)]
    .map((c) => (/[ -~]/.test(c) ? c : `<${codePoint(c)}>`))
    .join("");
  return `"${shown}${text.length > SHOWN_CHARS ? "…" : ""}"`;
}

/** A character's code point as U+XXXX. */
export function codePoint(character: string): string {
  return `U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, "0")}`;
}

/**
 * One rejection from everything found wrong in a set. The first fault gives the
 * place and opens the message; up to three more follow with their own places.
 */
export function rejectionOf(faults: readonly [Fault, ...Fault[]], raw: string): RejectedSet {
  const [first, ...further] = faults;
  const parts = further
    .slice(0, FURTHER_SHOWN)
    .map((f) => ` Also line ${f.line}, column ${f.column}: ${f.message}`);
  if (further.length > FURTHER_SHOWN) parts.push(" And more.");
  return {
    line: first.line,
    column: first.column,
    message: first.message + parts.join(""),
    raw: raw.slice(0, MAX_REJECTED_RAW),
  };
}

/** True when the text has given as many sets as may be read. */
export function isFull(result: ParsedText): boolean {
  return result.accepted.length + result.rejected.length >= MAX_SETS;
}

/** The rejection that says where reading stopped for the number of sets. */
export function fullRejection(line: number, column: number): RejectedSet {
  const message = `A file may hold ${MAX_SETS} sets; nothing from here on was read.`;
  return { line, column, message, raw: "" };
}
