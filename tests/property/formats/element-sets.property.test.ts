import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type ParsedSet, type ParsedText, parseElementSets } from "@/lib/formats/element-sets";
import { elementsToOmm } from "@/lib/formats/elements-to-omm";
import { makeOrbit } from "@/lib/physics/orbit/propagate";

/** 1,200 sets as published by CelesTrak in October 2021. */
const LINES = readFileSync("../shared/reference/published-debris-2021.tle", "latin1").trimEnd().split("\n");
const SETS = Array.from({ length: 1200 }, (_, i) => LINES.slice(3 * i, 3 * i + 3));
const OMMS = parseElementSets(LINES.join("\n")).accepted.map((s) => elementsToOmm(s.elements));

const anySet = fc.integer({ min: 0, max: SETS.length - 1 }).map((i) => (SETS[i] ?? []).join("\n"));
const anyOmm = fc.integer({ min: 0, max: OMMS.length - 1 }).map((i) => JSON.stringify(OMMS[i], null, 1));

/** The same sets in the other encodings, as a test writes them. */
const anyEncoded = fc
  .tuple(fc.integer({ min: 0, max: OMMS.length - 1 }), fc.constantFrom("kvn", "xml", "csv"))
  .map(([i, form]) => {
    const entries = Object.entries(OMMS[i] ?? {});
    if (form === "kvn") return entries.map(([k, v]) => `${k} = ${v}`).join("\n");
    if (form === "csv")
      return `${entries.map(([k]) => k).join(",")}\n${entries.map(([, v]) => `"${v}"`).join(",")}`;
    const leaves = entries.filter(([k]) => k !== "CCSDS_OMM_VERS").map(([k, v]) => `<${k}>${v}</${k}>`);
    return `<ndm><omm version="3.0"><body>${leaves.join("\n")}</body></omm></ndm>`;
  });

/** A text with some characters replaced, taken out or put in. */
function damaged(text: fc.Arbitrary<string>): fc.Arbitrary<string> {
  const character = fc.oneof(
    fc.constantFrom(...'0123456789 .-+AIOZ\n\r\t\u00A0\0{}[]":,'),
    fc.string({ unit: "binary", minLength: 1, maxLength: 1 }),
  );
  const edit = fc.record({
    at: fc.double({ min: 0, max: 1, noNaN: true }),
    drop: fc.nat({ max: 2 }),
    put: fc.option(character),
  });
  return fc.tuple(text, fc.array(edit, { minLength: 1, maxLength: 4 })).map(([whole, edits]) =>
    edits.reduce((now, { at, drop, put }) => {
      const index = Math.floor(at * now.length);
      return now.slice(0, index) + (put ?? "") + now.slice(index + drop);
    }, whole),
  );
}

/** The checksum in its own words: digits count themselves, minus signs one, over the first 68 columns. */
function checksum(line: string): string {
  const sum = Array.from(line.slice(0, 68)).reduce(
    (total, c) => total + (c === "-" ? 1 : Number(/\d/.exec(c)?.[0] ?? 0)),
    0,
  );
  return String(sum % 10);
}

function expectSound(set: ParsedSet, text: string): void {
  const { objectName, objectId, ...numbers } = set.elements;
  for (const value of Object.values(numbers)) expect(Number.isFinite(value)).toBe(true);
  for (const name of [objectName, objectId]) expect(name ?? "").not.toMatch(/\p{Cc}/u);
  expect(numbers.catalogNumber).toBeGreaterThan(0);
  expect(numbers.catalogNumber).toBeLessThanOrEqual(999_999_999);
  expect(numbers.eccentricity).toBeLessThan(1);
  expect(makeOrbit(set.elements).ok).toBe(true);
  expect(set.line).toBeGreaterThan(0);
  expect(set.raw).not.toContain("\0");
  if (set.format !== "tle") {
    // The raw text of a CSV set is two lines that need not follow each other.
    for (const part of set.format === "omm-csv" ? set.raw.split(/\r\n|\n|\r/) : [set.raw])
      expect(text).toContain(part);
    return;
  }
  const [line1 = "", line2 = ""] = set.raw.split(/\r\n|\n|\r/).slice(-2);
  expect(line1.charAt(68)).toBe(checksum(line1));
  expect(line2.charAt(68)).toBe(checksum(line2));
}

function expectAllSound(text: string): ParsedText {
  const result = parseElementSets(text);
  for (const set of result.accepted) expectSound(set, text);
  const lines = text.split(/\r\n|\n|\r/).length;
  for (const { line, column, message, raw } of result.rejected) {
    expect(line).toBeGreaterThanOrEqual(1);
    expect(line).toBeLessThanOrEqual(lines);
    expect(column).toBeGreaterThanOrEqual(1);
    expect(message).toMatch(/\.$/);
    // Messages go into pages and mails: plain printable text, whatever the file held.
    expect(message).toMatch(/^[ -~…]+$/);
    expect(raw.length).toBeLessThanOrEqual(4_000);
  }
  expect(result.accepted.length + result.rejected.length).toBeGreaterThan(0);
  return result;
}

