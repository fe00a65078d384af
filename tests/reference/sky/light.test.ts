import { describe, expect, it } from "vitest";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { lightAt, lightStretches } from "@/lib/physics/sky/light-stretches";
import { elementsFromLines } from "../../fixtures/read-tle";

// Source: Skyfield's documentation, "Earth Satellites": the ISS over Bluffton, Ohio, with its light at rise,
// culmination and set.
function iss(): Orbit {
  const made = makeOrbit(
    elementsFromLines(
      "1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082",
      "2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473",
    ),
  );
  if (!made.ok) throw new Error(made.reason);
  return made.orbit;
}
const at = (time: string): number => Date.parse(`2014-01-23T${time}Z`);

describe("the light on an object", () => {
  it("is as documented: in shadow over the first pass, sunlit over the second", () => {
    expect(lightStretches(iss(), at("06:25:37"), at("06:28:19"))).toEqual([
      { fromMs: at("06:25:37"), toMs: at("06:28:19"), sunlight: "umbra" },
    ]);
    expect(lightStretches(iss(), at("12:54:56"), at("12:57:58"))).toEqual([
      { fromMs: at("12:54:56"), toMs: at("12:57:58"), sunlight: "sunlit" },
    ]);
  });

  it("changes over one revolution by way of the penumbra, without gaps, each edge where the light changes", () => {
    const orbit = iss();
    const [fromMs, toMs] = [at("05:00:00"), at("05:00:00") + 1000 * orbit.periodS];
    const stretches = lightStretches(orbit, fromMs, toMs);
    // Two shadow edges, in whichever order the revolution meets them, give five stretches.
    expect(stretches.map((s) => s.sunlight).filter((s) => s === "penumbra")).toHaveLength(2);
    expect(stretches).toHaveLength(5);
    expect([stretches[0]?.fromMs, stretches.at(-1)?.toMs]).toEqual([fromMs, toMs]);
    for (const [i, stretch] of stretches.entries()) {
      const next = stretches[i + 1];
      if (!next) continue;
      expect(next.fromMs).toBe(stretch.toMs);
      expect(lightAt(orbit, stretch.toMs - 11)).toBe(stretch.sunlight);
      expect(lightAt(orbit, stretch.toMs)).toBe(next.sunlight);
    }
  });
});
