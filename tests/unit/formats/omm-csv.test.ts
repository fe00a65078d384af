import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { OMM } from "./lines";

const FROM_JSON = parseElementSets(JSON.stringify(OMM)).accepted[0]?.elements;
const HEAD = Object.keys(OMM).join(",");

function row(changes: Record<string, string | number> = {}): string {
  return Object.values({ ...OMM, ...changes }).join(",");
}

describe("good OMMs in CSV", () => {
  it.each<[string, string]>([
    ["plain", `${HEAD}\n${row()}`],
    ["with CR LF, blank lines and a byte order mark", `\uFEFF${HEAD}\r\n\r\n${row()}\r\n`],
    [
      "with quotes",
      `${HEAD.replace("EPOCH", '"EPOCH"')}\n${row({ OBJECT_NAME: ' "VANGUARD 1" ', BSTAR: '"-.22483E-4"' })}`,
    ],
    [
      "in another order with unknown columns",
      `X,${[...HEAD.split(",")].reverse().join(",")}\n"a,b",${row().split(",").reverse().join(",")}`,
    ],
  ])("may be %s", (_what, text) => {
    const { accepted, rejected } = parseElementSets(text);
    expect(rejected).toEqual([]);
    expect(accepted.map((s) => s.elements)).toEqual([FROM_JSON]);
    expect(accepted[0]?.format).toBe("omm-csv");
  });

  it("carry their header in their raw text, so that it can be read again", () => {
    const [set] = parseElementSets(`${HEAD}\r\n${row({ NORAD_CAT_ID: 7 })}\r\n${row()}\r\n`).accepted.slice(
      1,
    );
    expect(set).toMatchObject({ line: 3, raw: `${HEAD}\r\n${row()}` });
    expect(parseElementSets(set?.raw ?? "").accepted[0]?.elements).toEqual(set?.elements);
  });

  it("may hold commas and doubled quotes in quoted names", () => {
    const text = `${HEAD}\n${row({ OBJECT_NAME: '"DEB, ""A"""' })}`;
    expect(parseElementSets(text).accepted[0]?.elements.objectName).toBe('DEB, "A"');
  });
});

describe("bad OMMs in CSV", () => {
  it.each<[string, string, number, RegExp]>([
    ["a value out of range", row({ ECCENTRICITY: 1.5 }), 61, /eccentricity is 1.5/],
    ["an empty value", row({ EPOCH: "" }), 22, /EPOCH has no value/],
    ["a control character", row({ REV_AT_EPOCH: "1\u0007" }), 117, /control character U\+0007/],
    ["a value too few", row().replace(",999", ""), 1, /row has 16 values; the header has 17/],
    [
      "a quote in the wrong place",
      row({ OBJECT_ID: '19"58' }),
      12,
      /quote in the wrong place or never closed/,
    ],
    ["a quote that is not closed", row({ OBJECT_NAME: '"VANGUARD' }), 1, /never closed/],
    [
      "a line too long",
      row({ OBJECT_NAME: "x".repeat(5_000) }),
      4_001,
      /has \d+ characters; 4000 are allowed/,
    ],
  ])("are refused at their place for %s, and the next is read", (_what, bad, column, message) => {
    const { accepted, rejected } = parseElementSets(`${HEAD}\n${bad}\n${row({ NORAD_CAT_ID: 6 })}\n`);
    expect(accepted.map((s) => s.elements.catalogNumber)).toEqual([6]);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]).toMatchObject({ line: 2, column });
    expect(rejected[0]?.message).toMatch(message);
  });

  it.each<[string, string, RegExp]>([
    ["lacks a column", HEAD.replace("EPOCH", "TIME"), /^The header has no column EPOCH\.$/],
    ["names a column twice", HEAD.replace("EPHEMERIS_TYPE", "EPOCH"), /keyword "EPOCH" comes twice/],
    ["holds a control character", `${HEAD}\0`, /control character U\+0000/],
    ["has a broken quote", HEAD.replace("EPHEMERIS_TYPE", 'A"B'), /quote in the wrong place/],
  ])("are refused as a whole when the header %s", (_what, head, message) => {
    const { accepted, rejected } = parseElementSets(`${head}\n${row()}\n${row()}\n`);
    expect(accepted).toEqual([]);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]).toMatchObject({ line: 1 });
    expect(rejected[0]?.message).toMatch(message);
  });
});
