import { describe, expect, it } from "vitest";
import { probabilityText } from "@/app/_components/after-dwell/probability-text";
import { WGS72_MU_KM3_PER_S2 } from "@/lib/physics/constants";
import { fitElements } from "@/lib/physics/effect/fit-elements";
import { rtnAxes } from "@/lib/physics/effect/two-body";
import { makeSiteFrame } from "@/lib/physics/frames/earth";
import type { Elements } from "@/lib/physics/orbit/elements";
import { makeOrbit, type Orbit, type OrbitState } from "@/lib/physics/orbit/propagate";
import { findPasses } from "@/lib/physics/passes/find-passes";
import { norm, subtract } from "@/lib/physics/vector";
import { type AfterObject, pathsAfter, screenAfter } from "@/lib/planning/after-dwell";
import {
  addCovariances,
  covarianceOf,
  elementSetSigmas,
  nudgedSigmas,
} from "@/lib/planning/assumed-covariance";
import { effectOfDwell } from "@/lib/planning/effect";
import type { FragmentBody, PulsedLaser } from "@/lib/planning/laser";

const DAY = 86_400_000;
const EPOCH = Date.UTC(2031, 3, 6);
const FRAGMENT: Elements = {
  catalogNumber: 90_001,
  objectName: null,
  objectId: null,
  epochMs: EPOCH,
  meanMotionRevPerDay: 14.4,
  eccentricity: 0.004,
  inclinationDeg: 74,
  raanDeg: 120,
  argPericenterDeg: 80,
  meanAnomalyDeg: 20,
  bstar: 0.0001,
  meanMotionDot: 0,
  meanMotionDdot: 0,
};
const LASER: PulsedLaser = {
  mode: "pulsed",
  wavelengthNm: 1064,
  pulseEnergyJ: 8000,
  pulseWidthNs: 5,
  repetitionRateHz: 10,
  apertureM: 10,
  beamQuality: 1.5,
  zenithTransmission: 0.85,
  strehl: 0.6,
  jitterUrad: 0.05,
  spotConvention: "gaussian",
};
const BODY: FragmentBody = {
  massKg: 0.8,
  areaM2: 0.02,
  material: "aluminium",
  couplingNPerW: null,
  shape: "plate",
  spinRateHz: null,
};

function orbitOf(elements: Elements): Orbit {
  const made = makeOrbit(elements);
  if (!made.ok) throw new Error(made.reason);
  return made.orbit;
}
function stateOf(orbit: Orbit, atMs: number): OrbitState {
  const at = orbit.stateAt(atMs);
  if (!at.ok) throw new Error(at.reason);
  return at.state;
}

const site = { latitudeDeg: 46.5, longitudeDeg: 8.2, altitudeM: 1400 };
const frame = makeSiteFrame(site);
const orbit = orbitOf(FRAGMENT);
const [found] = findPasses(orbit, [{ site, minElevationRad: 0.4 }], EPOCH, EPOCH + 2 * DAY).passes;
if (!found) throw new Error("the orbit must have a pass");
const fromMs = Math.ceil(found.pass.riseMs / 1000) * 1000 + 40_000;
const toMs = fromMs + 60_000;
const dwell = { orbit, frame, laser: LASER, body: BODY, fromMs, toMs };
const made = pathsAfter(dwell);
if (!made.ok) throw new Error(made.reason);
const { paths } = made;

