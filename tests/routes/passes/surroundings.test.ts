import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { GET as getPass } from "@/app/api/passes/[id]/route";
import { GET as getSky } from "@/app/api/passes/[id]/sky/route";
import { database } from "@/db/client";
import { elementSets, protectedObjects } from "@/db/schema/objects";
import type { ErrorBody } from "@/lib/contracts/common";
import type { PassSkyBody } from "@/lib/contracts/pass-surroundings";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { DEG } from "@/lib/physics/constants";
import { angleBetweenRad, type Vec3 } from "@/lib/physics/vector";
import { makeSky, type Sky } from "../../database/passes/sky";
import { ownDatabase } from "../../database/support";
import { only } from "../../database/world";
import { call, tokenOf } from "../calculations/callers";

ownDatabase();

let sky: Sky;
let planner = "";
let coordinator = "";
beforeAll(async () => {
  sky = await makeSky();
  await addFollower();
  planner = await tokenOf("planner");
  coordinator = await tokenOf("coordinator");
});

/** A payload 1° of its orbit behind the first fragment of the sky. */
async function addFollower(): Promise<void> {
  const followed = only(
    await database().select().from(elementSets).where(eq(elementSets.catalogNumber, 88_001)),
  );
  const values = { name: "Follower", catalogNumber: 70_003, class: "payload" };
  const object = only(await database().insert(protectedObjects).values(values).returning());
  const { id: _id, fragmentId: _fragmentId, meanAnomalyDeg, ...set } = followed;
  await database()
    .insert(elementSets)
    .values({
      ...set,
      catalogNumber: 70_003,
      protectedObjectId: object.id,
      meanAnomalyDeg: meanAnomalyDeg + 359,
    });
}

async function sheetOf(id: string): Promise<PassSheetBody> {
  const { status, body } = await call<PassSheetBody & ErrorBody>(getPass, {
    method: "GET",
    path: `/api/passes/${id}`,
    token: planner,
    params: { id },
  });
  expect(status).toBe(200);
  return body;
}

function direction(place: { latitudeDeg: number; longitudeDeg: number }): Vec3 {
  const [lat, lon] = [place.latitudeDeg * DEG, place.longitudeDeg * DEG];
  return { x: Math.cos(lat) * Math.cos(lon), y: Math.cos(lat) * Math.sin(lon), z: Math.sin(lat) };
}

describe("the ground track of a pass", () => {
  it("crosses the edge of the station's circle at rise and set", async () => {
    for (const id of sky.passIds.slice(0, 6)) {
      const { ground, stationId, riseAt, setAt, culminateAt } = await sheetOf(id);
      const own = ground?.stations.find((s) => s.id === stationId);
      if (!ground || !own) throw new Error("the sheet must have a ground track over its station");
      expect(ground.stations.map((s) => s.name).sort()).toEqual(["Alder Point", "Brine Flat"]);
      const apartDeg = (at: string): number => {
        const point = ground.points.find((p) => p.at === at);
        if (!point) throw new Error(`no point at ${at}`);
        return angleBetweenRad(direction(point), direction(own)) / DEG;
      };
      // The circle is drawn for the height at culmination on a round Earth; the fragment's height changes
      // by some 30 km in a pass, which moves the edge by up to 0.5°.
      expect(Math.abs(apartDeg(riseAt) - own.footprintDeg)).toBeLessThan(0.6);
      expect(Math.abs(apartDeg(setAt) - own.footprintDeg)).toBeLessThan(0.6);
      expect(apartDeg(culminateAt)).toBeLessThan(own.footprintDeg);
    }
  });

  it("covers half an orbit in order of time, with heights that the orbit has", async () => {
    const { ground } = await sheetOf(sky.passIds[0] ?? "");
    const times = ground?.points.map(({ at }) => Date.parse(at)) ?? [];
    expect(times).toEqual([...times].sort((a, b) => a - b));
    const periodMs = 86_400_000 / 13.9;
    expect((times.at(-1) ?? 0) - (times[0] ?? 0)).toBeGreaterThan(periodMs / 2 - 10);
    // 13.9 revolutions a day at e = 0.002: a semi-major axis of 7,306 km, give or take 15 km and the flattening.
    for (const { heightKm } of ground?.points ?? []) {
      expect(heightKm).toBeGreaterThan(7306 - 6378 - 50);
      expect(heightKm).toBeLessThan(7306 - 6357 + 50);
    }
  });
});

describe("GET /api/passes/:id/sky", () => {
  const skyOf = (id: string, token: string | null = planner) =>
    call<PassSkyBody & ErrorBody>(getSky, {
      method: "GET",
      path: `/api/passes/${id}/sky`,
      token,
      params: { id },
    });

  it("tells Sun, Moon and darkness at culmination, and the light on the fragment from rise to set", async () => {
    for (const id of sky.passIds.slice(0, 5)) {
      const { status, body } = await skyOf(id);
      expect(status).toBe(200);
      const sheet = await sheetOf(id);
      expect(body.at).toBe(sheet.culminateAt);
      // Limits of the names: 50', 6°, 12° and 18° under the horizon (Astronomical Almanac).
      const limits: Record<string, [number, number]> = {
        day: [-50 / 60, 90],
        "civil twilight": [-6, -50 / 60],
        "nautical twilight": [-12, -6],
        "astronomical twilight": [-18, -12],
        night: [-90, -18],
      };
      const [low, high] = limits[body.darkness] ?? [1, 0];
      expect(body.sun.elevationDeg).toBeGreaterThanOrEqual(low);
      expect(body.sun.elevationDeg).toBeLessThanOrEqual(high);
      expect(body.moon.litShare).toBeGreaterThan(0);
      expect(body.moon.litShare).toBeLessThan(1);
      expect([body.sunlight[0]?.from, body.sunlight.at(-1)?.to]).toEqual([sheet.riseAt, sheet.setAt]);
      const light = (at: string) => body.sunlight.find(({ from, to }) => from <= at && at < to)?.sunlight;
      for (const sample of sheet.samples) expect(sample.sunlight).toBe(light(sample.at));
    }
  });

  it("shows what the screening of the pass saw, with the angle that it kept", async () => {
    const seen = await Promise.all(sky.passIds.map(async (id) => (await skyOf(id)).body));
    const near = seen.flatMap((body) => body.near);
    expect(near.map(({ name }) => name)).toContain("Follower");
    const halfAngles = { crewed: 5, payload: 1 } as Record<string, number>;
    for (const object of near) {
      expect(object.minSeparationDeg).toBeLessThan(10);
      expect(object.halfAngleDeg).toBeCloseTo(halfAngles[object.class] ?? Number.NaN, 9);
      expect(object.samples.length).toBeGreaterThan(30);
    }
  });

  it("is for those who may read the pass", async () => {
    const [id = ""] = sky.passIds;
    expect((await skyOf(id, null)).status).toBe(401);
    expect((await skyOf(id, coordinator)).status).toBe(404);
    expect((await skyOf("7b1e9a70-5c0f-4f0e-9a83-0d5a6f1c2b3d")).status).toBe(404);
  });
});
