import { describe, expect, test } from "vitest";
import {
  archPath,
  floorOf,
  msAt,
  type StripFrame,
  worthPath,
  xOf,
  yOf,
} from "@/app/_components/pass-strip/geometry";

const frame: StripFrame = {
  width: 110,
  height: 100,
  left: 5,
  right: 5,
  groundY: 80,
  topY: 10,
  harmDepth: 9,
  floorDeg: 20,
  fromMs: 1_000_000,
  toMs: 1_100_000,
};

describe("a strip's frame", () => {
  test("runs time over its width and keeps what lies outside at the edges", () => {
    expect(xOf(frame, 1_000_000)).toBe(5);
    expect(xOf(frame, 1_050_000)).toBe(55);
    expect(xOf(frame, 900_000)).toBe(5);
    expect(xOf(frame, 1_200_000)).toBe(105);
  });

  test("reads an instant back from its x", () => {
    for (const ms of [1_000_000, 1_013_000, 1_099_000, 1_100_000]) {
      expect(msAt(frame, xOf(frame, ms))).toBeCloseTo(ms, 3);
    }
    expect(msAt(frame, -40)).toBe(1_000_000);
    expect(msAt(frame, 400)).toBe(1_100_000);
  });

  test("puts the floor on the ground line and 90° at the top", () => {
    expect(yOf(frame, 20)).toBe(80);
    expect(yOf(frame, 90)).toBe(10);
    expect(yOf(frame, 55)).toBe(45);
    expect(yOf(frame, 12)).toBe(80);
  });

  test("takes the lowest elevation for the floor, and none for nothing", () => {
    expect(floorOf([25.1, 70, 25.3])).toBe(25.1);
    expect(floorOf([])).toBe(0);
    expect(floorOf([90, 90])).toBe(89);
  });
});

describe("a strip's curves", () => {
  test("draws the arch through its samples, evenly spaced", () => {
    expect(archPath(frame, [20, 90, 20])).toBe("M5.0 80.0 L55.0 10.0 L105.0 80.0");
    expect(archPath(frame, [])).toBe("");
  });

  test("fills gain over the line and harm under it, on one scale", () => {
    const worth = [2, -1];
    expect(worthPath(frame, worth, 1)).toBe("M5.0 80.0 L5.0 41.5 L105.0 80.0 L105.0 80.0 Z");
    expect(worthPath(frame, worth, -1)).toBe("M5.0 80.0 L5.0 80.0 L105.0 89.0 L105.0 80.0 Z");
  });

  test("draws no area where nothing is gained or known", () => {
    expect(worthPath(frame, [0, 0, 0], 1)).toBe("");
    expect(worthPath(frame, [], -1)).toBe("");
    expect(worthPath(frame, [3], 1)).toBe("");
  });
});
