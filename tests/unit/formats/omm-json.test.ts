import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { LINE1, LINE2, NAME, OMM } from "./lines";

const PRETTY = JSON.stringify([OMM], null, 2);

/** The OMM with some values replaced; undefined takes a keyword out. */
function withValues(changes: Record<string, unknown>): string {
  return JSON.stringify([{ ...OMM, ...changes }], null, 2);
}

function only(text: string) {
  const { accepted, rejected } = parseElementSets(text);
  expect(rejected).toEqual([]);
  const [set] = accepted;
  if (!set || accepted.length > 1) throw new Error(`${accepted.length} sets`);
  return set;
}

function refusal(text: string) {
  const { accepted, rejected } = parseElementSets(text);
  expect(accepted).toEqual([]);
  const [first] = rejected;
  if (!first || rejected.length > 1) throw new Error(`${rejected.length} refusals`);
  return first;
}

/** 1-based line and column of the value of a keyword in pretty-printed text. */
function placeOf(text: string, keyword: string) {
  const lines = text.split("\n");
  const index = lines.findIndex((line) => line.includes(`"${keyword}": `));
  const lead = `    "${keyword}": `;
  expect(lines[index]?.startsWith(lead)).toBe(true);
  return { line: index + 1, column: lead.length + 1 };
}

describe("a good OMM in JSON", () => {
  it("gives the same elements as the TLE published with it", () => {
    const fromTle = only(`${NAME}\n${LINE1}\n${LINE2}`).elements;
    expect(only(PRETTY).elements).toEqual(fromTle);
  });

  it.each([
    ["one object", JSON.stringify(OMM)],
    ["a list on one line", JSON.stringify([OMM])],
    ["a list with line breaks", PRETTY],
    ["an object after a byte order mark", `\uFEFF ${JSON.stringify(OMM)}`],
    ["values as text", withValues(Object.fromEntries(Object.entries(OMM).map(([k, v]) => [k, String(v)])))],
    ["a leading point and capital E", withValues({ ECCENTRICITY: ".1845686", BSTAR: "-.22483E-4" })],
    ["its epoch with Z", withValues({ EPOCH: "2020-10-13T04:52:48.472320Z" })],
    ["its epoch by day of the year", withValues({ EPOCH: "2020-287T04:52:48.472320" })],
    [
      "the fixed keywords spelt out",
      withValues({
        CCSDS_OMM_VERS: "3.0",
        CENTER_NAME: "EARTH",
        REF_FRAME: "TEME",
        TIME_SYSTEM: "UTC",
        MEAN_ELEMENT_THEORY: "SGP4",
      }),
    ],
    ["unknown keywords of any kind", withValues({ TAGS: ["a", { b: [null, true] }], SITE: null })],
  ])("may be %s", (_what, text) => {
    expect(only(text).elements).toEqual(only(PRETTY).elements);
  });

  it("may have a catalogue number of nine digits", () => {
    expect(only(withValues({ NORAD_CAT_ID: 799_999_999 })).elements.catalogNumber).toBe(799_999_999);
    expect(only(withValues({ NORAD_CAT_ID: "799999999" })).elements.catalogNumber).toBe(799_999_999);
  });

  it("keeps the microseconds of its epoch", () => {
    const { epochMs } = only(withValues({ EPOCH: "2031-04-06T03:12:45.123457Z" })).elements;
    expect(Math.floor(epochMs)).toBe(Date.UTC(2031, 3, 6, 3, 12, 45, 123));
    expect(Math.round((epochMs % 1) * 1000)).toBe(457);
  });

  it("may leave out names and derivatives of the mean motion", () => {
    const { elements } = only(
      withValues({
        OBJECT_NAME: undefined,
        OBJECT_ID: "",
        MEAN_MOTION_DOT: undefined,
        MEAN_MOTION_DDOT: null,
      }),
    );
    expect(elements).toMatchObject({ objectName: null, objectId: null, meanMotionDot: 0, meanMotionDdot: 0 });
  });

  it("keeps its own text and says on which line it begins", () => {
    const set = only(PRETTY);
    expect(set).toMatchObject({ format: "omm-json", line: 2 });
    expect(set.raw).toBe(PRETTY.slice(PRETTY.indexOf("{"), PRETTY.lastIndexOf("}") + 1));
  });
});

