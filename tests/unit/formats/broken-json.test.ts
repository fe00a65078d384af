import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { OMM } from "./lines";

function refusal(text: string) {
  const { accepted, rejected } = parseElementSets(text);
  expect(accepted).toEqual([]);
  const [first] = rejected;
  if (!first || rejected.length > 1) throw new Error(`${rejected.length} refusals`);
  return first;
}

describe("broken JSON", () => {
  const good = JSON.stringify(OMM);

  it.each<[string, string, number, number, RegExp]>([
    [
      "a missing comma between members",
      '{"A": 1\n "B": 2}',
      2,
      2,
      /""" stands where a comma or } is expected/,
    ],
    ["a missing colon", '{"A" 1}', 1, 6, /"1" stands where a colon is expected/],
    ["a missing value", '{"A": }', 1, 7, /"}" stands where a value is expected/],
    ["a keyword without quotes", '{"A": 1, B: 2}', 1, 10, /"B" stands where a keyword in quotes is expected/],
    ["NaN", '{"A": NaN}', 1, 7, /"N" stands where a value is expected/],
    ["a number with a leading zero", '{"A": 007}', 1, 8, /"0" stands where a comma or } is expected/],
    [
      "a line break within quotes",
      '{"A": "x\ny"}',
      1,
      9,
      /U\+000A stands in text whose quotes are still open/,
    ],
    ["a stray backslash", '{"A": "\\q"}', 1, 7, /backslash that begins no JSON escape/],
    ["too deep a nest", `{"A": ${"[".repeat(40)}}`, 1, 23, /nested more than 16 deep/],
  ])(
    "with %s is refused where it breaks, and the next object is read",
    (_what, bad, line, column, message) => {
      const { accepted, rejected } = parseElementSets(`${bad}\n${good}`);
      expect(accepted.map((s) => s.elements.catalogNumber)).toEqual([5]);
      expect(rejected).toHaveLength(1);
      expect(rejected[0]).toMatchObject({ line, column, raw: bad });
      expect(rejected[0]?.message).toMatch(message);
    },
  );

  it.each([
    ["an object that is not closed", `[{"A": 1, ${good}]`, /"{" stands where a keyword/],
    ["a missing comma", `[{"A": 1} ${good}]`, /missing/],
    [
      "a value that is no object",
      `[7, ${good}]`,
      /This is the number 7; an object with OMM keywords is expected/,
    ],
    ["a word that is no JSON", `[oops, ${good}]`, /"o" stands where a value is expected/],
    ["a list that is not closed", `[${good}`, /The list that opens here is not closed/],
    ["a comma too many", `[${good},]`, /"]" stands where a value is expected/],
    ["text after the list", `[${good}] end`, /"e" stands where a value is expected/],
    ["a bracket too many", `[${good}]]`, /"]" stands where a value is expected/],
  ])("with %s does not hide the good one", (_what, text, message) => {
    const { accepted, rejected } = parseElementSets(text);
    expect(accepted.map((s) => s.elements.catalogNumber)).toEqual([5]);
    expect(rejected.map((r) => r.message).join(" ")).toMatch(message);
  });

  it("that ends within an object is refused at its end", () => {
    expect(refusal('{"EPOCH": "2020')).toMatchObject({
      line: 1,
      column: 11,
      message: expect.stringContaining("not closed"),
    });
    expect(refusal('{"EPOCH": 1')).toMatchObject({
      line: 1,
      column: 12,
      message: expect.stringContaining("end of the text"),
    });
  });

  it("with an object of more than 20,000 characters is refused and reading goes on", () => {
    const huge = `{${Array.from({ length: 4_000 }, (_, i) => `"K${i}": ${i}`).join(", ")}}`;
    const { accepted, rejected } = parseElementSets(`[${huge},\n${good}]`);
    expect(accepted).toHaveLength(1);
    expect(rejected[0]?.message).toContain("more than 20000 characters");
  });
});
