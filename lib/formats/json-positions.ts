import { codePoint } from "./faults";
import { MAX_ITEM_CHARS, MAX_LINE_CHARS } from "./limits";

/** Thrown inside this folder only: the place at which a text stops being JSON. */
export class JsonFault extends Error {
  readonly offset: number;

  constructor(offset: number, message: string) {
    super(message);
    this.offset = offset;
  }
}

/** A value and where it stands: `offset` of its first character, `end` after its last. */
export interface JsonNode {
  readonly kind: "string" | "number" | "true" | "false" | "null" | "object" | "list";
  /** The text of a string (unescaped) or of a number (as written); "" for the other kinds. */
  readonly text: string;
  readonly offset: number;
  readonly end: number;
  /** The members of an object in order, each with its key's own offset; empty for the other kinds. */
  readonly members: readonly JsonMember[];
}

/** One member of an object. */
export interface JsonMember {
  readonly key: string;
  readonly keyOffset: number;
  readonly value: JsonNode;
}

const MAX_DEPTH = 16;
const SPACE = /[ \t\n\r]*/y;
const NUMBER = /^-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/;
/** Longer than any number that has a meaning here; bounds the work of the pattern above. */
const MAX_NUMBER_CHARS = 200;

/** The offset of the next character that is not JSON white space. */
export function skipSpace(text: string, from: number): number {
  SPACE.lastIndex = from;
  SPACE.exec(text);
  return SPACE.lastIndex;
}

/** Reads one JSON value (RFC 8259, strictly) at or after `from`. Throws a JsonFault where the text is no JSON. */
export function readJson(text: string, from: number, depth = 0): JsonNode {
  const offset = skipSpace(text, from);
  if (depth > MAX_DEPTH) throw new JsonFault(offset, `Values are nested more than ${MAX_DEPTH} deep here.`);
  const c = text.charAt(offset);
  if (c === "{") return readObject(text, offset, depth);
  if (c === "[") return readList(text, offset, depth);
  if (c === '"') return readString(text, offset);
  for (const word of ["true", "false", "null"] as const) {
    if (text.startsWith(word, offset)) return leaf(word, "", offset, offset + word.length);
  }
  const number = NUMBER.exec(text.slice(offset, offset + MAX_NUMBER_CHARS));
  if (number) return leaf("number", number[0], offset, offset + number[0].length);
  throw new JsonFault(offset, `${shown(text, offset)} stands where a value is expected.`);
}

function leaf(kind: JsonNode["kind"], text: string, offset: number, end: number): JsonNode {
  return { kind, text, offset, end, members: [] };
}

/** The character at an offset for a message. */
export function shown(text: string, offset: number): string {
  const c = String.fromCodePoint(text.codePointAt(offset) ?? 0);
  if (offset >= text.length) return "The end of the text";
  return /[!-~]/.test(c) ? `"${c}"` : codePoint(c);
}

function readString(text: string, offset: number): JsonNode {
  const end = endOfString(text, offset);
  const written = text.slice(offset, end);
  try {
    const value: unknown = JSON.parse(written);
    return leaf("string", String(value), offset, end);
  } catch {
    throw new JsonFault(offset, "This text in quotes holds a backslash that begins no JSON escape.");
  }
}

/** The offset after the closing quote. RFC 8259: control characters stand in a string as escapes only. */
function endOfString(text: string, offset: number): number {
  const last = Math.min(text.length, offset + MAX_LINE_CHARS);
  for (let at = offset + 1; at < last; at += 1) {
    const c = text.charAt(at);
    if (c === '"') return at + 1;
    if (c < " ")
      throw new JsonFault(at, `The character ${codePoint(c)} stands in text whose quotes are still open.`);
    if (c === "\\") at += 1;
  }
  throw new JsonFault(offset, "The quotes that open here are not closed.");
}

function readObject(text: string, offset: number, depth: number): JsonNode {
  const members: JsonMember[] = [];
  let at = skipSpace(text, offset + 1);
  if (text.charAt(at) === "}") return { ...leaf("object", "", offset, at + 1), members };
  for (;;) {
    if (text.charAt(at) !== '"')
      throw new JsonFault(at, `${shown(text, at)} stands where a keyword in quotes is expected.`);
    const key = readString(text, at);
    const colon = skipSpace(text, key.end);
    if (text.charAt(colon) !== ":")
      throw new JsonFault(colon, `${shown(text, colon)} stands where a colon is expected.`);
    const value = readJson(text, colon + 1, depth + 1);
    members.push({ key: key.text, keyOffset: key.offset, value });
    at = skipSpace(text, value.end);
    if (text.charAt(at) === "}") return { ...leaf("object", "", offset, at + 1), members };
    at = afterComma(text, at, "}");
    if (at - offset > MAX_ITEM_CHARS)
      throw new JsonFault(at, `This object has more than ${MAX_ITEM_CHARS} characters.`);
  }
}

function readList(text: string, offset: number, depth: number): JsonNode {
  let at = skipSpace(text, offset + 1);
  if (text.charAt(at) === "]") return leaf("list", "", offset, at + 1);
  for (;;) {
    at = skipSpace(text, readJson(text, at, depth + 1).end);
    if (text.charAt(at) === "]") return leaf("list", "", offset, at + 1);
    at = afterComma(text, at, "]");
    if (at - offset > MAX_ITEM_CHARS)
      throw new JsonFault(at, `This list has more than ${MAX_ITEM_CHARS} characters.`);
  }
}

function afterComma(text: string, at: number, closing: string): number {
  if (text.charAt(at) === ",") return skipSpace(text, at + 1);
  throw new JsonFault(at, `${shown(text, at)} stands where a comma or ${closing} is expected.`);
}
