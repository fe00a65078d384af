import { quote } from "./faults";
import { MAX_ITEM_CHARS } from "./limits";
import type { OmmField } from "./omm-fields";
import { READ_KEYWORDS } from "./omm-keywords";
import { beginReading, type OmmReading, rejectOmm, stopsHere, takeOmm, twiceFault } from "./omm-reading";
import type { ParsedText } from "./set-types";
import { nextToken, XmlFault, type XmlToken } from "./xml-tokens";

/**
 * Reads OMMs in XML (CCSDS 505.0-B): every `omm` element, alone or within `ndm`. Each
 * bad one gives one rejection and reading goes on after it. Document type definitions
 * end the reading; entities beyond the five predefined ones are refused. Never throws.
 */
export function parseOmmXml(text: string): ParsedText {
  const reading = beginReading(text, "omm-xml");
  const outer: string[] = [];
  let at = 0;
  while (at < text.length && !stopsHere(reading, at)) {
    const start = at;
    try {
      const token = nextToken(text, at);
      if (!token) break;
      if (token.kind === "open" && token.name === "omm") at = takeElement(reading, token);
      else {
        stepOutside(outer, token);
        at = token.end;
      }
    } catch (error) {
      if (!(error instanceof XmlFault)) throw error;
      at = error.final ? text.length : nextOmm(text, Math.max(error.offset, start) + 1);
      rejectOmm(reading, [{ offset: error.offset, message: error.message }], text.slice(error.offset, at));
    }
  }
  const open = outer.at(-1);
  if (open !== undefined && reading.result.rejected.length === 0) {
    rejectOmm(reading, [{ offset: text.length, message: `The element ${quote(open)} is not closed.` }], "");
  }
  return reading.result;
}

/** Keeps count of the elements around the OMMs; text between them must be blank. */
function stepOutside(outer: string[], token: XmlToken): void {
  if (token.kind === "open") outer.push(token.name);
  if (token.kind === "close" && outer.pop() !== token.name)
    throw new XmlFault(token.offset, strayTag(token.name));
  if (token.kind === "text" && outer.length === 0 && token.text.trim() !== "") {
    throw new XmlFault(token.offset, `The text ${quote(token.text.trim())} belongs to no element.`);
  }
}

function strayTag(name: string): string {
  return `The tag </${name.slice(0, 40)}> closes no element that is open here.`;
}

/** The offset of the next omm element, or the end of the text. */
function nextOmm(text: string, from: number): number {
  const tag = /<(?:[A-Za-z_][A-Za-z0-9_.-]*:)?omm[\s>]/g;
  tag.lastIndex = from;
  return tag.exec(text)?.index ?? text.length;
}

/** Reads the omm element that `opening` opens, and gives the offset from which to go on. */
function takeElement(reading: OmmReading, opening: XmlToken): number {
  const { text } = reading;
  try {
    const { fields, end } = readElement(text, opening);
    takeOmm(reading, fields, opening.offset, text.slice(opening.offset, end));
    return end;
  } catch (error) {
    if (!(error instanceof XmlFault)) throw error;
    const next = error.final ? text.length : resumeAfter(text, Math.max(error.offset, opening.end));
    rejectOmm(reading, [{ offset: error.offset, message: error.message }], text.slice(opening.offset, next));
    return next;
  }
}

/** After the closing tag of the broken element, or at the next one if that comes first. */
function resumeAfter(text: string, fault: number): number {
  const next = nextOmm(text, fault);
  const closing = /<\/(?:[A-Za-z_][A-Za-z0-9_.-]*:)?omm\s*>/.exec(text.slice(fault, next));
  return closing ? fault + closing.index + closing[0].length : next;
}

/** An element that is open, with its text so far; `textOffset` is where its value begins. */
interface OpenElement {
  readonly tag: XmlToken;
  text: string;
  textOffset: number;
  hasChild: boolean;
}

/** The keywords of one omm element: its leaf elements, and its version attribute. */
function readElement(text: string, opening: XmlToken): { fields: Map<string, OmmField>; end: number } {
  const fields = new Map<string, OmmField>();
  addField(fields, "CCSDS_OMM_VERS", opening.attributes.get("version") ?? null, opening, opening.offset);
  const open: OpenElement[] = [newElement(opening)];
  for (let at = opening.end; ; ) {
    const token = nextToken(text, at);
    const parent = open.at(-1);
    if (!token || !parent) throw new XmlFault(text.length, "The text ends within this omm element.");
    if (token.end - opening.offset > MAX_ITEM_CHARS) {
      throw new XmlFault(token.offset, `This omm element has more than ${MAX_ITEM_CHARS} characters.`);
    }
    at = token.end;
    if (token.kind === "text") addText(parent, token);
    else if (token.kind === "close") {
      closeElement(fields, parent, token);
      open.pop();
      if (open.length === 0) return { fields, end: token.end };
    } else {
      if (token.name === "omm")
        throw new XmlFault(token.offset, "The omm element before this one is not closed.");
      parent.hasChild = true;
      if (token.kind === "open") open.push(newElement(token));
      else addField(fields, token.name, null, token, token.offset);
    }
  }
}

function newElement(tag: XmlToken): OpenElement {
  return { tag, text: "", textOffset: tag.end, hasChild: false };
}

/** Text may come in several stretches, parted by comments. */
function addText(element: OpenElement, token: XmlToken): void {
  if (element.text.trim() === "") {
    element.textOffset = token.offset + (token.text.length - token.text.trimStart().length);
  }
  element.text += token.text;
}

function closeElement(fields: Map<string, OmmField>, element: OpenElement, token: XmlToken): void {
  if (element.tag.name !== token.name) throw new XmlFault(token.offset, strayTag(token.name));
  const blank = element.text.trim() === "";
  if (element.hasChild && !blank) {
    const message = `The text ${quote(element.text.trim())} stands among elements, where none is expected.`;
    throw new XmlFault(element.textOffset, message);
  }
  if (element.hasChild) return;
  const offset = blank ? element.tag.end : element.textOffset;
  addField(fields, token.name, blank ? null : element.text, element.tag, offset);
}

function addField(
  fields: Map<string, OmmField>,
  keyword: string,
  text: string | null,
  tag: XmlToken,
  offset: number,
): void {
  if (!READ_KEYWORDS.has(keyword)) return;
  if (fields.has(keyword)) throw new XmlFault(tag.offset, twiceFault(keyword, offset).message);
  fields.set(keyword, { text, offset, notAValue: null, unit: tag.attributes.get("units") ?? null });
}
