import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { parseElementSets } from "@/lib/formats/element-sets";
import { elementsToOmm } from "@/lib/formats/elements-to-omm";
import { readOmmEpoch } from "@/lib/formats/omm-epoch";
import { LINE1, LINE2, NAME } from "@/tests/unit/formats/lines";

/** The folder of Debian's package python3-sgp4, which carries the published verification file and samples. */
const DEBIAN_SGP4 = "/usr/lib/python3/dist-packages/sgp4";

function read(name: string): string {
  try {
    return readFileSync(`${DEBIAN_SGP4}/${name}`, "latin1");
  } catch (cause) {
    throw new Error(`${name} is missing: install Debian's package python3-sgp4`, { cause });
  }
}

function readVerificationFile(): string {
  return read("SGP4-VER.TLE");
}

/**
 * Vallado, Crawford, Hujsak, Kelso 2006, "Revisiting Spacetrack Report #3", AIAA 2006-6753, file
 * SGP4-VER.TLE. Which checksums are wrong was established with compute_checksum of python-sgp4 2.15:
 * lines 100, 101, 103, 106 and 107 of the file, that is 33333 and 33335 on both lines, 33334 on line 1.
 */
describe("the published verification file of SGP4", () => {
  const { accepted, rejected } = parseElementSets(readVerificationFile());

  it("has three sets with wrong checksums, each named by line, column, printed and computed digit", () => {
    expect(rejected.map(({ line, column, message }) => ({ line, column, message }))).toEqual([
      {
        line: 100,
        column: 69,
        message:
          'The checksum of line 1 is printed as "4" but its 68 columns give 2.' +
          ' Also line 101, column 69: The checksum of line 2 is printed as "8" but its 68 columns give 0.',
      },
      {
        line: 103,
        column: 69,
        message: 'The checksum of line 1 is printed as "9" but its 68 columns give 6.',
      },
      {
        line: 106,
        column: 69,
        message:
          'The checksum of line 1 is printed as "0" but its 68 columns give 3.' +
          ' Also line 107, column 69: The checksum of line 2 is printed as "1" but its 68 columns give 7.',
      },
    ]);
  });

  it("has thirty other sets, all accepted, remarks and trailing times notwithstanding", () => {
    expect(accepted.map((s) => s.elements.catalogNumber)).toEqual([
      5, 4632, 6251, 8195, 9880, 9998, 11801, 14128, 16925, 20413, 21897, 22312, 22674, 23177, 23333, 23599,
      24208, 25954, 26900, 26975, 28057, 28129, 28350, 28623, 28626, 28872, 29141, 29238, 88888, 20413,
    ]);
  });

  it("has one set that no orbit can have, once the checksums are made right", () => {
    // 33334 has n = 0.00001 rev/day; the tests of python-sgp4 expect SGP4 error 3 for it at its own epoch.
    const repaired = readVerificationFile()
      .replace("0  1534\r\n2 33333", "0  1532\r\n2 33333")
      .replace("4.00004038 10708", "4.00004038 10700")
      .replace("0  6809\r\n2 33334", "0  6806\r\n2 33334")
      .replace("0  2190\r\n2 33335", "0  2193\r\n2 33335")
      .replace("0000004  13.7918  55.6504  1.00270176  4891", "0000004  13.7918  55.6504  1.00270176  4897");
    const found = parseElementSets(repaired);
    expect(found.accepted).toHaveLength(32);
    expect(found.rejected).toHaveLength(1);
    expect(found.rejected[0]).toMatchObject({ line: 104, column: 53 });
    expect(found.rejected[0]?.message).toMatch(
      /mean motion is 0.00001 revolutions a day: that orbit would leave the Earth/,
    );
  });
});

/**
 * Object 5 as CelesTrak published it in October 2020 in three forms: sample_omm.csv and sample_omm.xml of
 * python-sgp4 2.15, and the TLE beside them in its tests.py.
 */
