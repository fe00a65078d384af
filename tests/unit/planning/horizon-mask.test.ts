import { describe, expect, it } from "vitest";
import { maskPath } from "@/app/_components/sky/horizon-mask";
import { DEG } from "@/lib/physics/constants";
import { lookAngles, temeToEcef } from "@/lib/physics/frames/earth";
import { visibility } from "@/lib/planning/closures/visibility";
import { highestMaskDeg, maskElevationDeg } from "@/lib/planning/horizon-mask";
import { LIMITS, MAP, measured, ORBIT, PASSES } from "../../property/closures/sky";
import { brief, OPEN, PASS, span } from "../closures/facts";

const MASK = [
  { azimuthDeg: 90, elevationDeg: 12 },
  { azimuthDeg: 200, elevationDeg: 35 },
  { azimuthDeg: 202, elevationDeg: 20 },
  { azimuthDeg: 340, elevationDeg: 28 },
];

describe("the horizon in steps", () => {
  it.each([
    [0, 28],
    [89.999, 28],
    [90, 12],
    [199.999, 12],
    [200, 35],
    [201.999, 35],
    [202, 20],
    [340, 28],
    [359.999, 28],
    [360, 28],
    [450, 12],
    [-20, 28],
    [-20.001, 20],
  ])("at azimuth %s° stands at %s°", (azimuthDeg, elevationDeg) => {
    expect(maskElevationDeg(MASK, azimuthDeg)).toBe(elevationDeg);
    expect(maskElevationDeg([...MASK].reverse(), azimuthDeg)).toBe(elevationDeg);
  });

  it("gives the highest step of a range, over north too, and none without steps", () => {
    expect(highestMaskDeg(MASK, 198, 1)).toBe(12);
    expect(highestMaskDeg(MASK, 198, 2)).toBe(35);
    expect(highestMaskDeg(MASK, 330, 15)).toBe(28);
    expect(highestMaskDeg(MASK, 100, 180)).toBe(35);
    expect(highestMaskDeg(MASK, 100, 500)).toBe(35);
    expect(highestMaskDeg([{ azimuthDeg: 0, elevationDeg: 7 }], 123, 0)).toBe(7);
    expect(maskElevationDeg([], 10)).toBe(-90);
  });
});

function lookAt(atMs: number) {
  const at = ORBIT.stateAt(atMs);
  if (!at.ok) throw new Error(at.reason);
  return lookAngles(MAP.frame, temeToEcef(at.state, atMs));
}
const inside = (spans: readonly { fromMs: number; toMs: number }[] | undefined, atMs: number): boolean =>
  (spans ?? []).some(({ fromMs, toMs }) => fromMs <= atMs && atMs < toMs);

describe("measuring a pass against mask and mount", () => {
  it("closes just what a scan finds behind the mask, steps and narrow teeth included", () => {
    let [behind, free] = [0, 0];
    for (const pass of PASSES.slice(0, 10)) {
      // A tooth of 0.2° on the way of this very pass, besides the plain mask.
      const tooth = lookAt(pass.riseMs + 0.4 * (pass.setMs - pass.riseMs)).azimuthRad / DEG;
      const mask = [
        ...MASK,
        { azimuthDeg: tooth, elevationDeg: 89 },
        { azimuthDeg: tooth + 0.2, elevationDeg: maskElevationDeg(MASK, tooth + 0.2) },
      ];
      const { belowMask } = measured(pass, { ...LIMITS, horizonMask: mask }, []);
      for (let atMs = pass.riseMs + 10; atMs < pass.setMs - 10; atMs += 100) {
        const { azimuthRad, elevationRad } = lookAt(atMs);
        const hidden = elevationRad / DEG < maskElevationDeg(mask, azimuthRad / DEG);
        // Nothing hidden is left open; and what is closed is hidden within a second.
        if (hidden) expect(inside(belowMask, atMs)).toBe(true);
        else if (inside(belowMask, atMs)) {
          const near = Array.from({ length: 31 }, (_, i) => lookAt(atMs - 1500 + 100 * i));
          expect(
            near.some((look) => look.elevationRad / DEG < maskElevationDeg(mask, look.azimuthRad / DEG)),
          ).toBe(true);
        }
        if (hidden) behind++;
        else free++;
      }
    }
    expect(behind).toBeGreaterThan(100);
    expect(free).toBeGreaterThan(100);
  });

  it("closes where the azimuth turns faster than the mount, measured by differences of azimuth", () => {
    const pass = PASSES.reduce((a, b) => (b.maxElevationDeg > a.maxElevationDeg ? b : a));
    const rateAt = (atMs: number): number => {
      const turned = (lookAt(atMs + 50).azimuthRad - lookAt(atMs - 50).azimuthRad) / DEG;
      return Math.abs(turned - 360 * Math.round(turned / 360)) / 0.1;
    };
    const limit = 0.6 * rateAt(pass.culminateMs);
    const { tooFast } = measured(pass, { ...LIMITS, maxAzimuthRateDegPerS: limit }, []);
    expect(tooFast).toHaveLength(1);
    expect(inside(tooFast, pass.culminateMs)).toBe(true);
    for (const edgeMs of [tooFast?.[0]?.fromMs, tooFast?.[0]?.toMs]) {
      expect(Math.abs(rateAt(edgeMs ?? 0) / limit - 1)).toBeLessThan(0.01);
    }
    expect(measured(pass, LIMITS, []).tooFast).toEqual([]);
    expect(measured(pass, { ...LIMITS, maxAzimuthRateDegPerS: null }, []).tooFast).toEqual([]);
  });
});

describe("the rule of visibility", () => {
  it("closes behind the mask and near the zenith, with the station's version, and nobody can attest it away", () => {
    const station = { ...OPEN.station, maxAzimuthRateDegPerS: 4 };
    const pass = { ...PASS, belowMask: [span(0, 30)], tooFast: [span(290, 310)] };
    const closures = visibility(pass, { ...OPEN, station });
    expect(brief(closures)).toEqual([
      ["closed", 0, 30],
      ["closed", 290, 310],
    ]);
    expect(closures.map(({ cause }) => cause)).toEqual([
      "The fragment stands below the horizon mask of Hollin Fell.",
      "Near the zenith the mount of Hollin Fell would have to turn faster than 4° a second in azimuth.",
    ]);
    expect(closures.every(({ overridable, input }) => !overridable && input.endsWith("version 3"))).toBe(
      true,
    );
  });
});

describe("the mask on the sky chart", () => {
  it("is an arc for each step, from the step's azimuth to the next, north up", () => {
    const path = maskPath([
      { azimuthDeg: 90, elevationDeg: 0 },
      { azimuthDeg: 0, elevationDeg: 45 },
    ]);
    // Centre 160, rim 132: 45° stands half-way. The first step runs from north to east at 45°.
    expect(path).toContain("M160.0 94.0A66.0 66.0 0 0 1");
    expect(path).toContain("226.0 160.0L292.0 160.0A132.0 132.0 0 0 1");
    expect(path.endsWith("Z")).toBe(true);
  });
});