describe("the two ways after a dwell", () => {
  it("part at the dwell's end by the velocity change of the effect, and by metres of position", () => {
    const worked = effectOfDwell(dwell);
    if (!worked.ok) throw new Error(worked.reason);
    const { radialMPerS, transverseMPerS, normalMPerS } = worked.effect.deltaV;
    const [lased, free] = [stateOf(paths.nudged, toMs), stateOf(paths.untouched, toMs)];
    const gainedMPerS = 1000 * norm(subtract(lased.vKmPerS, free.vKmPerS));
    expect(gainedMPerS).toBeGreaterThan(1);
    // The axes turn by some 3.6° in the minute, so the sum over turning axes is a little off the plain one.
    expect(gainedMPerS / Math.hypot(radialMPerS, transverseMPerS, normalMPerS)).toBeCloseTo(1, 2);
    // Half the velocity change over the minute, as for any even push.
    expect(norm(subtract(lased.rKm, free.rKm))).toBeLessThan(gainedMPerS * 0.06);
    expect(norm(subtract(lased.rKm, free.rKm))).toBeGreaterThan(gainedMPerS * 0.015);
  });

  it("drift apart along the track at the rate of Kepler's third law", () => {
    // Two-body semi-major axes by the vis-viva equation, freed of the periodic terms by their difference.
    const axisKm = (orbitHere: Orbit) => {
      const { rKm, vKmPerS } = stateOf(orbitHere, toMs);
      return 1 / (2 / norm(rKm) - norm(vKmPerS) ** 2 / WGS72_MU_KM3_PER_S2);
    };
    const a = axisKm(paths.untouched);
    const n = Math.sqrt(WGS72_MU_KM3_PER_S2 / a ** 3);
    const laterMs = toMs + 6 * 3_600_000;
    const [lased, free] = [stateOf(paths.nudged, laterMs), stateOf(paths.untouched, laterMs)];
    const apart = subtract(lased.rKm, free.rKm);
    const { transverse } = rtnAxes(free);
    const alongKm = apart.x * transverse.x + apart.y * transverse.y + apart.z * transverse.z;
    const expectedKm = -1.5 * n * (axisKm(paths.nudged) - a) * 6 * 3600;
    expect(Math.abs(expectedKm)).toBeGreaterThan(20);
    // Radial parts of the push add a swing of some km; the drift itself is right to a tenth.
    expect(Math.abs(alongKm / expectedKm - 1)).toBeLessThan(0.1);
  });
});

describe("screenAfter", () => {
  // One object meets the untouched fragment nearly head-on a day later, one the nudged one.
  const meetMs = toMs + DAY;
  const meeting = (way: Orbit, id: string): AfterObject => {
    const { elements } = way;
    const at = stateOf(way, meetMs);
    // The same set with its plane turned about the line to the meeting place crosses there.
    const turned = crossing(at, elements, meetMs);
    return { id, name: id, class: "payload", orbit: turned };
  };
  const objects = [meeting(paths.untouched, "U"), meeting(paths.nudged, "N")];
  const old: AfterObject = {
    id: "old",
    name: "Old",
    class: "own",
    orbit: orbitOf({ ...FRAGMENT, epochMs: EPOCH - 30 * DAY }),
  };
  const args = {
    paths,
    fromMs: toMs,
    toMs: toMs + 2 * DAY,
    thresholdKm: 5,
    areaM2: 0.02,
    axisBandKm: { p10: 7100, p90: 7101 },
  };
  const { approaches, unseen } = screenAfter({ ...args, objects: [...objects, old] });

  it("finds on each way the object that was put into it, and the moment", () => {
    for (const [path, id] of [
      ["untouched", "U"],
      ["nudged", "N"],
    ] as const) {
      const met = approaches.find(
        (a) => a.path === path && a.objectId === id && Math.abs(a.atMs - meetMs) < 2000,
      );
      expect(met, path).toBeDefined();
      expect(met?.missKm).toBeLessThan(0.5);
      expect(met?.relativeSpeedKmPerS).toBeGreaterThan(5);
      expect(met?.atEdge).toBe(false);
    }
    const wrong = approaches.filter((a) => (a.path === "untouched") === (a.objectId === "N"));
    expect(wrong.filter((a) => Math.abs(a.atMs - meetMs) < 2000 && a.missKm < 0.5)).toEqual([]);
  });

  it("gives a probability between nothing and one, smaller where the nudge is less well known", () => {
    const chance = (path: string, given: typeof approaches) =>
      given.find((a) => a.path === path && Math.abs(a.atMs - meetMs) < 2000 && a.missKm < 0.5)?.probability ??
      Number.NaN;
    expect(chance("untouched", approaches)).toBeGreaterThan(1e-8);
    expect(chance("untouched", approaches)).toBeLessThan(1e-2);
    expect(chance("nudged", approaches)).toBeLessThan(chance("untouched", approaches));
    const known = screenAfter({ ...args, objects, axisBandKm: { p10: 7100, p90: 7100 } });
    expect(chance("nudged", known.approaches)).toBeGreaterThan(chance("nudged", approaches));
  });

  it("names an object whose set is too old, and says nothing of where it is", () => {
    expect(unseen).toEqual(["Old: its newest element set is too old"]);
    expect(approaches.some(({ objectId }) => objectId === "old")).toBe(false);
  });
});

