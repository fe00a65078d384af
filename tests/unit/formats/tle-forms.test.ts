import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { LINE1, LINE2, NAME, putSealed } from "./lines";

function only(text: string) {
  const { accepted, rejected } = parseElementSets(text);
  expect(rejected).toEqual([]);
  expect(accepted).toHaveLength(1);
  const [set] = accepted;
  if (!set) throw new Error("no set");
  return set;
}

describe("a good TLE", () => {
  it("gives every element in its unit", () => {
    const { elements } = only(`${LINE1}\n${LINE2}`);
    expect(elements).toEqual({
      catalogNumber: 5,
      objectName: null,
      objectId: "1958-002B",
      epochMs: Date.UTC(2020, 9, 13, 4, 52, 48, 472) + 0.32,
      meanMotionRevPerDay: 10.84869164,
      eccentricity: 0.1845686,
      inclinationDeg: 34.2443,
      raanDeg: 225.5254,
      argPericenterDeg: 162.2516,
      meanAnomalyDeg: 205.2356,
      bstar: -0.22483e-4,
      meanMotionDot: -0.00000016,
      meanMotionDdot: 0,
    });
  });

  it.each([
    ["a name line", `${NAME}\n`, NAME],
    ["a padded name line", `${NAME}              \n`, NAME],
    ["a name line after 0", `0 ${NAME}\n`, NAME],
    ["a name that begins like a line 1", "1 EXPLORER\n", "1 EXPLORER"],
    ["a name that begins like a line 2", "2 MANY\n", "2 MANY"],
    ["a name in brackets", "[DEB] 7\n", "[DEB] 7"],
    ["a name that looks like another form", "A = <1>\n", "A = <1>"],
    ["no name line", "", null],
  ])("takes its name from %s", (_what, lead, name) => {
    expect(only(`${lead}${LINE1}\n${LINE2}\n`).elements.objectName).toBe(name);
  });

  it.each([
    ["LF", "\n"],
    ["CR LF", "\r\n"],
    ["CR", "\r"],
  ])("may end its lines with %s, which its raw text keeps", (_what, end) => {
    const set = only(
      `\uFEFF${end}# a remark${end}${end}${NAME}  ${end}${LINE1}\t ${end}${LINE2} ${end}${end}`,
    );
    expect(set).toMatchObject({ format: "tle", line: 4 });
    expect(set.raw).toBe(`${NAME}  ${end}${LINE1}\t ${end}${LINE2} `);
  });

  it("leaves remarks and blank lines between its lines out of its raw text", () => {
    const set = only(`# one\n${LINE1}\n\n  # two\n${LINE2}\n`);
    expect(set.raw).toBe(`${LINE1}\n${LINE2}`);
    expect(set.line).toBe(2);
  });

  it("may carry blank-separated numbers after column 69 of line 2", () => {
    const { raw } = only(`${LINE1}\n${LINE2}     0.00      4320.0        360.00\n`);
    expect(raw.endsWith("360.00")).toBe(true);
  });

  // The examples of the Alpha-5 scheme: documentation of the catalogue's publisher as quoted in tests.py of python-sgp4 2.15.
  it.each([
    ["A0000", 100_000],
    ["E8493", 148_493],
    ["J2931", 182_931],
    ["P4018", 234_018],
    ["W1928", 301_928],
    ["Z9999", 339_999],
  ])("may have the Alpha-5 catalogue number %s", (field, number) => {
    const { elements } = only(`${putSealed(LINE1, 3, field)}\n${putSealed(LINE2, 3, field)}`);
    expect(elements.catalogNumber).toBe(number);
  });

  it("may leave the designator and the ephemeris type blank", () => {
    const line1 = putSealed(putSealed(LINE1, 10, "        "), 63, " ");
    expect(only(`${line1}\n${LINE2}`).elements.objectId).toBeNull();
  });

  it.each(["C", "S"])("may be classified %s", (letter) => {
    expect(only(`${putSealed(LINE1, 8, letter)}\n${LINE2}`).elements.catalogNumber).toBe(5);
  });

  it("reads years 57 to 99 as 1957 to 1999", () => {
    const { elements } = only(`${putSealed(LINE1, 19, "57365.00000000")}\n${LINE2}`);
    expect(elements.epochMs).toBe(Date.UTC(1957, 11, 31));
  });
});