const BAD_VALUES: readonly [keyword: string, value: unknown, message: RegExp][] = [
  ["NORAD_CAT_ID", 0, /NORAD_CAT_ID is "0"; a number of one to nine digits above 0 is expected/],
  ["NORAD_CAT_ID", 1_000_000_000, /one to nine digits/],
  ["NORAD_CAT_ID", "A0001", /NORAD_CAT_ID is "A0001"/],
  ["NORAD_CAT_ID", 5.5, /NORAD_CAT_ID is "5.5"/],
  ["EPOCH", "2021-02-29T00:00:00", /EPOCH is "2021-02-29T00:00:00"; expected: a UTC time/],
  ["EPOCH", "2020-10-13 04:52:48", /EPOCH is/],
  ["EPOCH", "2020-10-13T04:52:48+02:00", /EPOCH is/],
  ["EPOCH", "2020-10-13T24:00:00", /EPOCH is/],
  ["EPOCH", "2016-12-31T23:59:60", /EPOCH is/],
  ["EPOCH", "1956-10-13T04:52:48", /EPOCH is/],
  ["EPOCH", "2020-10-13T04:52:48.1234567", /EPOCH is/],
  ["EPOCH", 20_287.2, /EPOCH is "20287.2"/],
  ["MEAN_MOTION", "10,8", /MEAN_MOTION is "10,8"; a finite number is expected/],
  ["MEAN_MOTION", 17.2, /mean motion is 17.2 revolutions a day: .* inside the Earth/],
  ["MEAN_MOTION", 0, /leave the Earth/],
  ["ECCENTRICITY", "NaN", /ECCENTRICITY is "NaN"; a finite number is expected/],
  ["ECCENTRICITY", 1, /eccentricity is 1; it lies between 0 and 1, without 1/],
  ["ECCENTRICITY", -0.1, /eccentricity is -0.1/],
  ["INCLINATION", 180.1, /inclination is 180.1 degrees/],
  ["RA_OF_ASC_NODE", -0.5, /right ascension of the ascending node is -0.5/],
  ["ARG_OF_PERICENTER", 360.5, /argument of pericentre is 360.5/],
  ["MEAN_ANOMALY", true, /MEAN_ANOMALY is true; a plain value is expected/],
  ["BSTAR", "1e999", /BSTAR is "1e999"; a finite number/],
  ["BSTAR", [0], /BSTAR is a list; a plain value/],
  ["MEAN_MOTION_DOT", "-", /MEAN_MOTION_DOT is "-"; a finite number/],
  ["MEAN_MOTION_DDOT", { of: 1 }, /MEAN_MOTION_DDOT is an object/],
  ["OBJECT_NAME", "A\u0007B", /OBJECT_NAME holds the unprintable character U\+0007/],
  ["OBJECT_ID", "x".repeat(81), /OBJECT_ID has 81 characters/],
  ["EPHEMERIS_TYPE", 4, /EPHEMERIS_TYPE is "4"; only 0 can be used/],
  ["EPOCH", null, /EPOCH has no value/],
];

describe("a bad OMM in JSON is refused at the offending value", () => {
  it.each(BAD_VALUES)("for %s: %j", (keyword, value, message) => {
    const text = withValues({ [keyword]: value });
    const found = refusal(text);
    expect(found).toMatchObject(placeOf(text, keyword));
    expect(found.message).toMatch(message);
  });

  it.each([
    ["CCSDS_OMM_VERS", "1.0", /OMM version is "1.0"; 2.0 and 3.0 are read/],
    ["CENTER_NAME", "MOON", /CENTER_NAME is "MOON"; only EARTH can be used/],
    ["REF_FRAME", "GCRF", /REF_FRAME is "GCRF"; only TEME can be used/],
    ["TIME_SYSTEM", "TAI", /TIME_SYSTEM is "TAI"; only UTC can be used/],
    [
      "MEAN_ELEMENT_THEORY",
      "SGP4-XP",
      /MEAN_ELEMENT_THEORY is "SGP4-XP"; only SGP4 or SGP\/SGP4 can be used/,
    ],
  ])("for %s %s", (keyword, value, message) => {
    const text = withValues({ [keyword]: value });
    const found = refusal(text);
    expect(found).toMatchObject(placeOf(text, keyword));
    expect(found.message).toMatch(message);
  });

  it.each(["NORAD_CAT_ID", "EPOCH", "MEAN_MOTION", "ECCENTRICITY", "INCLINATION", "RA_OF_ASC_NODE", "BSTAR"])(
    "for a missing %s, at the object's beginning",
    (keyword) => {
      const found = refusal(withValues({ [keyword]: undefined }));
      expect(found).toMatchObject({ line: 2, column: 3, message: `${keyword} is missing.` });
    },
  );

  it("for a keyword that comes twice, at its second place", () => {
    const found = refusal('{"EPOCH": "2020-10-13T04:52:48",\n "EPOCH": "2020-10-14T04:52:48"}');
    expect(found).toMatchObject({
      line: 2,
      column: 2,
      message: 'The keyword "EPOCH" comes twice in this set.',
    });
  });

  it("with all its faults in the order of the text", () => {
    const { message } = refusal(withValues({ ECCENTRICITY: "x", EPOCH: "y", BSTAR: undefined }));
    expect(message).toMatch(
      /^BSTAR is missing\. Also line 5, column 14: EPOCH .* Also line 7, column 21: ECCENTRICITY/,
    );
  });
});
