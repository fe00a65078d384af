import { describe, expect, it } from "vitest";
import { bandOf } from "@/lib/planning/dwell-percentiles";

describe("band of weighted outcomes", () => {
  it("has the percentiles of evenly spread values, whatever their order", () => {
    const outcomes = Array.from({ length: 1000 }, (_, i) => ({ value: ((i * 37) % 1000) / 1000, weight: 1 }));
    const band = bandOf(outcomes);
    expect(band.p10).toBeCloseTo(0.1, 2);
    expect(band.p50).toBeCloseTo(0.5, 2);
    expect(band.p90).toBeCloseTo(0.9, 2);
  });

  it("counts each outcome by its weight", () => {
    const band = bandOf([
      { value: 5, weight: 1 },
      { value: 1, weight: 98 },
      { value: 9, weight: 1 },
    ]);
    expect(band.p10).toBe(1);
    expect(band.p50).toBeLessThan(1.2);
    expect(bandOf([{ value: 3, weight: 2 }])).toEqual({ p10: 3, p50: 3, p90: 3 });
    expect(bandOf([]).p50).toBeNaN();
  });
});
