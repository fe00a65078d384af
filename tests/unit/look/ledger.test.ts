import { describe, expect, it } from "vitest";
import { fitRing } from "@/app/airspace/fit-ring";
import { instantOf, ledgerQueryOf, olderPath, readLedgerSearch } from "@/app/ledger/ledger-search";
import { changeLines, valueText } from "@/app/ledger/value-text";

describe("values of the ledger", () => {
  it("stand side by side, nested ones by their path, without what stayed", () => {
    const before = { state: "cleared", effect: { perigeeKm: 412.5, aim: "decay" } };
    const after = { state: "confirmed", effect: { perigeeKm: 411, aim: "decay" }, notices: 2 };
    expect(changeLines(before, after)).toEqual([
      { what: "state", before: "cleared", after: "confirmed" },
      { what: "effect, perigee km", before: "412.5", after: "411" },
      { what: "notices", before: null, after: "2" },
    ]);
    expect(changeLines(null, null)).toEqual([]);
  });

  it("read as words", () => {
    expect(valueText(null)).toBe("none");
    expect(valueText(true)).toBe("yes");
    expect(valueText([])).toBe("none");
    expect(valueText(["a", 2])).toBe("a, 2");
    expect(valueText("2031-04-06T03:12:45.000Z")).toBe("2031-04-06 03:12:45Z");
    expect(valueText("d9c8f2de-4c7e-4f9a-8c57-0a8b6c1d2e3f")).toBe("d9c8f2de");
  });
});

describe("the search of the ledger", () => {
  it.each([
    ["2031-04-06", "2031-04-06T00:00:00.000Z"],
    ["2031-04-06 03:12", "2031-04-06T03:12:00.000Z"],
    ["2031-04-06T03:12:45.000Z", "2031-04-06T03:12:45.000Z"],
    ["2031-04-06 03:12:45Z", "2031-04-06T03:12:45.000Z"],
    ["2031-02-30", null],
    ["2031-04-06 25:00", null],
    ["06/04/2031", null],
    ["2031-04-06 03:12+02:00", null],
  ])("reads the time %s as %s", (words, iso) => {
    expect(instantOf(words)).toBe(iso);
  });

  it("asks only for what is filled in and can be read, and says what can't", () => {
    const search = readLedgerSearch({
      text: [" scrub ", "x"],
      from: "yesterday",
      to: "2031-04-06",
      before: "-1",
    });
    expect(search.fromProblem).toContain("UTC time");
    expect(search.toProblem).toBeNull();
    expect(ledgerQueryOf(search)).toEqual({ text: "scrub", to: "2031-04-06T00:00:00.000Z" });
  });

  it("keeps the filters on the way to older entries", () => {
    const path = olderPath(readLedgerSearch({ actor: "Ines & Co", before: "90" }), 41);
    expect(path).toBe("/ledger?actor=Ines+%26+Co&before=41");
  });
});

describe("the outline of an airspace", () => {
  it("keeps its shape, north up, inside the picture", () => {
    const { ring, scaleKm, scalePx } = fitRing(
      [
        [10, 0],
        [11, 0],
        [11, 1],
        [10, 1],
        [10, 0],
      ],
      [],
      208,
    );
    expect(ring[0]).toEqual(ring[4]);
    const [[x0, y0] = [0, 0], [x1] = [0, 0], [, y2] = [0, 0]] = ring;
    expect(x1 - x0).toBeCloseTo(160, 1); // 208 less two margins of 24
    expect(y0 - y2).toBeCloseTo(160, 1); // a degree each way on the equator is a square
    expect([scaleKm, scalePx]).toEqual([20, 28.8]); // 20 km of 111.2 km in 160 px
  });

  it("stays in one piece over the antimeridian", () => {
    const { ring } = fitRing(
      [
        [179, 10],
        [-179, 10],
        [-179, 11],
        [179, 11],
        [179, 10],
      ],
      [[-179.5, 10.5]],
      208,
    );
    for (const [x, y] of ring) {
      expect(x).toBeGreaterThanOrEqual(24);
      expect(x).toBeLessThanOrEqual(184);
      expect(y).toBeGreaterThanOrEqual(24);
      expect(y).toBeLessThanOrEqual(184);
    }
    expect((ring[1]?.[0] ?? 0) - (ring[0]?.[0] ?? 0)).toBeCloseTo(160, 1);
  });
});
