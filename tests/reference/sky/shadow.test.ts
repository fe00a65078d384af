import { describe, expect, it } from "vitest";
import { DEG, EARTH_RADIUS_KM } from "@/lib/physics/constants";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { type Sunlight, sunlightAt } from "@/lib/physics/sky/shadow";
import { sunPositionKm } from "@/lib/physics/sky/sun";
import { scale, type Vec3 } from "@/lib/physics/vector";
import { elementsFromLines } from "../../fixtures/read-tle";

describe("the Earth's shadow", () => {
  it("Vallado, test_sun.py: a geostationary position in umbra", () => {
    const r = { x: -41260.1818237031, y: 8684.15782134066, z: 0 };
    const sun = { x: 148470363.19330865, y: -9449738.11151353, z: -4096753.810182002 };
    expect(sunlightAt(r, sun)).toBe("umbra");
    // 6,153.975 km off the axis against radii of 6,184.850 km (umbra) and 6,574.998 km (penumbra), which
    // were computed independently from the same cones: moved out, the position changes its light there.
    const [along, aside] = [41712.657, 6153.975];
    const axis = scale(sun, -1 / Math.hypot(sun.x, sun.y, sun.z));
    const across = unitOff(r, axis, along, aside);
    const at = (asideKm: number): Vec3 => ({
      x: axis.x * along + across.x * asideKm,
      y: axis.y * along + across.y * asideKm,
      z: axis.z * along + across.z * asideKm,
    });
    const light = [6184.8, 6184.9, 6574.9, 6575.1].map((km) => sunlightAt(at(km), sun));
    expect(light).toEqual(["umbra", "penumbra", "penumbra", "sunlit"] satisfies Sunlight[]);
  });

  it("Curtis, example 12.8: in shadow", () => {
    const r = { x: 2817.899, y: -14110.473, z: -7502.672 };
    expect(sunlightAt(r, { x: -11747041, y: 139486985, z: 60472278 })).toBe("umbra");
  });

  it("Vallado, example 5-6: sunlit on 1995-02-15 12:00 UTC", () => {
    const r = { x: 0, y: -4464.696, z: -5102.509 };
    expect(sunlightAt(r, sunPositionKm(Date.parse("1995-02-15T12:00:00Z")))).toBe("sunlit");
  });

  // Orbit and Sun of Vallado's test_sun.py: e = 0.002, a = 1.029 Re / (1 - e²), i = 63.4°, node and perigee 0.
  const sun = { x: 67029379.328701, y: -120206236.987781, z: -52109013.709624 };
  const lightAt = (trueAnomalyDeg: number): Sunlight => {
    const nu = trueAnomalyDeg * DEG;
    const r = (1.029 * EARTH_RADIUS_KM) / (1 + 0.002 * Math.cos(nu));
    const [y, i] = [r * Math.sin(nu), 63.4 * DEG];
    return sunlightAt({ x: r * Math.cos(nu), y: y * Math.cos(i), z: y * Math.sin(i) }, sun);
  };
  const edgeDeg = (fromDeg: number, toDeg: number, isBefore: (light: Sunlight) => boolean): number => {
    let [lo, hi] = [fromDeg, toDeg];
    while (hi - lo > 1e-6) {
      if (isBefore(lightAt((lo + hi) / 2))) lo = (lo + hi) / 2;
      else hi = (lo + hi) / 2;
    }
    return lo;
  };

  it.each([
    ["entry", 50.0434, edgeDeg(45, 60, (l) => l === "sunlit"), edgeDeg(45, 60, (l) => l !== "umbra"), 0.686],
    [
      "exit",
      196.4727,
      edgeDeg(190, 200, (l) => l !== "sunlit"),
      edgeDeg(190, 200, (l) => l === "umbra"),
      0.667,
    ],
  ] as const)(
    "has the published cylinder's edge in the middle of the penumbra: %s",
    (_name, wantDeg, outer, inner, widthDeg) => {
      // The cylinder's edges are published there, 0.002°. The width of the penumbra is that of an independent
      // cone over a flattened Earth, whose edges lie 0.1° to 0.4° elsewhere: 0.02°.
      expect(Math.abs((outer + inner) / 2 - wantDeg)).toBeLessThan(0.002);
      expect(Math.abs(Math.abs(outer - inner) - widthDeg)).toBeLessThan(0.02);
    },
  );

  it.each([
    ["06:25:37", false],
    ["06:26:58", false],
    ["06:28:19", false],
    ["12:54:56", true],
    ["12:56:27", true],
    ["12:57:58", true],
  ])("Skyfield's documented ISS pass at %s: sunlit %s", (time, sunlit) => {
    const made = makeOrbit(
      elementsFromLines(
        "1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082",
        "2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473",
      ),
    );
    if (!made.ok) throw new Error(made.reason);
    const at = Date.parse(`2014-01-23T${time}Z`);
    const got = made.orbit.stateAt(at);
    if (!got.ok) throw new Error(got.reason);
    expect(sunlightAt(got.state.rKm, sunPositionKm(at)) === "sunlit").toBe(sunlit);
  });
});

/** Unit vector off an axis towards a position with given parts along and aside of it. */
function unitOff(r: Vec3, axis: Vec3, along: number, aside: number): Vec3 {
  return {
    x: (r.x - axis.x * along) / aside,
    y: (r.y - axis.y * along) / aside,
    z: (r.z - axis.z * along) / aside,
  };
}