/** An object that is at the place of a state at a time, in a plane turned by 70° about that place. */
function crossing(at: OrbitState, like: Elements, atMs: number): Orbit {
  const { radial, transverse, normal } = rtnAxes(at);
  const angle = (70 * Math.PI) / 180;
  const part = (axis: { x: number; y: number; z: number }) =>
    at.vKmPerS.x * axis.x + at.vKmPerS.y * axis.y + at.vKmPerS.z * axis.z;
  const [vr, vt] = [part(radial), part(transverse)];
  const component = (k: "x" | "y" | "z") =>
    vr * radial[k] + vt * (Math.cos(angle) * transverse[k] + Math.sin(angle) * normal[k]);
  const turned = { rKm: at.rKm, vKmPerS: { x: component("x"), y: component("y"), z: component("z") } };
  const fit = fitElements(turned, atMs, like);
  if (!fit.ok) throw new Error(fit.reason);
  return fit.orbit;
}

describe("the assumed covariance", () => {
  it("has the stated deviations along the axes of the orbit, whatever the frame", () => {
    const state = stateOf(orbit, EPOCH + 12_345_000);
    const c = covarianceOf(state, { radialKm: 0.1, transverseKm: 2, normalKm: 0.3 });
    const axes = rtnAxes(state);
    const along = (u: { x: number; y: number; z: number }) => {
      const v = [u.x, u.y, u.z];
      return Math.sqrt(
        c.reduce((sum, row, i) => sum + row.reduce((s, cij, j) => s + (v[i] ?? 0) * cij * (v[j] ?? 0), 0), 0),
      );
    };
    expect(along(axes.radial)).toBeCloseTo(0.1, 9);
    expect(along(axes.transverse)).toBeCloseTo(2, 9);
    expect(along(axes.normal)).toBeCloseTo(0.3, 9);
    expect(addCovariances(c, c)[1][2]).toBeCloseTo(2 * c[1][2], 12);
  });

  it("grows as common practice says, and with the nudge by Kepler's third law", () => {
    // 1 km at epoch and 1 km a day (common practice).
    expect(elementSetSigmas(EPOCH, EPOCH + 2 * DAY)).toEqual({
      radialKm: 0.30000000000000004,
      transverseKm: 3,
      normalKm: 0.30000000000000004,
    });
    const grown = nudgedSigmas({
      epochMs: EPOCH,
      atMs: EPOCH + DAY,
      dwellEndMs: EPOCH,
      periodS: 6000,
      axisBandKm: { p10: 7000, p90: 7002.5631 },
    });
    // One km of axis at a period of 100 minutes: 3π km a revolution, 14.4 revolutions a day.
    expect(grown.transverseKm).toBeCloseTo(Math.hypot(2, 3 * Math.PI * 14.4), 9);
    expect(grown.radialKm).toBeCloseTo(Math.hypot(0.2, 1), 9);
  });
});

describe("probabilityText", () => {
  it.each([
    [null, "no value"],
    [0, "under 1 in 1000 million"],
    [2.5e-8, "25.0 in 1000 million"],
    [3.21e-6, "3.2 in a million"],
    [0.0125, "12.5 in a thousand"],
  ])("says %s as %s", (value, words) => {
    expect(probabilityText(value)).toBe(words);
  });
});