describe("the published samples of one object in three forms", () => {
  const [fromTle] = parseElementSets(`${NAME}\n${LINE1}\n${LINE2}`).accepted;

  it.each([
    ["sample_omm.csv", "omm-csv"],
    ["sample_omm.xml", "omm-xml"],
  ])("are the same elements: %s", (name, format) => {
    const { accepted, rejected } = parseElementSets(read(name));
    expect(rejected).toEqual([]);
    expect(accepted.map((s) => s.format)).toEqual([format]);
    expect(fromTle?.elements.catalogNumber).toBe(5);
    expect(accepted[0]?.elements).toEqual(fromTle?.elements);
  });
});

/** Exported as OMM by export_omm of python-sgp4 2.15 from the lines of the file; -7.561e-05 is a negative drag term. */
const EXPORTED = [
  {
    line: 1,
    number: 30024,
    id: "1999-025MZ",
    epoch: "2021-10-02T00:44:07.057535",
    n: 15.0289611,
    e: 0.017284,
    i: 98.6728,
    node: 100.9502,
    peri: 342.7621,
    m: 16.7776,
    bstar: 0.00014929,
    dot: 2.68e-5,
  },
  {
    line: 1198,
    number: 40224,
    id: "1993-036BVD",
    epoch: "2021-10-01T21:41:06.362303",
    n: 14.58988191,
    e: 0.0144203,
    i: 73.9968,
    node: 329.5489,
    peri: 285.6784,
    m: 250.9389,
    bstar: 0.00037647,
    dot: 2.007e-5,
  },
  {
    line: 2227,
    number: 46445,
    id: "1999-025EZA",
    epoch: "2021-10-01T08:10:24.653567",
    n: 13.96671229,
    e: 0.0121412,
    i: 98.0133,
    node: 311.4313,
    peri: 249.9561,
    m: 108.8501,
    bstar: 0.00089861,
    dot: 1.289e-5,
  },
  {
    line: 3337,
    number: 29948,
    id: "1999-025JW",
    epoch: "2021-10-02T00:10:59.456640",
    n: 14.05127607,
    e: 0.008495,
    i: 98.772,
    node: 287.6287,
    peri: 216.5364,
    m: 198.1674,
    bstar: -7.561e-5,
    dot: -1.69e-6,
  },
] as const;

/** 1,200 sets as published by CelesTrak in October 2021. */
describe("the published sets of three break-ups", () => {
  const text = readFileSync("../shared/reference/published-debris-2021.tle", "latin1");
  const { accepted, rejected } = parseElementSets(text);

  it("are all accepted, with name, line and text", () => {
    expect(rejected).toEqual([]);
    expect(accepted).toHaveLength(1200);
    expect(accepted.map((s) => s.line)).toEqual(Array.from({ length: 1200 }, (_, i) => 3 * i + 1));
    expect(`${accepted.map((s) => s.raw).join("\n")}\n`).toBe(text);
    const names = new Set(accepted.map((s) => s.elements.objectName));
    expect([...names].sort()).toEqual([
      "COSMOS 2251",
      "COSMOS 2251 DEB",
      "FENGYUN 1C DEB",
      "IRIDIUM 33",
      "IRIDIUM 33 DEB",
    ]);
  });

  it.each(EXPORTED)("give the elements that python-sgp4 exports for $number", (row) => {
    const elements = accepted.find((s) => s.line === row.line)?.elements;
    if (!elements) throw new Error("no such set");
    expect(elements).toMatchObject({
      catalogNumber: row.number,
      objectId: row.id,
      meanMotionRevPerDay: row.n,
      eccentricity: row.e,
      inclinationDeg: row.i,
      raanDeg: row.node,
      argPericenterDeg: row.peri,
      meanAnomalyDeg: row.m,
      bstar: row.bstar,
      meanMotionDot: row.dot,
      meanMotionDdot: 0,
    });
    // It adds the fraction of the day to a Julian date and so loses a microsecond at most.
    const microseconds = Math.abs(elements.epochMs - (readOmmEpoch(row.epoch) ?? Number.NaN)) * 1000;
    expect(microseconds).toBeLessThanOrEqual(1.5);
  });

  it("come back unchanged from OMM JSON", () => {
    const back = parseElementSets(
      JSON.stringify(
        accepted.map((s) => elementsToOmm(s.elements)),
        null,
        1,
      ),
    );
    expect(back.rejected).toEqual([]);
    expect(back.accepted.map((s) => s.elements)).toEqual(accepted.map((s) => s.elements));
  });
});
