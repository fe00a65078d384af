import { describe, expect, it } from "vitest";
import { stationHours } from "@/lib/planning/closures/station-hours";
import { brief, OPEN, PASS } from "./facts";

/** The pass runs from 00:30 to 00:40 UTC. */
function hours(...openingHours: { fromMin: number; toMin: number }[]) {
  return brief(stationHours(PASS, { ...OPEN, station: { ...OPEN.station, openingHours } }));
}

describe("station hours", () => {
  it("leaves an open station open", () => {
    expect(hours({ fromMin: 0, toMin: 1440 })).toEqual([]);
  });

  it("closes before the opening and after the end of the hours", () => {
    expect(hours({ fromMin: 32, toMin: 38 })).toEqual([
      ["closed", 0, 120],
      ["closed", 480, 600],
    ]);
  });

  it("lets hours run over midnight", () => {
    expect(hours({ fromMin: 22 * 60, toMin: 35 })).toEqual([["closed", 300, 600]]);
  });

  it("joins several spans of a day", () => {
    expect(hours({ fromMin: 20, toMin: 33 }, { fromMin: 36, toMin: 60 })).toEqual([["closed", 180, 360]]);
  });

  it("takes a station without hours on record as closed", () => {
    expect(hours()).toEqual([["closed", 0, 600]]);
    expect(hours({ fromMin: 600, toMin: 600 })).toEqual([["closed", 0, 600]]);
  });
});
