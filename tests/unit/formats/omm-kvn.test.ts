import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { OMM } from "./lines";

const FROM_JSON = parseElementSets(JSON.stringify(OMM)).accepted[0]?.elements;
const HEADER = { CCSDS_OMM_VERS: "3.0", CREATION_DATE: "2020-10-13T06:00:00", ORIGINATOR: "TEST" };

/** Keyword-value text of the OMM with some values replaced. */
function kvn(changes: Record<string, string | number | undefined> = {}, header: object = HEADER): string {
  return Object.entries({ ...header, ...OMM, ...changes })
    .filter(([, value]) => value !== undefined)
    .map(([keyword, value]) => `${keyword} = ${value}`)
    .join("\n");
}

function refusal(text: string) {
  const { accepted, rejected } = parseElementSets(text);
  expect(accepted).toEqual([]);
  expect(rejected).toHaveLength(1);
  const [first] = rejected;
  if (!first) throw new Error("no refusal");
  return first;
}

describe("a good OMM in keyword-value notation", () => {
  it.each<[string, string]>([
    ["plain", kvn()],
    ["without a header", kvn({}, {})],
    [
      "with blanks, remarks, CR LF and a byte order mark",
      `\uFEFF\r\nCOMMENT a = b\r\n${kvn().replaceAll("\n", "  \r\n\r\n  ").replaceAll(" = ", "\t=  ")}\r\n`,
    ],
    [
      "with units",
      kvn({ INCLINATION: "34.2443 [deg]", MEAN_MOTION: "10.84869164 [REV/DAY]", BSTAR: "-0.22483e-4[1/ER]" }),
    ],
  ])("may be %s", (_what, text) => {
    const { accepted, rejected } = parseElementSets(text);
    expect(rejected).toEqual([]);
    expect(accepted.map((s) => s.elements)).toEqual([FROM_JSON]);
    expect(accepted[0]?.format).toBe("omm-kvn");
  });

  it("keeps brackets in names", () => {
    expect(parseElementSets(kvn({ OBJECT_NAME: "DEB [7]" })).accepted[0]?.elements.objectName).toBe(
      "DEB [7]",
    );
  });

  it.each([
    ["version lines", HEADER],
    ["names", {}],
    ["names after one header", null],
  ])("may follow another, parted by %s", (_what, header) => {
    const [one, two] = header
      ? [kvn({}, header), kvn({ NORAD_CAT_ID: 6 }, header)]
      : [kvn(), kvn({ NORAD_CAT_ID: 6 }, {})];
    const { accepted, rejected } = parseElementSets(`${one}\n\n${two}\n`);
    expect(rejected).toEqual([]);
    expect(accepted.map((s) => [s.elements.catalogNumber, s.line, s.raw])).toEqual([
      [5, 1, one],
      [6, one.split("\n").length + 2, two],
    ]);
  });
});

describe("a bad OMM in keyword-value notation", () => {
  it.each<[string, string | number | undefined, number, number, RegExp]>([
    ["ECCENTRICITY", 1.2, 8, 16, /eccentricity is 1.2; it lies between/],
    ["ECCENTRICITY", "", 8, 15, /ECCENTRICITY has no value/],
    ["EPOCH", "yesterday", 6, 9, /EPOCH is "yesterday"/],
    ["INCLINATION", "34.2443 [rad]", 9, 15, /unit of INCLINATION is "rad"; expected: deg/],
    ["ECCENTRICITY", "0.1 [deg]", 8, 16, /unit of ECCENTRICITY is "deg"; it has none/],
    ["REF_FRAME", "ICRF", 21, 13, /REF_FRAME is "ICRF"; only TEME/],
    ["BSTAR", undefined, 1, 1, /^BSTAR is missing\.$/],
  ])("is refused at its place: %s = %s", (keyword, value, line, column, message) => {
    const found = refusal(kvn({ [keyword]: value }));
    expect([found.line, found.column]).toEqual([line, column]);
    expect(found.message).toMatch(message);
  });

  it.each<[string, string, number, RegExp]>([
    [
      "a line without a keyword",
      kvn().replace("EPOCH = ", "EPOCH "),
      6,
      /The line "EPOCH 2020.* is not of the form KEYWORD = value/,
    ],
    ["a keyword twice", kvn().replace("EPHEMERIS_TYPE", "EPOCH"), 13, /keyword "EPOCH" comes twice/],
    [
      "another message",
      "CCSDS_OEM_VERS = 2.0\nMETA_START",
      1,
      /CCSDS_OEM_VERS begins another message than an OMM/,
    ],
    ["a line too long", kvn({ OBJECT_NAME: "x".repeat(5_000) }), 4, /has more than 4000 characters/],
    [
      "too much in one set",
      `${kvn()}\n${"USER_DEFINED_A = b\n".repeat(2_000)}`,
      1,
      /more than 20000 characters/,
    ],
  ])("with %s is refused, and the next is read", (_what, bad, line, message) => {
    const { accepted, rejected } = parseElementSets(`${bad}\n\n${kvn({ NORAD_CAT_ID: 6 })}`);
    expect(accepted.map((s) => s.elements.catalogNumber)).toEqual([6]);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]?.line).toBe(line);
    expect(rejected[0]?.message).toMatch(message);
  });
});