describe("reading element sets", () => {
  it("never throws and never takes anything unsound, whatever the text", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 400 }), (text) => void expectAllSound(text)),
      { numRuns: 1_000 },
    );
    fc.assert(
      fc.property(
        fc.uint8Array({ maxLength: 400 }),
        (bytes) => void expectAllSound(Buffer.from(bytes).toString("utf8")),
      ),
      { numRuns: 1_000 },
    );
  });

  it("never takes anything unsound from damaged sets", () => {
    fc.assert(
      fc.property(damaged(anySet), (text) => void expectAllSound(text)),
      { numRuns: 3_000 },
    );
  });

  it("never takes anything unsound from damaged OMMs", () => {
    fc.assert(
      fc.property(damaged(anyOmm), (text) => void expectAllSound(text)),
      { numRuns: 3_000 },
    );
    fc.assert(
      fc.property(damaged(fc.json()), (text) => void expectAllSound(text)),
      { numRuns: 1_000 },
    );
  });

  it("takes the undamaged in every encoding, and nothing unsound from the damaged", () => {
    fc.assert(
      fc.property(anyEncoded, (text) => {
        expect(expectAllSound(text).rejected).toEqual([]);
      }),
      { numRuns: 300 },
    );
    fc.assert(
      fc.property(damaged(anyEncoded), (text) => void expectAllSound(text)),
      { numRuns: 3_000 },
    );
    const lead = fc.constantFrom(
      "{",
      "[{",
      "<",
      "<omm>",
      "<!--",
      "A = ",
      "CCSDS_OMM_VERS = 3.0\n",
      "EPOCH,BSTAR,NORAD_CAT_ID,X\n",
      "1 ",
    );
    fc.assert(
      fc.property(
        lead,
        fc.string({ unit: "binary", maxLength: 200 }),
        (head, rest) => void expectAllSound(head + rest),
      ),
      { numRuns: 3_000 },
    );
  });

  it("takes no line of which a digit was changed", () => {
    const change = fc.record({
      set: fc.integer({ min: 0, max: SETS.length - 1 }),
      line: fc.constantFrom(1, 2),
      column: fc.integer({ min: 3, max: 69 }),
      by: fc.integer({ min: 1, max: 9 }),
    });
    fc.assert(
      fc.property(change, ({ set, line, column, by }) => {
        const lines = [...(SETS[set] ?? [])];
        const old = lines[line] ?? "";
        const digit = old.charAt(column - 1);
        fc.pre(/\d/.test(digit));
        lines[line] = old.slice(0, column - 1) + String((Number(digit) + by) % 10) + old.slice(column);
        const { accepted, rejected } = parseElementSets(lines.join("\n"));
        expect(accepted).toEqual([]);
        expect(rejected).toHaveLength(1);
        expect(rejected[0]?.line).toBeGreaterThan(1);
      }),
      { numRuns: 1_000 },
    );
  });

  it("takes the good sets around a damaged one, each unchanged", () => {
    fc.assert(
      fc.property(anySet, damaged(anySet), anySet, (before, bad, after) => {
        fc.pre(!bad.includes("#"));
        const text = `${before}\n${bad}\n${after}\n`;
        const raws = expectAllSound(text).accepted.map((s) => s.raw);
        // The name of the set after it may fall to a damaged one that ends in a stray line; its two lines may not.
        expect(raws[0]).toBe(before);
        const lastTwo = (raw: string | undefined) => raw?.split("\n").slice(-2).join("\n");
        expect(lastTwo(raws.at(-1))).toBe(lastTwo(after));
      }),
      { numRuns: 1_000 },
    );
  });

  it("takes the good objects around a damaged one in a JSON list with line breaks", () => {
    // A quote put in or taken out turns the text inside out, so that the next brace may count as text; it is left alone here.
    fc.assert(
      fc.property(anyOmm, damaged(anyOmm), anyOmm, (before, bad, after) => {
        fc.pre((bad.match(/["\\{}[\]]/g) ?? []).join("") === (before.match(/["\\{}[\]]/g) ?? []).join(""));
        const raws = expectAllSound(`[${before},\n${bad},\n${after}]`).accepted.map((s) => s.raw);
        expect(raws[0]).toBe(before);
        expect(raws.at(-1)).toBe(after);
      }),
      { numRuns: 1_000 },
    );
  });

  it("gives the same elements after export and import as OMM JSON", () => {
    const part = (max: number) => fc.double({ min: 0, max, noNaN: true });
    const elements = fc.record({
      catalogNumber: fc.integer({ min: 1, max: 999_999_999 }),
      objectName: fc.option(fc.constantFrom("DEB 1", "Ä 2", 'A "B" \\ C')),
      objectId: fc.option(fc.constant("2031-001A")),
      epochMs: fc.integer({ min: 0, max: 4_102_444_800_000 }),
      meanMotionRevPerDay: fc.double({ min: 1, max: 13, noNaN: true }),
      eccentricity: part(0.05),
      inclinationDeg: part(180),
      raanDeg: part(360),
      argPericenterDeg: part(360),
      meanAnomalyDeg: part(360),
      bstar: part(1e-3),
      meanMotionDot: part(1e-3),
      meanMotionDdot: part(1e-6),
    });
    fc.assert(
      fc.property(elements, (given) => {
        // Some sets in range have no state, such as deep-space ones with an inclination of 1e-322 degrees.
        fc.pre(makeOrbit(given).ok);
        const { accepted, rejected } = parseElementSets(JSON.stringify(elementsToOmm(given)));
        expect(rejected).toEqual([]);
        expect(accepted[0]?.elements).toEqual(given);
      }),
      { numRuns: 500 },
    );
  });
});
