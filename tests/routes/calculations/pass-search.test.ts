import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { POST } from "@/app/api/pass-search/route";
import type { PassSearchBody } from "@/lib/contracts/calculations";
import type { ErrorBody } from "@/lib/contracts/common";
import { ownDatabase } from "../../database/support";
import { call, tokenOf } from "./callers";

ownDatabase();

/** The documented example of Skyfield (documentation/earth-satellites.rst): the ISS over Bluffton, Ohio. */
const ISS = {
  line1: "1 25544U 98067A   14020.93268519  .00009878  00000-0  18200-3 0  5082",
  line2: "2 25544  51.6498 109.4756 0003572  55.9686 274.8005 15.49815350868473",
};
const BLUFFTON = { latitudeDeg: 40.8939, longitudeDeg: -83.8917, altitudeM: 0, minElevationDeg: 30 };
const DAY = { from: "2014-01-23T00:00:00.000Z", to: "2014-01-24T00:00:00.000Z" };

let planner = "";
beforeAll(async () => {
  planner = await tokenOf("planner");
});

function search(body: object | string, token: string | null = planner) {
  return call<PassSearchBody & ErrorBody>(POST, { body, token });
}

describe("POST /api/pass-search", () => {
  it("gives the passes of Skyfield's documented example within 1 s and 0.1°", async () => {
    const { status, body } = await search({ station: BLUFFTON, elementSets: [ISS], ...DAY });
    expect(status).toBe(200);
    expect(body.refused).toEqual([]);
    // Times as printed there; elevations, azimuths and ranges by Debian's Skyfield 1.45 at those instants.
    const expected = [
      {
        rise: "06:25:37",
        culminate: "06:26:58",
        set: "06:28:19",
        elevation: 54.357,
        riseAzimuth: 203.222,
        rangeKm: 506.41,
      },
      {
        rise: "12:54:56",
        culminate: "12:56:27",
        set: "12:57:58",
        elevation: 85.746,
        riseAzimuth: 308.703,
        rangeKm: 420.56,
      },
    ];
    expect(body.passes).toHaveLength(expected.length);
    for (const [i, pass] of body.passes.entries()) {
      const want = expected[i];
      if (!want) throw new Error("one pass too many");
      const offsetS = (at: string, time: string) =>
        (Date.parse(at) - Date.parse(`2014-01-23T${time}Z`)) / 1000;
      expect(pass.catalogNumber).toBe(25544);
      expect(Math.abs(offsetS(pass.riseAt, want.rise))).toBeLessThan(1);
      expect(Math.abs(offsetS(pass.culminateAt, want.culminate))).toBeLessThan(1);
      expect(Math.abs(offsetS(pass.setAt, want.set))).toBeLessThan(1);
      expect(Math.abs(pass.maxElevationDeg - want.elevation)).toBeLessThan(0.1);
      expect(Math.abs(pass.riseAzimuthDeg - want.riseAzimuth)).toBeLessThan(0.1);
      expect(Math.abs(pass.minRangeKm - want.rangeKm)).toBeLessThan(0.5);
      expect(pass).toMatchObject({ underWayAtFrom: false, underWayAtTo: false });
    }
  });

  it("names bad element sets by their index and goes on with the rest", async () => {
    const omm = {
      OBJECT_NAME: "INVENTED PIECE",
      OBJECT_ID: "2014-001A",
      NORAD_CAT_ID: 123456789,
      EPOCH: "2014-01-22T12:00:00.000000",
      MEAN_MOTION: 15.5,
      ECCENTRICITY: 0.0004,
      INCLINATION: 51.6,
      RA_OF_ASC_NODE: 100,
      ARG_OF_PERICENTER: 50,
      MEAN_ANOMALY: 10,
      BSTAR: 0.0002,
      MEAN_MOTION_DOT: 0,
      MEAN_MOTION_DDOT: 0,
    };
    const wrong = { ...ISS, line1: `${ISS.line1.slice(0, 68)}3` };
    const smuggled = { line1: ISS.line1, line2: `${ISS.line2}\n${ISS.line1}\n${ISS.line2}` };
    const elementSets = [wrong, ISS, {}, omm, smuggled, { ...omm, ECCENTRICITY: 1.2 }];
    const { status, body } = await search({ station: BLUFFTON, elementSets, ...DAY });
    expect(status).toBe(200);
    expect(body.refused.map(({ index }) => index)).toEqual([0, 2, 4, 5]);
    expect(body.refused[0]?.reason).toMatch(/checksum/i);
    expect(body.refused[3]?.reason).toMatch(/eccentricity/i);
    expect(new Set(body.passes.map(({ catalogNumber }) => catalogNumber))).toEqual(
      new Set([25544, 123456789]),
    );
  });

  it("gives the same for many sets, worked out in another process, as one by one", async () => {
    const lines = readFileSync("../shared/reference/published-debris-2021.tle", "utf8").split(/\r?\n/);
    const elementSets = Array.from({ length: 150 }, (_, n) => ({
      line1: lines[3 * n + 1],
      line2: lines[3 * n + 2],
    }));
    const span = { from: "2021-10-03T00:00:00.000Z", to: "2021-10-04T00:00:00.000Z" };
    const all = await search({ station: BLUFFTON, elementSets, ...span });
    expect(all.status).toBe(200);
    const risen = all.body.passes.map(({ riseAt }) => riseAt);
    expect(risen).toEqual([...risen].sort());
    for (const n of [0, 40, 149]) {
      const one = await search({ station: BLUFFTON, elementSets: [elementSets[n]], ...span });
      const number = Number(elementSets[n]?.line1?.slice(2, 7));
      expect(all.body.passes.filter(({ catalogNumber }) => catalogNumber === number)).toEqual(
        one.body.passes,
      );
    }
    expect(all.body.passes.length).toBeGreaterThan(200);
  });

  it("refuses in the order 401, 403, 400, 422", async () => {
    const good = { station: BLUFFTON, elementSets: [ISS], ...DAY };
    expect((await search(good, null)).status).toBe(401);
    expect((await search(good, "no such token")).status).toBe(401);
    const coordinator = await tokenOf("coordinator");
    expect((await search("not JSON", coordinator)).status).toBe(403);
    expect((await search("not JSON")).status).toBe(400);
    const badField = await search({ ...good, station: { ...BLUFFTON, latitudeDeg: "north" } });
    expect(badField.status).toBe(400);
    expect(badField.body.error.details.map(({ path }) => path)).toEqual(["station.latitudeDeg"]);
    const backwards = await search({ ...good, from: DAY.to, to: DAY.from });
    expect(backwards.status).toBe(422);
    expect(backwards.body.error.details).toEqual([{ path: "to", message: "to must be later than from" }]);
    const tooLong = await search({ ...good, to: "2014-03-01T00:00:00.000Z" });
    expect(tooLong.status).toBe(422);
    const missing = await search({ elementSets: [ISS], ...DAY });
    expect(missing.status).toBe(422);
    expect((await search(good, await tokenOf("operator"))).status).toBe(200);
  });

  it("answers 413 over 10 MiB", async () => {
    const answer = await search(" ".repeat(10 * 1024 * 1024 + 1));
    expect(answer.status).toBe(413);
  });
});
