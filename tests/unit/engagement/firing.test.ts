import { describe, expect, it } from "vitest";
import { checkFiring, type FiringClaim, type FiringFrame } from "@/lib/engagement/firing";

const FROM = Date.UTC(2031, 3, 6, 3, 12, 45);
const frame: FiringFrame = {
  dwellFromMs: FROM,
  dwellToMs: FROM + 120_000,
  repetitionRateHz: 10,
  nowMs: FROM + 3_600_000,
};
const whole: FiringClaim = {
  outcome: "fired",
  openedMs: FROM,
  closedMs: FROM + 100_000,
  pulses: 1000,
  interruptions: [],
  note: null,
};

const paths = (claim: Partial<FiringClaim>) =>
  checkFiring({ ...whole, ...claim }, frame).map(({ path }) => path);

describe("a firing record", () => {
  it("that is whole and consistent is taken", () => {
    expect(paths({})).toEqual([]);
  });

  it("names every missing field", () => {
    expect(paths({ openedMs: null, closedMs: null, pulses: null })).toEqual([
      "openedAt",
      "closedAt",
      "pulses",
    ]);
  });

  it("needs the shutter to open before it closes, and not in the future", () => {
    expect(paths({ closedMs: FROM })).toEqual(["closedAt"]);
    expect(checkFiring(whole, { ...frame, nowMs: FROM + 99_999 }).map(({ path }) => path)).toEqual([
      "closedAt",
    ]);
  });

  it("holds the pulses against rate and open seconds: 100 s at 10 Hz, within 5 % and one pulse", () => {
    expect(paths({ pulses: 1051 })).toEqual([]);
    expect(paths({ pulses: 1052 })).toEqual(["pulses"]);
    expect(paths({ pulses: 949 })).toEqual([]);
    expect(paths({ pulses: 948 })).toEqual(["pulses"]);
  });

  it("lets fewer pulses pass when interruptions or the outcome explain them", () => {
    const lost = [{ atMs: FROM + 10_000, secondsLost: 50 }];
    expect(paths({ pulses: 500, interruptions: lost })).toEqual([]);
    expect(paths({ pulses: 3, outcome: "in part" })).toEqual([]);
    expect(paths({ pulses: 0, outcome: "in part" })).toEqual(["pulses"]);
  });

  it("places interruptions inside the open time, and no longer than it", () => {
    expect(paths({ interruptions: [{ atMs: FROM - 1, secondsLost: 0 }] })).toEqual(["interruptions.0.at"]);
    expect(paths({ outcome: "in part", interruptions: [{ atMs: FROM, secondsLost: 101 }] })).toEqual([
      "interruptions",
    ]);
  });

  it("asks for a word about a shutter open outside the dwell", () => {
    const late = { openedMs: FROM + 30_000, closedMs: FROM + 130_000 };
    expect(paths(late)).toEqual(["note"]);
    expect(paths({ ...late, note: "shutter stuck open" })).toEqual([]);
  });

  it("that says not fired takes no times and no pulses", () => {
    expect(paths({ outcome: "not fired" })).toEqual(["openedAt", "closedAt", "pulses"]);
    expect(paths({ outcome: "not fired", openedMs: null, closedMs: null, pulses: 0 })).toEqual([]);
    expect(paths({ outcome: "not fired", openedMs: null, closedMs: null, pulses: null })).toEqual([]);
  });
});
