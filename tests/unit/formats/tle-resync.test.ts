import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { LINE1, LINE2, NAME, put, putSealed } from "./lines";

const A1 = putSealed(LINE1, 3, "00101");
const A2 = putSealed(LINE2, 3, "00101");
const B1 = putSealed(LINE1, 3, "00102");
const B2 = putSealed(LINE2, 3, "00102");

/** Numbers accepted, and the lines of the refusals. */
function outcome(...lines: string[]) {
  const { accepted, rejected } = parseElementSets(lines.join("\n"));
  return {
    taken: accepted.map((s) => s.elements.catalogNumber),
    refusedAt: rejected.map((r) => r.line),
    rejected,
  };
}

describe("one bad set never hides the next good one", () => {
  it.each<[string, string[], number[]]>([
    ["a bad line 1", [put(A1, 69, "0"), A2, B1, B2], [1]],
    ["a bad line 2", [A1, put(A2, 69, "0"), B1, B2], [2]],
    ["a spoilt first column of line 1", [put(A1, 1, "l"), A2, B1, B2], [1]],
    ["a spoilt first column of line 2", [A1, put(A2, 1, "Z"), B1, B2], [2]],
    ["line 2 missing", [A1, B1, B2], [1]],
    ["line 2 missing before a name", [NAME, A1, NAME, B1, B2], [2]],
    ["line 1 missing", [A2, B1, B2], [1]],
    ["line 1 missing after a name", [NAME, A2, B1, B2], [2]],
    ["both lines called 1", [A1, put(A2, 1, "1"), B1, B2], [2]],
    ["both lines called 2", [put(A1, 1, "2"), A2, B1, B2], [1]],
    ["line 1 given twice", [B1, B1, B2], [1]],
    ["line 2 given twice", [B1, B2, B2], [3]],
    ["stray text", ["A list of objects,", "made in October", NAME, B1, B2], [1]],
    ["a lone name at the end", [B1, B2, NAME], [3]],
    ["a truncated line 1", [A1.slice(0, 40), A2, B1, B2], [1]],
    ["a truncated lone line 2", [A2.slice(0, 12), B1, B2], [1]],
    ["a truncated lone line 1", [A1.slice(0, 12), B1, B2], [1]],
    ["a truncated line 2", [A1, A2.slice(0, 10), B1, B2], [2]],
  ])("with %s", (_what, lines, refusedAt) => {
    const { taken, refusedAt: found } = outcome(...lines);
    expect(taken).toEqual([102]);
    expect(found).toEqual(refusedAt);
  });

  it("names a line 1 without its line 2 and a line 2 without its line 1", () => {
    const { rejected } = outcome(A1, B1, B2, A2);
    expect(rejected.map((r) => [r.line, r.raw])).toEqual([
      [1, A1],
      [4, A2],
    ]);
    expect(rejected[0]?.message).toBe('Line 1 of object "00101" is not followed by its line 2.');
    expect(rejected[1]?.message).toBe('Line 2 of object "00101" has no line 1 before it.');
  });

  it("joins stray lines into one refusal", () => {
    const { rejected } = outcome("alpha", "beta", "gamma");
    expect(rejected).toHaveLength(1);
    expect(rejected[0]?.message).toBe(
      'The text "alpha" belongs to no element set. Nor do the 2 lines after it.',
    );
    expect(rejected[0]?.raw).toBe("alpha\nbeta\ngamma");
  });
});

describe("limits", () => {
  it("refuses a line of more than 4,000 characters and goes on", () => {
    const { taken, rejected } = outcome("x".repeat(5_000), B1, `${B2}${" 1".repeat(3_000)}`, B1, B2);
    expect(taken).toEqual([102]);
    expect(rejected.map((r) => [r.line, r.column])).toEqual([[1, 4_001]]);
  });

  it("carries at most 4,000 characters of refused text", () => {
    const { rejected } = outcome("y".repeat(10_000), "z".repeat(10_000));
    expect(rejected[0]?.raw).toHaveLength(4_000);
  });

  it("stops after 100,000 sets and says so", () => {
    const text = `${A2}\n${B2}\n`.repeat(50_001);
    const { accepted, rejected } = parseElementSets(text);
    expect(accepted).toEqual([]);
    expect(rejected).toHaveLength(100_001);
    expect(rejected.at(-1)).toEqual({
      line: 100_001,
      column: 1,
      message: "A file may hold 100000 sets; nothing from here on was read.",
      raw: "",
    });
  });
});

describe("a text that is too much at once", () => {
  it.each<[string, string, RegExp]>([
    [
      "characters",
      " ".repeat(32_000_001),
      /^The text has 32000001 characters; 32000000 can be read at once\.$/,
    ],
    ["lines", "\r\n".repeat(1_000_001), /^The text has more than 1000000 lines/],
  ])("for its %s is refused as a whole", (_what, text, message) => {
    const { accepted, rejected } = parseElementSets(text);
    expect(accepted).toEqual([]);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]?.message).toMatch(message);
  });
});

describe("a text without any set", () => {
  it.each([
    ["nothing", ""],
    ["blanks", " \r\n \n"],
    ["only remarks", "# one\n# two\n"],
    ["an empty list", "[]"],
  ])("of %s is refused as a whole", (_what, text) => {
    expect(parseElementSets(text)).toEqual({
      accepted: [],
      rejected: [{ line: 1, column: 1, message: "The text holds no element set.", raw: "" }],
    });
  });

  it("in UTF-16 is named as such", () => {
    const utf16 = Buffer.from(`${LINE1}\n${LINE2}`, "utf16le").toString("latin1");
    expect(parseElementSets(utf16).rejected[0]?.message).toContain("save the file as UTF-8");
  });
});
