import { describe, expect, it } from "vitest";
import { readOmmEpoch, writeOmmEpoch } from "@/lib/formats/omm-epoch";
import { daysInYear, fullYear, readTleEpoch, writeTleEpoch } from "@/lib/formats/tle-epoch";

describe("TLE epochs", () => {
  // CelesTrak prints one epoch both ways for object 5, quoted in tests.py of python-sgp4 2.15.
  it("agree with the published pair of TLE and OMM", () => {
    const epochMs = readTleEpoch("20287.20333880");
    expect(epochMs).toBe(readOmmEpoch("2020-10-13T04:52:48.472320"));
    expect(epochMs).not.toBeNull();
  });

  it("are written as they were read", () => {
    for (const field of [
      "21275.03063724",
      "20366.99999999",
      "57001.00000000",
      "56366.00000001",
      "00060.50000000",
    ]) {
      expect(writeTleEpoch(readTleEpoch(field) ?? Number.NaN)).toBe(field);
    }
  });

  it("carry a rounding over midnight and New Year", () => {
    expect(writeTleEpoch(Date.UTC(2021, 0, 1) - 0.1)).toBe("21001.00000000");
  });

  it.each(["21000.00000000", "21366.00000000", "2127.000000000", "21275.0306372", "-1275.03063724", ""])(
    "are refused as %j",
    (field) => {
      expect(readTleEpoch(field)).toBeNull();
    },
  );

  it("cannot be written outside 1957 to 2056", () => {
    expect(() => writeTleEpoch(Date.UTC(2057, 0, 1))).toThrow(RangeError);
    expect(() => writeTleEpoch(Date.UTC(1956, 11, 31))).toThrow(RangeError);
    expect(() => writeTleEpoch(Number.NaN)).toThrow(RangeError);
  });

  it("know leap years and the turn of the century", () => {
    expect([1957, 2000, 2020, 2021, 2100].map(daysInYear)).toEqual([365, 366, 366, 365, 365]);
    expect([56, 57, 99, 0].map(fullYear)).toEqual([2056, 1957, 1999, 2000]);
  });
});

describe("OMM epochs", () => {
  it("are written with six decimals and without Z", () => {
    expect(writeOmmEpoch(Date.UTC(2031, 3, 6, 3, 12, 45, 123) + 0.457)).toBe("2031-04-06T03:12:45.123457");
    expect(writeOmmEpoch(Date.UTC(2031, 3, 6, 3, 12, 45))).toBe("2031-04-06T03:12:45.000000");
    expect(writeOmmEpoch(Date.UTC(2031, 3, 6, 3, 12, 45) - 0.0001)).toBe("2031-04-06T03:12:45.000000");
  });

  it("count the days of the year", () => {
    expect(readOmmEpoch("2031-096T03:12:45")).toBe(Date.UTC(2031, 3, 6, 3, 12, 45));
    expect(readOmmEpoch("2031-366T00:00:00")).toBeNull();
    expect(readOmmEpoch("2031-000T00:00:00")).toBeNull();
  });

  it("cannot be written outside 1957 to 2199", () => {
    expect(() => writeOmmEpoch(Date.UTC(2200, 0, 1))).toThrow(RangeError);
    expect(() => writeOmmEpoch(Number.NaN)).toThrow(RangeError);
  });
});
