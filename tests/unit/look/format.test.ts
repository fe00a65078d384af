import { describe, expect, it } from "vitest";
import {
  coordinateText,
  durationText,
  numberText,
  scaled,
  settingText,
  settingWithUnit,
  significantText,
} from "@/app/_format/figures";
import { dayOfYear, utcShort, utcText, utcTimeOfDay, zoneTime } from "@/app/_format/utc";

const plain = (text: string) => text.replaceAll("\u202f", " ").replaceAll("\u2212", "-");

describe("times", () => {
  it("are UTC to the second, whatever they came as", () => {
    expect(utcText(Date.UTC(2031, 3, 6, 3, 12, 45, 999))).toBe("2031-04-06 03:12:45Z");
    expect(utcText("2031-04-06T03:12:45.000Z")).toBe("2031-04-06 03:12:45Z");
    expect(utcTimeOfDay("2031-04-06T03:12:45.000Z")).toBe("03:12:45Z");
    expect(utcShort("2031-12-06T03:12:45.000Z")).toBe("06 Dec 03:12:45Z");
  });

  it("that are none say so instead of showing a wrong one", () => {
    for (const none of [Number.NaN, Number.POSITIVE_INFINITY, "soon", 9e15, Date.UTC(12000, 0)]) {
      expect(utcText(none)).toBe("no time");
    }
  });

  it("have a wall clock beside them in a known zone only", () => {
    // Lord Howe is UTC+10:30 in its winter, Reunion UTC+4 all year (IANA time zone database).
    expect(zoneTime("2031-07-06T03:12:45Z", "Australia/Lord_Howe")).toBe("Sun 13:42");
    expect(zoneTime("2031-07-06T22:12:45Z", "Indian/Reunion")).toBe("Mon 02:12");
    expect(zoneTime("2031-07-06T03:12:45Z", "Nowhere/Land")).toBeNull();
    expect(zoneTime(Number.NaN, "UTC")).toBeNull();
  });

  it("count the days of the year", () => {
    expect(dayOfYear(Date.UTC(2031, 0, 1))).toBe(1);
    expect(dayOfYear(Date.UTC(2032, 11, 31, 23, 59))).toBe(366);
  });
});

describe("figures", () => {
  it.each([
    [0, 0, "0"],
    [-0.04, 1, "0.0"],
    [-412.4, 0, "-412"],
    [1234567.891, 2, "1 234 567.89"],
    [999.96, 1, "1 000.0"],
    [Number.NaN, 0, "no value"],
    [Number.NEGATIVE_INFINITY, 0, "no value"],
  ])("%d with %d decimals reads %s", (value, decimals, text) => {
    expect(plain(numberText(value, decimals))).toBe(text);
  });

  it("keep three digits whatever their size", () => {
    expect([0.0012345, 0.5, 12.345, 98765].map((v) => plain(significantText(v)))).toEqual([
      "0.00123",
      "0.500",
      "12.3",
      "98 765",
    ]);
  });

  it("take the prefix that leaves one to three digits in front", () => {
    expect(scaled(4_100_000, "J")).toEqual({ value: "4.10", unit: "MJ" });
    expect(scaled(0.0123, "m")).toEqual({ value: "12.3", unit: "mm" });
    expect(scaled(0, "J")).toEqual({ value: "0", unit: "J" });
    expect(plain(scaled(-1500, "m").value)).toBe("-1.50");
  });

  it("show settings as they were entered", () => {
    expect(settingText(7)).toBe("7");
    expect(settingText(0.05)).toBe("0.05");
    expect(plain(settingText(1200))).toBe("1 200");
    expect(plain(settingWithUnit(7000, "J"))).toBe("7 kJ");
    expect(plain(settingWithUnit(7500, "J"))).toBe("7.5 kJ");
  });

  it.each([
    [0, "0 s"],
    [42.4, "42 s"],
    [59.6, "1 min 00 s"],
    [558, "9 min 18 s"],
    [3840, "1 h 04 min"],
    [266_400, "3 d 2 h"],
    [-90, "-1 min 30 s"],
  ])("%d seconds read %s", (seconds, text) => {
    expect(plain(durationText(seconds))).toBe(text);
  });

  it("give coordinates the letter of their half", () => {
    expect(plain(coordinateText(-23.874, "latitude"))).toBe("23.874° S");
    expect(plain(coordinateText(117.9154, "longitude"))).toBe("117.915° E");
  });
});
