/** One content line of RFC 5545, section 3.1: name, parameters with their quotes taken off, and value as written. */
export interface ContentLine {
  readonly name: string;
  readonly parameters: Readonly<Record<string, string>>;
  readonly value: string;
}

/**
 * Reads iCalendar text by the letter of RFC 5545, section 3.1, and throws where it is
 * broken: every line ends in CR LF, has at most 75 octets, and is well-formed UTF-8;
 * a line that begins with a blank goes on with the one before it.
 */
export function readCalendar(text: string): ContentLine[] {
  if (!text.endsWith("\r\n")) throw new Error("the text does not end in CR LF");
  const physical = text.slice(0, -2).split("\r\n");
  const lines: string[] = [];
  for (const line of physical) {
    if (/[\r\n]/.test(line)) throw new Error(`a bare line break in ${JSON.stringify(line)}`);
    if (Buffer.byteLength(line, "utf8") > 75)
      throw new Error(`more than 75 octets in ${JSON.stringify(line)}`);
    if (Buffer.from(line, "utf8").toString("utf8") !== line) throw new Error("a character was cut in two");
    if (line.startsWith(" ")) lines.push((lines.pop() ?? "") + line.slice(1));
    else lines.push(line);
  }
  return lines.map(readLine);
}

function readLine(line: string): ContentLine {
  const found = /^([A-Z-]+)((?:;[A-Z-]+=(?:"[^"]*"|[^";:,]*))*):(.*)$/su.exec(line);
  if (!found) throw new Error(`no content line: ${JSON.stringify(line)}`);
  const [, name = "", list = "", value = ""] = found;
  const parameters: Record<string, string> = {};
  for (const [, key = "", quoted, bare] of list.matchAll(/;([A-Z-]+)=(?:"([^"]*)"|([^";:,]*))/g)) {
    parameters[key] = quoted ?? bare ?? "";
  }
  return { name, parameters, value };
}

/** The text of a TEXT value, RFC 5545, section 3.3.11. */
export function unescapeText(value: string): string {
  return value.replace(/\\([\\;,nN])/g, (_all, c: string) => (c === "n" || c === "N" ? "\n" : c));
}

/** The only line of a name. */
export function theLine(lines: readonly ContentLine[], name: string): ContentLine {
  const found = lines.filter((line) => line.name === name);
  const [line] = found;
  if (!line || found.length > 1) throw new Error(`${found.length} lines ${name}`);
  return line;
}
