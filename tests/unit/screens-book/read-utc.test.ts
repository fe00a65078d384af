import { describe, expect, test } from "vitest";
import { readUtc, utcWords } from "@/app/_components/engagement/read-utc";

describe("typed UTC times", () => {
  test.each([
    ["2031-04-06 03:12:45.120Z", "2031-04-06T03:12:45.120Z"],
    ["2031-04-06T03:12:45.1", "2031-04-06T03:12:45.100Z"],
    ["2031-04-06 03:12", "2031-04-06T03:12:00.000Z"],
    ["  2032-02-29 23:59:59z ", "2032-02-29T23:59:59.000Z"],
  ])("%s is read", (words, iso) => {
    expect(readUtc(words)).toBe(iso);
  });

  test.each([
    "",
    "03:12",
    "2031-02-29 00:00",
    "2031-04-31 00:00",
    "2031-04-06 24:30",
    "2031-04-06 03:12+02:00",
  ])("“%s” is refused", (words) => {
    expect(readUtc(words)).toBeNull();
  });

  test("what is written is read again as it was", () => {
    const atMs = Date.UTC(2031, 3, 6, 3, 12, 45, 7);
    expect(utcWords(atMs, true)).toBe("2031-04-06 03:12:45.007Z");
    expect(readUtc(utcWords(atMs, true))).toBe("2031-04-06T03:12:45.007Z");
  });
});
