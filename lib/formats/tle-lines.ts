import type { TextLine } from "./text-lines";

/**
 * What belongs together in a TLE text. A pair is a line 1 and its line 2, either
 * of which may be damaged; the other kinds are what is left without a partner.
 */
export type TleGroup =
  | {
      readonly kind: "pair";
      readonly name: TextLine | null;
      readonly first: TextLine;
      readonly second: TextLine;
    }
  | { readonly kind: "no second"; readonly name: TextLine | null; readonly first: TextLine }
  | { readonly kind: "no first"; readonly name: TextLine | null; readonly second: TextLine }
  | { readonly kind: "stray"; readonly lines: [TextLine, ...TextLine[]] };

type Kind = "one" | "two" | "damaged" | "text";

/** A name such as "1 EXPLORER" begins like an element line but is far shorter and has no catalogue number. */
const LONGEST_NAME_LIKE = 30;
const BEGINS_WITH_NUMBER = /^[12] [0-9A-Z]\d{4}/;

/** Any other line this long and this full of digits is an element line whose first column is spoilt. */
const SHORTEST_DAMAGED = 55;
const DIGITS_IN_DAMAGED = 30;

function kindOf(text: string, before: Kind | undefined, next: TextLine | undefined): Kind {
  const lead = text.slice(0, 2);
  const aheadOfSet = next?.text.startsWith("1 ") === true && before !== "one";
  const nameLike = aheadOfSet && text.length < LONGEST_NAME_LIKE && !BEGINS_WITH_NUMBER.test(text);
  if (lead === "1 " && !nameLike) return "one";
  if (lead === "2 " && !nameLike) return "two";
  const digits = text.replace(/[^0-9]/g, "").length;
  return text.length >= SHORTEST_DAMAGED && digits >= DIGITS_IN_DAMAGED ? "damaged" : "text";
}

function sameNumber(a: TextLine, b: TextLine): boolean {
  return a.text.slice(2, 7) === b.text.slice(2, 7);
}

/** Blank lines, and comment lines that begin with #, carry nothing. */
function isContent(line: TextLine): boolean {
  return !/^[ \t]*(#|$)/.test(line.text);
}

/**
 * Sorts the lines of a text into groups, in order, so that a bad line costs its
 * own set only: a damaged line 1 or line 2 keeps its partner, a lone line 1 or 2
 * stands alone, and reading goes on with the next line.
 */
export function groupTleLines(all: readonly TextLine[]): TleGroup[] {
  const lines = all.filter(isContent);
  const kinds: Kind[] = [];
  for (const [i, line] of lines.entries()) kinds.push(kindOf(line.text, kinds[i - 1], lines[i + 1]));
  const groups: TleGroup[] = [];
  let at = 0;
  while (at < lines.length) {
    const { group, used } = nextGroup(lines, kinds, at);
    const last = groups.at(-1);
    // Appended in place: a file of a million stray lines must not be copied a million times.
    if (group.kind === "stray" && last?.kind === "stray") last.lines.push(...group.lines);
    else groups.push(group);
    at += used;
  }
  return groups;
}

function nextGroup(
  lines: readonly TextLine[],
  kinds: readonly Kind[],
  at: number,
): { group: TleGroup; used: number } {
  const line = lines[at] as TextLine;
  const follows = kinds[at + 1];
  const named =
    kinds[at] === "text" && (follows === "one" || follows === "two" || isPair(lines, kinds, at + 1));
  const start = named ? at + 1 : at;
  const name = named ? line : null;
  const first = lines[start] as TextLine;
  const second = lines[start + 1];
  const used = start - at;
  if (second && isPair(lines, kinds, start))
    return { group: { kind: "pair", name, first, second }, used: used + 2 };
  if (kinds[start] === "one") return { group: { kind: "no second", name, first }, used: used + 1 };
  if (kinds[start] === "two") return { group: { kind: "no first", name, second: first }, used: used + 1 };
  return { group: { kind: "stray", lines: [first] }, used: used + 1 };
}

/** True when the lines at `at` and after it are one set's two lines, however damaged. */
function isPair(lines: readonly TextLine[], kinds: readonly Kind[], at: number): boolean {
  const first = lines[at];
  const second = lines[at + 1];
  if (!first || !second) return false;
  const pair = `${kinds[at]} ${kinds[at + 1]}`;
  if (pair === "one two" || pair === "one damaged" || pair === "damaged two") return true;
  // A spoilt line number: both lines of one object claim to be the same line.
  if (pair === "two two") return sameNumber(first, second);
  return pair === "one one" && sameNumber(first, second) && kinds[at + 2] !== "two";
}
