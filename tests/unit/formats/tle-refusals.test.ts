import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { LINE1, LINE2, NAME, put, putSealed, sealed } from "./lines";

/** Line 1 stands on line 2 of the file and line 2 on line 3, so that the places below differ. */
function refusalOf(line1: string, line2: string, name = NAME) {
  const text = `${name}\n${line1}\n${line2}`;
  const { accepted, rejected } = parseElementSets(`${text}\n`);
  expect(accepted).toEqual([]);
  expect(rejected).toHaveLength(1);
  const [refusal] = rejected;
  if (!refusal) throw new Error("no refusal");
  expect(refusal.raw).toBe(text);
  return refusal;
}

const ON_LINE1: readonly [what: string, line1: string, column: number, message: RegExp][] = [
  [
    "a wrong checksum",
    put(LINE1, 69, "3"),
    69,
    /checksum of line 1 is printed as "3" but its 68 columns give 8/,
  ],
  ["a checksum that is no digit", put(LINE1, 69, "x"), 69, /printed as "x"/],
  [
    "a letter in the number",
    putSealed(LINE1, 3, "0000O"),
    3,
    /catalogue number \(columns 3 to 7\) is "0000O"/,
  ],
  ["the Alpha-5 letter I", putSealed(LINE1, 3, "I0005"), 3, /letter without I and O/],
  ["the Alpha-5 letter O", putSealed(LINE1, 3, "O0005"), 3, /letter without I and O/],
  [
    "an unknown classification",
    putSealed(LINE1, 8, "X"),
    8,
    /classification \(column 8\) is "X"; expected: U, C or S/,
  ],
  ["a designator without a piece", putSealed(LINE1, 10, "58002   "), 10, /international designator/],
  ["a designator with a gap", putSealed(LINE1, 10, "58002B C"), 10, /international designator/],
  [
    "an epoch out of form",
    putSealed(LINE1, 19, "20287,20333880"),
    19,
    /epoch \(columns 19 to 32\) is "20287,20333880"/,
  ],
  ["a day 0", putSealed(LINE1, 19, "20000.20333880"), 19, /year 2020 has no such day/],
  ["a day 367 of a leap year", putSealed(LINE1, 19, "20367.20333880"), 19, /year 2020 has no such day/],
  ["a day 366 of a common year", putSealed(LINE1, 19, "21366.20333880"), 19, /year 2021 has no such day/],
  ["a first derivative out of form", putSealed(LINE1, 34, "0.00000016"), 34, /first derivative/],
  ["a second derivative out of form", putSealed(LINE1, 45, " 00000 0"), 45, /second derivative/],
  ["a drag term out of form", putSealed(LINE1, 54, "-2248.-4"), 54, /drag term/],
  [
    "the ephemeris type of another theory",
    putSealed(LINE1, 63, "4"),
    63,
    /ephemeris type is 4; only sets for SGP4/,
  ],
  [
    "an ephemeris type that is no digit",
    putSealed(LINE1, 63, "x"),
    63,
    /ephemeris type \(column 63\) is "x"/,
  ],
  ["an element set number out of form", putSealed(LINE1, 65, " 9 9"), 65, /element set number/],
  ["a filled blank column", putSealed(LINE1, 33, "7"), 33, /Column 33 of line 1 is "7"; a blank is expected/],
  ["a tab", put(LINE1, 33, "\t"), 33, /A tab stands here/],
  ["a no-break space", put(LINE1, 18, "\u00A0"), 18, /character U\+00A0 stands here/],
  ["a NUL", put(LINE1, 40, "\0"), 40, /character U\+0000 stands here/],
  ["a no-break space at its end", `${LINE1}\u00A0`, 70, /character U\+00A0/],
  ["a missing column", LINE1.slice(0, 68), 69, /Line 1 has 68 columns; 69 are expected/],
  ["text after column 69", `${LINE1} 12.0`, 70, /goes on after column 69 with "12.0"/],
  ["a spoilt line number", sealed(put(LINE1, 1, "3")), 1, /line number \(column 1\) is "3"; expected: 1/],
  ["the other line's number", sealed(put(LINE1, 1, "2")), 1, /line number \(column 1\) is "2"; expected: 1/],
  [
    "a blank before it",
    ` ${LINE1}`,
    1,
    /line number \(column 1\) is " "; expected: 1\. Also line 2, column 70/,
  ],
];

