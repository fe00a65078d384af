import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { cleanName, cleanText } from "@/lib/formats/calendar-text";
import { writeCsv } from "@/lib/formats/csv";
import { composeCalendar } from "@/lib/formats/icalendar";
import { formatIso, formatUtc, parseIso } from "@/lib/formats/utc";
import { readCalendar, theLine, unescapeText } from "@/tests/unit/formats/read-calendar";

const anyText = fc.oneof(
  fc.string({ unit: "binary", maxLength: 300 }),
  fc.string({ unit: "grapheme", maxLength: 300 }),
  fc
    .array(
      fc.constantFrom(
        "\r\n",
        "\n",
        "\r",
        "BEGIN:VEVENT",
        "END:VEVENT",
        ";",
        ",",
        "\\",
        "\\n",
        '"',
        " ",
        "é",
        "🛰",
        "\u2028",
        "x",
      ),
      { maxLength: 60 },
    )
    .map((parts) => parts.join("")),
);

describe("calendar entries", () => {
  it("keep their shape and their texts, whatever the texts hold", () => {
    fc.assert(
      fc.property(
        anyText,
        anyText,
        anyText,
        anyText,
        fc.nat({ max: 1e6 }),
        (summary, description, location, name, sequence) => {
          const text = composeCalendar({
            method: "REQUEST",
            uid: "u@x.example",
            sequence,
            stampMs: 1e12,
            startMs: 1.9e12,
            endMs: 1.9e12 + 180_000,
            status: "TENTATIVE",
            summary: `s${summary}`,
            description: `d${description}`,
            location: `l${location}`,
            organizer: { name, email: "desk@example.org" },
            attendee: { name, email: "duty@example.net" },
            url: "https://x.example/a",
          });
          const lines = readCalendar(text);
          expect(lines.map((l) => l.name)).toEqual([
            "BEGIN",
            "VERSION",
            "PRODID",
            "METHOD",
            "BEGIN",
            "UID",
            "SEQUENCE",
            "DTSTAMP",
            "DTSTART",
            "DTEND",
            "SUMMARY",
            "LOCATION",
            "DESCRIPTION",
            "ORGANIZER",
            "ATTENDEE",
            "URL",
            "STATUS",
            "END",
            "END",
          ]);
          expect(unescapeText(theLine(lines, "DESCRIPTION").value)).toBe(cleanText(`d${description}`));
          expect(unescapeText(theLine(lines, "LOCATION").value)).toBe(cleanText(`l${location}`));
          expect(theLine(lines, "ATTENDEE").parameters.CN).toBe(cleanName(name) || "duty@example.net");
        },
      ),
      { numRuns: 500 },
    );
  });
});

/** Reads CSV by the letter of RFC 4180, section 2. */
function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  const cell = /(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n)/suy;
  let row: string[] = [];
  while (cell.lastIndex < text.length) {
    const found = cell.exec(text);
    if (!found) throw new Error("no CSV");
    row.push(found[1] === undefined ? (found[2] ?? "") : found[1].replaceAll('""', '"'));
    if (found[3] === "\r\n") {
      rows.push(row);
      row = [];
    }
  }
  return rows;
}

describe("CSV", () => {
  it("comes back as it was, but for apostrophes before formulas", () => {
    const rows = fc.array(fc.array(anyText, { minLength: 1, maxLength: 4 }), { minLength: 1, maxLength: 4 });
    fc.assert(
      fc.property(rows, (given) => {
        const back = readCsv(writeCsv(given));
        expect(back.map((r) => r.length)).toEqual(given.map((r) => r.length));
        const pairs = back.flatMap((r, i) =>
          r.map((c, j) => [c, given[i]?.[j]?.replaceAll("\0", "")] as const),
        );
        for (const [cell, was] of pairs) {
          expect([was, `'${was}`]).toContain(cell);
          if (!/^[+-]?[\d.]/.test(cell)) expect(cell).not.toMatch(/^\s*[=+\-@]/);
        }
      }),
      { numRuns: 500 },
    );
  });
});

describe("UTC times", () => {
  it("come back as they were", () => {
    const time = fc.integer({ min: Date.UTC(0, 0, 1), max: Date.UTC(9999, 11, 31) });
    fc.assert(
      fc.property(time, (atMs) => {
        expect(parseIso(formatIso(atMs))).toBe(atMs);
        expect(parseIso(formatUtc(atMs).replace(" ", "T"))).toBe(Math.floor(atMs / 1000) * 1000);
      }),
    );
  });
});
