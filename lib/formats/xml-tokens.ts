import { quote } from "./faults";
import { MAX_ITEM_CHARS, MAX_LINE_CHARS } from "./limits";

/** Thrown inside this folder only: the place at which a text stops being XML of the kind that is read. */
export class XmlFault extends Error {
  readonly offset: number;
  /** True where reading must not go on at all. */
  readonly final: boolean;

  constructor(offset: number, message: string, final = false) {
    super(message);
    this.offset = offset;
    this.final = final;
  }
}

/** One tag or stretch of text; `end` is the offset after it. */
export interface XmlToken {
  readonly kind: "open" | "close" | "empty" | "text";
  /** Element name without its namespace prefix; "" for text. */
  readonly name: string;
  readonly attributes: ReadonlyMap<string, string>;
  /** Text with the five predefined entities resolved; "" for tags. */
  readonly text: string;
  readonly offset: number;
  readonly end: number;
}

const NAME = "[A-Za-z_][A-Za-z0-9_.-]*(?::[A-Za-z_][A-Za-z0-9_.-]*)?";
const TAG = new RegExp(`^<(/?)(${NAME})((?:\\s+${NAME}\\s*=\\s*(?:"[^"<]*"|'[^'<]*'))*)\\s*(/?)>`, "u");
const ATTRIBUTE = new RegExp(`(${NAME})\\s*=\\s*(?:"([^"<]*)"|'([^'<]*)')`, "gu");
const ENTITIES: Readonly<Record<string, string>> = { amp: "&", lt: "<", gt: ">", quot: '"', apos: "'" };

/**
 * The token at or after `from`, comments and the XML declaration passed over, or null
 * at the end. A small reader on purpose: it throws an XmlFault on document type
 * definitions, CDATA, processing instructions and every entity but the five
 * predefined ones, so nothing outside the text is ever fetched and nothing expands.
 */
export function nextToken(text: string, from: number): XmlToken | null {
  const at = skipRemarks(text, from);
  if (at >= text.length) return null;
  return text.charAt(at) === "<" ? readTag(text, at) : readText(text, at);
}

function skipRemarks(text: string, from: number): number {
  let at = from;
  for (;;) {
    if (text.startsWith("<!--", at)) at = after(text, "-->", at, "This comment is not closed.");
    else if (/^<\?xml\s/.test(text.slice(at, at + 6)) && text.slice(0, at).trim() === "") {
      at = after(text, "?>", at, "The XML declaration is not closed.");
    } else return at;
  }
}

function after(text: string, closing: string, at: number, message: string): number {
  const found = text.indexOf(closing, at);
  if (found < 0) throw new XmlFault(at, message, true);
  return found + closing.length;
}

function readTag(text: string, offset: number): XmlToken {
  const lead = text.charAt(offset + 1);
  if (lead === "!") {
    const message = "Document type definitions and CDATA sections are not read; nothing from here on was.";
    throw new XmlFault(offset, message, true);
  }
  if (lead === "?") throw new XmlFault(offset, "A processing instruction stands here; none is read.");
  const found = TAG.exec(text.slice(offset, offset + MAX_LINE_CHARS));
  const [whole = "", slash = "", fullName = "", list = "", selfClosing = ""] = found ?? [];
  if (!found || (slash !== "" && (list !== "" || selfClosing !== ""))) {
    throw new XmlFault(offset, `${quote(text.slice(offset, offset + 60))} is no well-formed tag.`);
  }
  const attributes = new Map<string, string>();
  for (const [, name = "", double, single] of list.matchAll(ATTRIBUTE)) {
    if (attributes.has(name))
      throw new XmlFault(offset, `The attribute ${quote(name)} comes twice in this tag.`);
    attributes.set(name, resolve(double ?? single ?? "", offset));
  }
  const kind = slash !== "" ? "close" : selfClosing !== "" ? "empty" : "open";
  const name = fullName.replace(/^.*:/, "");
  return { kind, name, attributes, text: "", offset, end: offset + whole.length };
}

function readText(text: string, offset: number): XmlToken {
  const tag = text.indexOf("<", offset);
  const end = tag < 0 ? text.length : tag;
  const written = text.slice(offset, end);
  // Longer than any omm element may be: it will be refused, or stands outside and means nothing.
  const resolved = written.length > MAX_ITEM_CHARS ? written : resolve(written, offset);
  return { kind: "text", name: "", attributes: new Map(), text: resolved, offset, end };
}

function resolve(written: string, offset: number): string {
  return written.replace(/&([^;&\s]{0,10};?)/g, (whole, rest: string, index: number) => {
    const character = rest.endsWith(";") ? ENTITIES[rest.slice(0, -1)] : undefined;
    if (character !== undefined) return character;
    throw new XmlFault(
      offset + index,
      `The entity ${quote(whole)} is not read; only the five of XML itself are.`,
    );
  });
}
