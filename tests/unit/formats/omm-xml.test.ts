import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { OMM } from "./lines";

const FROM_JSON = parseElementSets(JSON.stringify(OMM)).accepted[0]?.elements;
const IN_META = new Set(["OBJECT_NAME", "OBJECT_ID"]);
const IN_MEAN = new Set([
  "EPOCH",
  "MEAN_MOTION",
  "ECCENTRICITY",
  "INCLINATION",
  "RA_OF_ASC_NODE",
  "ARG_OF_PERICENTER",
  "MEAN_ANOMALY",
]);

/** An omm element, one keyword a line, with some values replaced; a value is written as it is. */
function omm(changes: Record<string, string | number> = {}): string {
  const values = Object.entries({ ...OMM, ...changes });
  const part = (of: (keyword: string) => boolean) =>
    values
      .filter(([keyword]) => of(keyword))
      .map(([keyword, value]) => `<${keyword}>${value}</${keyword}>`)
      .join("\n");
  return [
    '<omm id="CCSDS_OMM_VERS" version="2.0"><header><CREATION_DATE/><ORIGINATOR/></header><body><segment><metadata>',
    part((k) => IN_META.has(k)),
    "</metadata><data><meanElements>",
    part((k) => IN_MEAN.has(k)),
    "</meanElements><tleParameters>",
    part((k) => !IN_META.has(k) && !IN_MEAN.has(k)),
    "</tleParameters></data></segment></body></omm>",
  ].join("\n");
}

function file(...elements: string[]): string {
  return `<?xml version="1.0" encoding="UTF-8"?>\n<ndm>\n${elements.join("\n")}\n</ndm>\n`;
}

describe("a good OMM in XML", () => {
  it.each<[string, string]>([
    ["in ndm", file(omm())],
    ["alone", omm()],
    [
      "with comments",
      `${file("<!-- <omm> -->", omm({ EPOCH: `2020-10-13T<!-- UTC -->04:52:48.472320` }))}<!-- z -->`,
    ],
    ["with CR LF and a byte order mark", `\uFEFF${file(omm()).replaceAll("\n", "\r\n")}`],
    ["with a namespace prefix", file(omm()).replace("<omm ", "<n:omm ").replace("</omm>", "</n:omm>")],
    ["with units", file(omm().replace("<INCLINATION>", '<INCLINATION units="deg">'))],
    [
      "with unknown elements that repeat",
      file(
        omm().replace(
          "</segment>",
          '<userDefinedParameters><USER_DEFINED parameter="A">1</USER_DEFINED><USER_DEFINED parameter="B">2</USER_DEFINED></userDefinedParameters></segment>',
        ),
      ),
    ],
  ])("may stand %s", (_what, text) => {
    const { accepted, rejected } = parseElementSets(text);
    expect(rejected).toEqual([]);
    expect(accepted.map((s) => s.elements)).toEqual([FROM_JSON]);
    expect(accepted[0]?.format).toBe("omm-xml");
  });

  it("keeps its own text and line", () => {
    const { accepted } = parseElementSets(file(omm(), omm({ NORAD_CAT_ID: 6 })));
    expect(accepted.map((s) => [s.line, s.raw])).toEqual([
      [3, omm()],
      [3 + omm().split("\n").length, omm({ NORAD_CAT_ID: 6 })],
    ]);
  });

  it("may use the five predefined entities", () => {
    const { accepted } = parseElementSets(file(omm({ OBJECT_NAME: "A &amp; B &lt;&quot;&apos;&gt;" })));
    expect(accepted[0]?.elements.objectName).toBe("A & B <\"'>");
  });
});

describe("a bad OMM in XML", () => {
  it.each<[string, string, number, number, RegExp]>([
    ["a value out of range", omm({ ECCENTRICITY: 1.5 }), 9, 15, /eccentricity is 1.5/],
    ["an empty value", omm({ EPOCH: "" }), 7, 8, /^EPOCH has no value\.$/],
    [
      "a wrong unit",
      omm().replace("<INCLINATION>", '<INCLINATION units="rad">'),
      10,
      26,
      /unit of INCLINATION is "rad"/,
    ],
    ["another version", omm().replace('"2.0"', '"1.0"'), 3, 1, /OMM version is "1.0"/],
    [
      "a keyword twice",
      omm({ EPHEMERIS_TYPE: "0</EPHEMERIS_TYPE>\n<EPOCH>x</EPOCH>\n<EPHEMERIS_TYPE>" }),
      16,
      1,
      /keyword "EPOCH" comes twice/,
    ],
    [
      "a tag closed by another",
      omm().replace("</EPOCH>", "</EPOHC>"),
      7,
      34,
      /<\/EPOHC> closes no element that is open here/,
    ],
    ["a broken tag", omm().replace("<EPOCH>", "<EPOCH"), 7, 1, /is no well-formed tag/],
    [
      "an attribute twice",
      omm().replace("<EPOCH>", '<EPOCH a="1" a="2">'),
      7,
      1,
      /attribute "a" comes twice/,
    ],
    ["an unknown entity", omm({ OBJECT_NAME: "a &evil; b" }), 4, 16, /entity "&evil;" is not read/],
    ["a numbered entity", omm({ OBJECT_NAME: "&#65;" }), 4, 14, /entity "&#65;" is not read/],
    ["a bare ampersand", omm({ OBJECT_NAME: "A & B" }), 4, 16, /entity "&" is not read/],
    ["text among elements", omm({ EPOCH: "2020-10-13T04:52:48<A/>.5" }), 7, 8, /stands among elements/],
    ["a control character", omm({ REV_AT_EPOCH: "1\0" }), 19, 16, /control character U\+0000/],
    ["a processing instruction", omm({ OBJECT_NAME: "<?php x ?>" }), 4, 14, /processing instruction/],
    [
      "its end missing",
      omm().replace("</omm>", ""),
      3 + omm().split("\n").length,
      1,
      /omm element before this one is not closed/,
    ],
    ["too much in it", omm({ COMMENT: "x".repeat(21_000) }), 23, 10, /more than 20000 characters/],
  ])("for %s is refused at its place, and the next is read", (_what, bad, line, column, message) => {
    const { accepted, rejected } = parseElementSets(file(bad, omm({ NORAD_CAT_ID: 6 })));
    expect(accepted.map((s) => s.elements.catalogNumber)).toEqual([6]);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]?.message).toMatch(message);
    expect([rejected[0]?.line, rejected[0]?.column]).toEqual([line, column]);
  });

  it.each<[string, string, RegExp]>([
    [
      "a document type definition",
      `<!DOCTYPE ndm [<!ENTITY a "b">]>\n<ndm>${omm()}</ndm>`,
      /^Document type definitions and CDATA/,
    ],
    ["CDATA", `<ndm><![CDATA[ x ]]>${omm()}</ndm>`, /^Document type definitions and CDATA/],
    ["a comment without an end", `<ndm><!-- ${omm()}</ndm>`, /comment is not closed/],
    ["another message", "<ndm><oem></oem></ndm>", /holds no element set/],
    ["an end tag too many", "</ndm>", /closes no element/],
    ["text around it", "<ndm></ndm> and so on", /belongs to no element/],
    ["an element left open", "<ndm><header>", /element "header" is not closed/],
    ["its end within an omm", "<ndm><omm><EPOCH>2", /ends within this omm element/],
  ])("text with %s gives nothing but a refusal", (_what, text, message) => {
    const { accepted, rejected } = parseElementSets(text);
    expect(accepted).toEqual([]);
    expect(rejected).toHaveLength(1);
    expect(rejected[0]?.message).toMatch(message);
  });
});
