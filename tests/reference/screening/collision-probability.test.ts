import { describe, expect, it } from "vitest";
import {
  type Covariance3,
  discProbability,
  encounterPlane,
} from "@/lib/physics/screening/collision-probability";
import { erfc } from "@/lib/physics/screening/normal-integral";
import { norm, subtract, type Vec3 } from "@/lib/physics/vector";

describe("the probability of a disc", () => {
  // Source: the test values of Orekit's Patera2005Test (cases of Chan, CSM, CDM and Alfano), metres, with the
  // tolerance of the printed digits.
  it.each([
    ["Chan 01", 0, 10, 25, 50, 5, 9.741e-3, 1e-6],
    ["Chan 02", 10, 0, 25, 50, 5, 9.181e-3, 1e-6],
    ["Chan 03", 0, 10, 25, 75, 5, 6.571e-3, 1e-6],
    ["Chan, far", 0, 1000, 1000, 3000, 10, 1.577e-5, 1e-8],
    ["Chan, farther", 0, 5000, 1000, 3000, 50, 1.039e-4, 1e-7],
    ["Chan, in the tail", 10000, 0, 1000, 3000, 10, 3.219e-27, 1e-30],
    ["CSM 1", 84.875546, 60.583685, 57.918666, 152.8814468, 10.3, 1.9002e-3, 1e-7],
    ["CDM 1", -752.672701, 644.939441, 445.85995, 6095.858688, 3.5, 5.3904e-7, 1e-11],
    ["Alfano 3", -3.8872073, 0.1591646, 1.410183, 114.258519, 15, 1.0038e-1, 1e-5],
  ])("%s", (_name, missX, missY, sigmaX, sigmaY, radius, want, tolerance) => {
    expect(Math.abs(discProbability({ missX, missY, sigmaX, sigmaY, radius }) - want)).toBeLessThan(
      tolerance,
    );
  });

  it("says nothing without a covariance", () => {
    expect(discProbability({ missX: 1, missY: 1, sigmaX: 0, sigmaY: 1, radius: 1 })).toBeNaN();
  });

  it("is all of it when the disc holds the whole error", () => {
    expect(discProbability({ missX: 0, missY: 0, sigmaX: 1, sigmaY: 2, radius: 100 })).toBeCloseTo(1, 9);
  });
});

describe("the error function's complement", () => {
  // Source: Abramowitz and Stegun, table 7.1 (erf 0.5 and 1); DLMF 7.8 bounds; the others from memory of
  // widely printed tables (erfc 3 and 5).
  it.each([
    [0.5, 1 - 0.5204998778, 1e-9],
    [1, 1 - 0.8427007929, 1e-9],
    [3, 2.2090497e-5, 1e-12],
    [5, 1.53745979e-12, 1e-19],
    [-1, 1.8427007929, 1e-9],
  ])("at %d", (x, want, tolerance) => {
    expect(Math.abs(erfc(x) - want)).toBeLessThan(tolerance);
  });
});

describe("from three dimensions to the encounter plane", () => {
  // Source: unit test of the Foster method in NASA's CARA analysis tools; radius 20 m. Tolerance 1e-3 of the
  // published 2.70601573490125e-5 (a square of equal area; 2.7060234766e-5 for the circle).
  const r1 = { x: 378.39559, y: 4305.721887, z: 5752.767554 };
  const v1 = { x: 2.360800244, y: 5.580331936, z: -4.322349039 };
  const r2 = { x: 374.5180598, y: 4307.560983, z: 5751.130418 };
  const v2 = { x: -5.388125081, y: -3.946827739, z: 3.322820358 };
  const c1 = symmetric(
    44.5757544811362,
    81.6751751052616,
    -67.8687662707124,
    158.453402956163,
    -128.616921644857,
    105.490542562701,
  );
  const c2 = symmetric(
    2.31067077720423,
    1.69905293875632,
    -1.4170164577661,
    1.24957388457206,
    -1.04174164279599,
    0.869260558223714,
  );
  const encounter = encounterPlane(subtract(r1, r2), subtract(v1, v2), plus(c1, c2), 0.02);

  it("gives the published probability", () => {
    expect(discProbability(encounter) / 2.706023476569786e-5).toBeCloseTo(1, 6);
    expect(discProbability(encounter) / 2.70601573490125e-5).toBeCloseTo(1, 3);
  });

  it("keeps the miss distance (4.59323 km, of which next to nothing lies along the relative velocity)", () => {
    expect(Math.hypot(encounter.missX, encounter.missY)).toBeCloseTo(4.59323, 4);
    expect(norm(subtract(v1, v2))).toBeCloseTo(14.46586, 5);
  });

  it("does not depend on the axes", () => {
    const turned = (a: Vec3): Vec3 => ({ x: a.y, y: a.z, z: a.x });
    const c = plus(c1, c2);
    const cTurned = symmetric(c[1][1], c[1][2], c[0][1], c[2][2], c[0][2], c[0][0]);
    const other = encounterPlane(turned(subtract(r1, r2)), turned(subtract(v1, v2)), cTurned, 0.02);
    expect(discProbability(other) / discProbability(encounter)).toBeCloseTo(1, 9);
  });
});

function symmetric(xx: number, xy: number, xz: number, yy: number, yz: number, zz: number): Covariance3 {
  return [
    [xx, xy, xz],
    [xy, yy, yz],
    [xz, yz, zz],
  ];
}

function plus(a: Covariance3, b: Covariance3): Covariance3 {
  const at = (i: 0 | 1 | 2, j: 0 | 1 | 2) => a[i][j] + b[i][j];
  return symmetric(at(0, 0), at(0, 1), at(0, 2), at(1, 1), at(1, 2), at(2, 2));
}
