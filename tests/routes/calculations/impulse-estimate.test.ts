import { beforeAll, describe, expect, it } from "vitest";
import { POST } from "@/app/api/impulse-estimate/route";
import type { ImpulseEstimateBody } from "@/lib/contracts/calculations";
import type { ErrorBody } from "@/lib/contracts/common";
import { ownDatabase } from "../../database/support";
import { call, tokenOf } from "./callers";

ownDatabase();

/** Skyfield's documented example pass of the ISS's orbit; the fragment in it is invented. */
const QUESTION = {
  station: { latitudeDeg: 40.8939, longitudeDeg: -83.8917, altitudeM: 0 },
  laser: {
    mode: "pulsed",
    wavelengthNm: 1064,
    pulseEnergyJ: 8000,
    pulseWidthNs: 10,
    repetitionRateHz: 10,
    apertureM: 10,
    beamQuality: 2,
    zenithTransmission: 0.85,
    strehl: 0.5,
    jitterUrad: 0.1,
    spotConvention: "gaussian",
  },
  fragment: { massKg: 0.75, areaM2: 0.01, material: "aluminium", couplingNPerW: 5e-5 },
  elementSet: {
    line1: "1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082",
    line2: "2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473",
  },
  from: "2014-01-23T12:54:57.000Z",
  to: "2014-01-23T12:57:57.000Z",
};

let planner = "";
beforeAll(async () => {
  planner = await tokenOf("planner");
});

function estimate(change: object = {}, token: string | null = planner) {
  return call<ImpulseEstimateBody & ErrorBody>(POST, { body: { ...QUESTION, ...change }, token });
}

describe("POST /api/impulse-estimate", () => {
  it("pushes a face-on plate by coupling times fluence times area over mass", async () => {
    const { status, body } = await estimate();
    expect(status).toBe(200);
    expect(body.samples.length).toBeGreaterThan(100);
    const { massKg, areaM2 } = QUESTION.fragment;
    for (const sample of body.samples) {
      const impulseNs = sample.couplingNPerW * sample.fluenceJPerM2 * areaM2;
      expect(sample.deltaVMPerS / ((impulseNs * QUESTION.laser.repetitionRateHz) / massKg)).toBeCloseTo(1, 6);
    }
    const nearest = Math.min(...body.samples.map(({ rangeKm }) => rangeKm));
    // Range at culmination by Debian's Skyfield 1.45.
    expect(Math.abs(nearest - 420.56)).toBeLessThan(0.5);
    expect(body.semiMajorAxisAfterKm.p10).toBeLessThanOrEqual(body.semiMajorAxisAfterKm.p50);
    expect(body.semiMajorAxisAfterKm.p50).toBeLessThanOrEqual(body.semiMajorAxisAfterKm.p90);
    // A stretch that brings the object down is chosen where it approaches: before the culmination at 12:56:27.
    expect(Date.parse(body.best?.from ?? "")).toBeGreaterThanOrEqual(Date.parse(QUESTION.from));
    expect(Date.parse(body.best?.to ?? "")).toBeLessThan(Date.parse("2014-01-23T12:56:40.000Z"));
  });

  it("refuses what it doesn't model by name", async () => {
    const continuous = await estimate({ laser: { mode: "continuous", powerW: 1e6 } });
    expect(continuous.status).toBe(422);
    expect(continuous.body.error.details).toEqual([
      { path: "laser.mode", message: expect.stringMatching(/continuous/i) },
    ]);
    const unobtainium = await estimate({ fragment: { ...QUESTION.fragment, material: "unobtainium" } });
    expect(unobtainium.status).toBe(422);
    expect(unobtainium.body.error.details[0]).toMatchObject({ path: "fragment.material" });
    const massless = await estimate({ fragment: { ...QUESTION.fragment, massKg: 0 } });
    expect(massless.status).toBe(422);
    expect(massless.body.error.details[0]).toMatchObject({ path: "fragment.massKg" });
    const line1 = `${QUESTION.elementSet.line1.slice(0, 68)}3`;
    const badSet = await estimate({ elementSet: { ...QUESTION.elementSet, line1 } });
    expect(badSet.status).toBe(422);
    expect(badSet.body.error.details[0]).toMatchObject({
      path: "elementSet",
      message: expect.stringMatching(/checksum/i),
    });
  });

  it("is for planners, operators and administrators", async () => {
    expect((await estimate({}, null)).status).toBe(401);
    expect((await estimate({}, await tokenOf("coordinator"))).status).toBe(403);
    expect((await estimate({}, await tokenOf("administrator"))).status).toBe(200);
    expect((await estimate({ from: "yesterday" })).status).toBe(400);
    expect((await estimate({ to: QUESTION.from })).status).toBe(422);
  });
});
