import { describe, expect, test } from "vitest";
import {
  clampEnd,
  clampStart,
  keyStepS,
  readTime,
  shiftDwell,
} from "@/app/_components/pass-sheet/dwell-time";

const at = (text: string): number => Date.parse(`2031-04-${text}Z`);
const pass = { fromMs: at("06T23:56:52.400"), toMs: at("07T00:03:51.700") };
const dwell = { fromMs: at("06T23:58:00"), toMs: at("06T23:59:00") };

describe("a typed time", () => {
  test("is read with and without colons and Z", () => {
    for (const text of ["23:58:10", "235810", " 23:58:10Z ", "23:58:10z"]) {
      expect(readTime(text, pass)).toBe(at("06T23:58:10"));
    }
  });

  test("means the next day after midnight", () => {
    expect(readTime("00:01:05", pass)).toBe(at("07T00:01:05"));
    expect(readTime("0:01:05", pass)).toBe(at("07T00:01:05"));
  });

  test("is none outside the pass or when it is no time", () => {
    for (const text of ["12:00:00", "00:05:00", "24:00:00", "23:60:00", "", "soon", "23:58"]) {
      expect(readTime(text, pass)).toBeNull();
    }
  });
});

describe("an edge of the dwell", () => {
  test("stays on whole seconds inside the pass", () => {
    expect(clampStart(pass.fromMs - 5000, dwell, pass)).toBe(at("06T23:56:53"));
    expect(clampEnd(pass.toMs + 5000, dwell, pass)).toBe(at("07T00:03:51"));
    expect(clampStart(at("06T23:58:10.499"), dwell, pass)).toBe(at("06T23:58:10"));
  });

  test("never passes the other", () => {
    expect(clampStart(dwell.toMs + 9000, dwell, pass)).toBe(dwell.toMs - 1000);
    expect(clampEnd(dwell.fromMs - 9000, dwell, pass)).toBe(dwell.fromMs + 1000);
  });

  test("moves by keys: 1 s, 10 s with Shift or page keys, to the ends by Home and End", () => {
    expect(keyStepS("ArrowRight", false)).toBe(1);
    expect(keyStepS("ArrowDown", false)).toBe(-1);
    expect(keyStepS("ArrowLeft", true)).toBe(-10);
    expect(keyStepS("PageUp", false)).toBe(10);
    expect(keyStepS("End", false)).toBe(Number.POSITIVE_INFINITY);
    expect(keyStepS("Home", true)).toBe(Number.NEGATIVE_INFINITY);
    expect(keyStepS("Tab", false)).toBeNull();
    expect(keyStepS("a", true)).toBeNull();
  });
});

describe("the dwell as a whole", () => {
  test("keeps its length where it is moved", () => {
    expect(shiftDwell(dwell, 12_300, pass)).toEqual({
      fromMs: dwell.fromMs + 12_000,
      toMs: dwell.toMs + 12_000,
    });
  });

  test("stops at both edges of the pass with its length kept", () => {
    expect(shiftDwell(dwell, -3_600_000, pass)).toEqual({
      fromMs: at("06T23:56:53"),
      toMs: at("06T23:57:53"),
    });
    expect(shiftDwell(dwell, 3_600_000, pass)).toEqual({
      fromMs: at("07T00:02:51"),
      toMs: at("07T00:03:51"),
    });
  });
});
