import { describe, expect, it } from "vitest";
import { formatIso, formatUtc, parseIso } from "@/lib/formats/utc";

describe("UTC times", () => {
  const atMs = Date.UTC(2031, 3, 6, 3, 12, 45, 678);

  it("are written for people and for the wire", () => {
    expect(formatUtc(atMs)).toBe("2031-04-06 03:12:45Z");
    expect(formatIso(atMs)).toBe("2031-04-06T03:12:45.678Z");
    expect(formatIso(atMs + 0.9)).toBe("2031-04-06T03:12:45.678Z");
    expect(formatUtc(-1)).toBe("1969-12-31 23:59:59Z");
  });

  it("that are none are refused", () => {
    for (const none of [Number.NaN, Number.POSITIVE_INFINITY, 8.64e15 + 1]) {
      expect(() => formatUtc(none)).toThrow(RangeError);
      expect(() => formatIso(none)).toThrow(RangeError);
    }
  });

  it("are read back", () => {
    expect(parseIso("2031-04-06T03:12:45.678Z")).toBe(atMs);
    expect(parseIso("2031-04-06T03:12:45Z")).toBe(atMs - 678);
    expect(parseIso("2031-04-06T03:12:45.5Z")).toBe(atMs - 178);
    expect(parseIso("2031-04-06T03:12:45.678901Z")).toBeCloseTo(atMs + 0.901, 3);
    expect(parseIso("2032-02-29T00:00:00Z")).toBe(Date.UTC(2032, 1, 29));
    expect(parseIso("0050-01-01T00:00:00Z")).toBe(new Date("0050-01-01T00:00:00Z").getTime());
  });

  it.each([
    "2031-04-06T03:12:45",
    "2031-04-06T03:12:45+00:00",
    "2031-04-06 03:12:45Z",
    "2031-04-06T03:12Z",
    "2031-04-06",
    "2031-02-29T00:00:00Z",
    "2031-13-01T00:00:00Z",
    "2031-00-10T00:00:00Z",
    "2031-04-00T00:00:00Z",
    "2031-04-06T24:00:00Z",
    "2031-04-06T23:60:00Z",
    "2016-12-31T23:59:60Z",
    "2031-04-06T03:12:45.Z",
    "2031-04-06T03:12:45.1234567Z",
    "2031-04-06t03:12:45z",
    " 2031-04-06T03:12:45Z",
    "2031-04-06T03:12:45Z\n",
    "+012031-04-06T03:12:45Z",
    "",
  ])("of another form are refused: %j", (text) => {
    expect(parseIso(text)).toBeNull();
  });
});
