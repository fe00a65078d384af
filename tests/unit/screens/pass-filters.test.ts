import { describe, expect, test } from "vitest";
import {
  arrange,
  countText,
  type PassFilters,
  passesPath,
  readFilters,
  writeFilters,
} from "@/app/_components/pass-list/filters";
import type { PassBody } from "@/lib/contracts/passes";

const defaults: PassFilters = {
  station: "",
  fragment: "",
  hours: 24,
  from: "",
  worthOnly: true,
  sort: "time",
};

function pass(id: string, riseAt: string, drops: { axis: number; perigee: number } | null): PassBody {
  return {
    id,
    stationId: "s",
    stationName: "Salt Pan North",
    fragmentId: "f",
    fragmentName: "QL-1",
    catalogNumber: null,
    riseAt,
    culminateAt: riseAt,
    setAt: riseAt,
    maxElevationDeg: 50,
    minRangeKm: 900,
    openings: [],
    dwell: drops && {
      from: riseAt,
      to: riseAt,
      perigeeDropM: drops.perigee,
      semiMajorAxisDropM: drops.axis,
      perigeeDropBandM: [0, 1],
      semiMajorAxisDropBandM: [0, 1],
    },
    engagementId: null,
    engagementState: null,
    booked: null,
    closures: [],
    strip: { elevationDeg: [], worthPerS: [] },
    elementSetAgeH: 1,
    noDwellReason: drops ? null : "closed",
  };
}

describe("the filters in the address", () => {
  test("read back what was written, and leave defaults out", () => {
    expect(writeFilters(defaults)).toBe("");
    expect(readFilters(new URLSearchParams(""))).toEqual(defaults);
    const all: PassFilters = {
      station: "a",
      fragment: "b",
      hours: 168,
      from: "2031-04-06T00:00:00.000Z",
      worthOnly: false,
      sort: "semi-major axis",
    };
    expect(readFilters(new URLSearchParams(writeFilters(all)))).toEqual(all);
  });

  test("fall back to the defaults for what can't be read", () => {
    expect(readFilters(new URLSearchParams("hours=7&from=soon&sort=luck&worth=maybe"))).toEqual(defaults);
  });

  test("ask the service for the window, from the full minute", () => {
    const nowMs = Date.parse("2031-04-06T03:12:45.678Z");
    expect(passesPath(defaults, nowMs)).toBe(
      "/api/passes?from=2031-04-06T03%3A12%3A00.000Z&to=2031-04-07T03%3A12%3A00.000Z",
    );
    const later = { ...defaults, from: "2031-04-08T00:00:00.000Z", hours: 12, station: "a", fragment: "b" };
    expect(passesPath(later, nowMs)).toBe(
      "/api/passes?from=2031-04-08T00%3A00%3A00.000Z&to=2031-04-08T12%3A00%3A00.000Z&station=a&fragment=b",
    );
  });
});

describe("the list in its order", () => {
  const passes = [
    pass("late", "2031-04-06T05:00:00.000Z", { axis: 10, perigee: 90 }),
    pass("shut", "2031-04-06T04:00:00.000Z", null),
    pass("early", "2031-04-06T03:00:00.000Z", { axis: 20, perigee: -5 }),
  ];
  const ids = (filters: PassFilters): string[] => arrange(passes, filters).map((p) => p.id);

  test("goes by rise, or by the greatest drop with closed ones last", () => {
    expect(ids({ ...defaults, worthOnly: false })).toEqual(["early", "shut", "late"]);
    expect(ids({ ...defaults, worthOnly: false, sort: "semi-major axis" })).toEqual([
      "early",
      "late",
      "shut",
    ]);
    expect(ids({ ...defaults, worthOnly: false, sort: "perigee" })).toEqual(["late", "early", "shut"]);
  });

  test("leaves out what is not worth lasing, but never what is booked", () => {
    expect(ids(defaults)).toEqual(["early", "late"]);
    const booked = { ...pass("booked", "2031-04-06T02:00:00.000Z", null), engagementId: "e" };
    expect(arrange([...passes, booked], defaults).map((p) => p.id)).toEqual(["booked", "early", "late"]);
  });

  test("says how many it shows and how many it leaves out", () => {
    expect(countText(1, 1, { ...defaults, worthOnly: false })).toBe("1 pass");
    expect(countText(2, 2, defaults)).toBe("2 passes worth lasing or booked");
    expect(countText(2, 5, defaults)).toBe("2 passes worth lasing or booked; 3 more closed or not worth it");
  });
});
