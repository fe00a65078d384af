import { isFull, quote } from "./faults";
import { JsonFault, type JsonNode, readJson, skipSpace } from "./json-positions";
import type { OmmFault, OmmField } from "./omm-fields";
import { beginReading, type OmmReading, rejectOmm, stopsHere, takeOmm, twiceFault } from "./omm-reading";
import type { ParsedText } from "./set-types";

/**
 * Reads OMMs in JSON: one object, a list of objects, or objects one after the other.
 * Keywords are those of CCSDS 502.0-B-3, values numbers or text. An object that is
 * broken as JSON or as an OMM gives one rejection and reading goes on after it.
 * Lines and columns are those of the offending value. Never throws.
 */
export function parseOmmJson(text: string): ParsedText {
  const reading = beginReading(text, "omm-json");
  let at = skipSpace(text, 0);
  while (at < text.length && !stopsHere(reading, at)) {
    const next = text.charAt(at) === "[" ? readItems(reading, at) : readItem(reading, at).next;
    // A stray closing bracket has been reported and is stepped over here.
    at = skipSpace(text, Math.max(next, at + 1));
  }
  return reading.result;
}

/** Reads the list that opens at `start`; gives the offset after it, or the one at which reading had to stop. */
function readItems(reading: OmmReading, start: number): number {
  const { text } = reading;
  let at = skipSpace(text, start + 1);
  if (text.charAt(at) === "]") return at + 1;
  while (at < text.length && !isFull(reading.result)) {
    const item = readItem(reading, at);
    at = skipSpace(text, item.next);
    const c = text.charAt(at);
    if (c === "]") return at + 1;
    if (c === ",") at = skipSpace(text, at + 1);
    else if (c === "{" && item.whole)
      rejectOmm(reading, [{ offset: at, message: "A comma is missing here." }], "");
  }
  if (at >= text.length)
    rejectOmm(reading, [{ offset: start, message: "The list that opens here is not closed." }], "");
  return at;
}

interface ItemEnd {
  readonly next: number;
  /** True when the item was whole as JSON, whatever its content. */
  readonly whole: boolean;
}

/** Reads what stands at `at`, which should be an object, and says where to go on. */
function readItem(reading: OmmReading, at: number): ItemEnd {
  const { text } = reading;
  try {
    const node = readJson(text, at);
    takeItem(reading, node, text.slice(node.offset, node.end));
    return { next: node.end, whole: true };
  } catch (error) {
    if (!(error instanceof JsonFault)) throw error;
    const next = resumeAfter(text, at, error.offset);
    rejectOmm(reading, [{ offset: error.offset, message: error.message }], text.slice(at, next));
    return { next, whole: false };
  }
}

function takeItem(reading: OmmReading, node: JsonNode, raw: string): void {
  if (node.kind !== "object") {
    const message = `This is ${describe(node)}; an object with OMM keywords is expected.`;
    rejectOmm(reading, [{ offset: node.offset, message }], raw);
    return;
  }
  const { fields, twice } = fieldsOf(node);
  if (twice) rejectOmm(reading, [twice], raw);
  else takeOmm(reading, fields, node.offset, raw);
}

function describe(node: JsonNode): string {
  if (node.kind === "string") return `the text ${quote(node.text)}`;
  if (node.kind === "number") return `the number ${node.text.slice(0, 40)}`;
  return { object: "an object", list: "a list", true: "true", false: "false", null: "null" }[node.kind];
}

/** The object's members as OMM fields, and the first keyword that comes twice, if any. */
function fieldsOf(node: JsonNode): { fields: Map<string, OmmField>; twice: OmmFault | null } {
  const fields = new Map<string, OmmField>();
  for (const { key, keyOffset, value } of node.members) {
    if (fields.has(key)) return { fields, twice: twiceFault(key, keyOffset) };
    const plain = value.kind === "string" || value.kind === "number";
    const notAValue = plain || value.kind === "null" ? null : describe(value);
    fields.set(key, { text: plain ? value.text : null, offset: value.offset, notAValue, unit: null });
  }
  return { fields, twice: null };
}

/**
 * Where reading goes on after a fault. Within an object: at the brace that stands
 * there (the object was left open), else after the next closing brace, for an OMM in
 * JSON is a flat object. Between objects: at the next brace or at the list's end.
 */
function resumeAfter(text: string, start: number, fault: number): number {
  const within = text.charAt(start) === "{" && fault > start;
  if (within && text.charAt(fault) === "{") return fault;
  const stops = within ? /\}/g : /[{\]]/g;
  stops.lastIndex = fault;
  const stop = stops.exec(text);
  if (!stop) return text.length;
  return within ? stop.index + 1 : stop.index;
}