const ON_LINE2: readonly [what: string, line2: string, column: number, message: RegExp][] = [
  [
    "a wrong checksum",
    put(LINE2, 69, "3"),
    69,
    /checksum of line 2 is printed as "3" but its 68 columns give 9/,
  ],
  ["another catalogue number", putSealed(LINE2, 3, "00006"), 3, /is "00006" here but "00005" on line 1/],
  [
    "an inclination above 180",
    putSealed(LINE2, 9, "180.0001"),
    9,
    /inclination is 180.0001 degrees; it lies between 0 and 180/,
  ],
  ["an inclination out of form", putSealed(LINE2, 9, " 34.244 "), 9, /inclination \(columns 9 to 16\)/],
  ["a blank within an angle", putSealed(LINE2, 9, "1 4.2443"), 9, /inclination \(columns 9 to 16\)/],
  [
    "a node above 360",
    putSealed(LINE2, 18, "360.0001"),
    18,
    /right ascension of the ascending node is 360.0001/,
  ],
  [
    "a negative node",
    putSealed(LINE2, 18, "-25.5254"),
    18,
    /right ascension of the ascending node \(columns 18 to 25\)/,
  ],
  ["an eccentricity with a point", putSealed(LINE2, 27, ".184568"), 27, /eccentricity .* seven digits/],
  ["an eccentricity with a blank", putSealed(LINE2, 27, " 845686"), 27, /eccentricity .* seven digits/],
  ["a pericentre above 360", putSealed(LINE2, 35, "999.2516"), 35, /argument of pericentre is 999.2516/],
  ["an anomaly above 360", putSealed(LINE2, 44, "361.2356"), 44, /mean anomaly is 361.2356/],
  [
    "a mean motion of nil",
    putSealed(LINE2, 53, " 0.00000000"),
    53,
    /mean motion is 0 revolutions a day: .* leave the Earth/,
  ],
  ["a mean motion too high", putSealed(LINE2, 53, "17.20000000"), 53, /inside the Earth/],
  ["a mean motion out of form", putSealed(LINE2, 53, "10.848691 4"), 53, /mean motion \(columns 53 to 63\)/],
  ["a revolution number out of form", putSealed(LINE2, 64, "218x4"), 64, /revolution number/],
  ["a filled blank column", putSealed(LINE2, 26, "0"), 26, /Column 26 of line 2/],
  ["text after column 69 without a blank", `${LINE2}12.0`, 70, /goes on after column 69 with "12.0"/],
  ["words after column 69", `${LINE2} see note`, 70, /goes on after column 69 with "see note"/],
  ["its end missing", LINE2.slice(0, 60), 61, /Line 2 has 60 columns; 69 are expected/],
  ["a spoilt line number", sealed(put(LINE2, 1, "7")), 1, /line number \(column 1\) is "7"; expected: 2/],
  ["the other line's number", sealed(put(LINE2, 1, "1")), 1, /line number \(column 1\) is "1"; expected: 2/],
];

describe("a bad TLE is refused once, at its line and column", () => {
  it.each(ON_LINE1)("for %s on line 1", (_what, line1, column, message) => {
    const refusal = refusalOf(line1, LINE2);
    expect([refusal.line, refusal.column]).toEqual([2, column]);
    expect(refusal.message).toMatch(message);
  });

  it.each(ON_LINE2)("for %s on line 2", (_what, line2, column, message) => {
    const refusal = refusalOf(LINE1, line2);
    expect([refusal.line, refusal.column]).toEqual([3, column]);
    expect(refusal.message).toMatch(message);
  });

  it("for a catalogue number of nil", () => {
    const refusal = refusalOf(putSealed(LINE1, 3, "00000"), putSealed(LINE2, 3, "00000"));
    expect(refusal).toMatchObject({ line: 2, column: 3 });
    expect(refusal.message).toContain("a number above 00000");
  });

  it("for a name with a control character", () => {
    const refusal = refusalOf(LINE1, LINE2, "VANG\0UARD");
    expect(refusal).toMatchObject({ line: 1, column: 5 });
    expect(refusal.message).toContain("U+0000");
  });

  it("for a name that is too long", () => {
    expect(refusalOf(LINE1, LINE2, "N".repeat(81))).toMatchObject({ line: 1, column: 81 });
  });

  it("for an orbit that is inside the Earth at its epoch, by SGP4's word", () => {
    // Mean motion 16.9 and the anomaly at pericentre: some 6,400 km × (1 − 0.18) from the centre.
    const line2 = putSealed(putSealed(LINE2, 53, "16.90000000"), 44, "  0.0000");
    const refusal = refusalOf(LINE1, line2);
    expect(refusal).toMatchObject({ line: 2, column: 1 });
    expect(refusal.message).toMatch(/^SGP4 does not take this set\. /);
  });

  it("with everything that is wrong, the first fault first", () => {
    const refusal = refusalOf(put(LINE1, 69, "0"), put(LINE2, 69, "0"));
    expect(refusal).toMatchObject({ line: 2, column: 69 });
    expect(refusal.message).toMatch(/give 8\. Also line 3, column 69: The checksum of line 2 .* give 9\.$/);
  });

  it("naming the first field out of place when a character is missing within", () => {
    const refusal = refusalOf(LINE1, LINE2.slice(0, 20) + LINE2.slice(21));
    expect(refusal.message).toMatch(
      /Line 2 has 68 columns; 69 are expected\. Also line 3, column 18: The right ascension/,
    );
  });
});
