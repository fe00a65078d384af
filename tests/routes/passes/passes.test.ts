import { beforeAll, describe, expect, it } from "vitest";
import { GET as getAirspace } from "@/app/api/airspace/route";
import { GET as getAuthorities } from "@/app/api/authorities/route";
import { GET as getFragment } from "@/app/api/fragments/[id]/route";
import { GET as getFragments } from "@/app/api/fragments/route";
import { GET as getPass } from "@/app/api/passes/[id]/route";
import { GET as getPasses } from "@/app/api/passes/route";
import { GET as getProtected } from "@/app/api/protected/route";
import { GET as getStations } from "@/app/api/stations/route";
import type { AirspaceVolumeBody } from "@/lib/contracts/airspace";
import type { AuthorityBody } from "@/lib/contracts/authorities";
import type { ErrorBody } from "@/lib/contracts/common";
import type { FragmentBody, FragmentSheetBody } from "@/lib/contracts/fragments";
import type { PassBody, PassSheetBody } from "@/lib/contracts/passes";
import type { ProtectedListBody } from "@/lib/contracts/protected";
import type { StationBody } from "@/lib/contracts/stations";
import { makeSky, type Sky } from "../../database/passes/sky";
import { ownDatabase } from "../../database/support";
import { HOUR, NOW } from "../../database/world";
import { call, tokenOf } from "../calculations/callers";

ownDatabase();

let sky: Sky;
let planner = "";
let coordinator = "";
beforeAll(async () => {
  sky = await makeSky();
  planner = await tokenOf("planner");
  coordinator = await tokenOf("coordinator");
});

const SPAN = `from=${new Date(NOW).toISOString()}&to=${new Date(NOW + 48 * HOUR).toISOString()}`;

function get<T>(
  handler: Parameters<typeof call>[0],
  options: { query?: string; token?: string | null; params?: Record<string, string> } = {},
) {
  const { query = "", token = planner, params = {} } = options;
  return call<T & ErrorBody>(handler, { method: "GET", path: `/api?${query}`, token, params });
}

describe("GET /api/passes", () => {
  it("gives every pass of the span, in the form of the contract", async () => {
    const { status, body } = await get<{ passes: PassBody[] }>(getPasses, { query: SPAN });
    expect(status).toBe(200);
    expect(body.passes).toHaveLength(sky.passIds.length);
    const pass = body.passes.find((p) => p.dwell);
    expect(pass?.riseAt).toMatch(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$/);
    expect(pass?.dwell?.from).toMatch(/:\d\d\.000Z$/);
    expect(pass).toMatchObject({ engagementId: null, booked: null, noDwellReason: null });
    for (const opening of pass?.openings ?? []) expect(Array.isArray(opening.pending)).toBe(true);
  });

  it("asks for a sign-in, and says which part of a query it can't read", async () => {
    expect((await get(getPasses, { query: SPAN, token: null })).status).toBe(401);
    expect((await get(getPasses, { query: SPAN, token: "no such token" })).status).toBe(401);
    const wrong = await get(getPasses, { query: "from=noon&limit=3" });
    expect(wrong.status).toBe(400);
    expect(wrong.body.error.details.map((d) => d.path)).toContain("from");
  });

  it("shows a coordinator only what his authority was told of", async () => {
    const { status, body } = await get<{ passes: PassBody[] }>(getPasses, {
      query: SPAN,
      token: coordinator,
    });
    expect(status).toBe(200);
    expect(body.passes).toEqual([]);
  });
});

describe("GET /api/passes/:id", () => {
  it("gives the sheet, and 404 for what is not there or not his to see", async () => {
    const [id = ""] = sky.passIds;
    const sheet = await get<PassSheetBody>(getPass, { params: { id } });
    expect(sheet.status).toBe(200);
    expect(sheet.body).toMatchObject({ id, laser: { name: "Survey head", version: 1 } });
    expect(sheet.body.samples.length).toBeGreaterThan(5);
    expect((await get(getPass, { params: { id: "x" } })).status).toBe(404);
    expect((await get(getPass, { params: { id }, token: coordinator })).status).toBe(404);
    expect((await get(getPass, { params: { id }, token: null })).status).toBe(401);
  });
});

describe("the read-only lists", () => {
  it("give stations with their laser, authorities and what lies ahead", async () => {
    const { status, body } = await get<{ stations: StationBody[] }>(getStations);
    expect(status).toBe(200);
    const alder = body.stations.find((station) => station.id === sky.alder.id);
    expect(alder?.lasers[0]).toMatchObject({ name: "Survey head", meanPowerW: 200_000, active: true });
    expect(alder?.authorities.map((a) => a.name)).toEqual(["Tessel Clearing Desk"]);
    const ahead = body.stations.reduce((sum, station) => sum + station.passesAhead, 0);
    expect(ahead).toBe(sky.passIds.length);
    expect(alder?.nextPassAt).not.toBeNull();
  });

  it("give fragments with the age of their newest set, and one with its orbit and history", async () => {
    const { body } = await get<{ fragments: FragmentBody[] }>(getFragments);
    expect(body.fragments).toHaveLength(4);
    const [first] = body.fragments;
    expect(first).toMatchObject({ catalogNumber: 88_001, elementSetCount: 1, awaitsNewElements: false });
    const sheet = await get<FragmentSheetBody>(getFragment, { params: { id: first?.id ?? "" } });
    expect(sheet.status).toBe(200);
    expect(sheet.body.elementSets).toHaveLength(1);
    // Kepler's third law by hand: 13.9 revolutions a day, n = 1.01083e-3 rad/s, a = (µ/n²)^(1/3) = 7306.6 km.
    expect(Math.abs((sheet.body.orbit?.semiMajorAxisKm ?? 0) - 7306.6)).toBeLessThan(0.5);
    const unknown = "00000000-0000-4000-8000-000000000000";
    expect((await get(getFragment, { params: { id: unknown } })).status).toBe(404);
  });

  it("give protected objects by class with what is kept free", async () => {
    const { body } = await get<ProtectedListBody>(getProtected);
    expect(body.classes.map((c) => [c.class, c.count])).toEqual([
      ["crewed", 1],
      ["payload", 1],
      ["optical payload", 0],
      ["own", 0],
    ]);
    expect(body.objects.map((o) => [o.name, o.halfAngleDeg])).toEqual([
      ["Object 70001", 5],
      ["Object 70002", 1],
    ]);
  });

  it("give airspace with the stations that reach it, and authorities with what concerns them", async () => {
    const { body } = await get<{ volumes: AirspaceVolumeBody[] }>(getAirspace);
    expect(body.volumes.map((v) => v.name)).toEqual(["Alder range", "Brume east"]);
    for (const volume of body.volumes) expect(volume.stations.map((s) => s.name)).toEqual(["Alder Point"]);
    const authorities = (await get<{ authorities: AuthorityBody[] }>(getAuthorities)).body.authorities;
    const brume = authorities.find((a) => a.name === "Brume Air Unit");
    expect(brume).toMatchObject({ stations: [], openNotices: 0 });
    expect(brume?.volumes.map((v) => v.name)).toEqual(["Brume east"]);
  });

  it("are not for coordinators or strangers", async () => {
    for (const handler of [getStations, getFragments, getProtected, getAirspace, getAuthorities]) {
      expect((await get(handler, { token: coordinator })).status).toBe(403);
      expect((await get(handler, { token: null })).status).toBe(401);
    }
  });
});
