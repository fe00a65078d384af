import { beforeAll, describe, expect, it } from "vitest";
import { GET as getPass } from "@/app/api/passes/[id]/route";
import type { ErrorBody } from "@/lib/contracts/common";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { DEG } from "@/lib/physics/constants";
import { angleBetweenRad, type Vec3 } from "@/lib/physics/vector";
import { makeSky, type Sky } from "../../database/passes/sky";
import { ownDatabase } from "../../database/support";
import { call, tokenOf } from "../calculations/callers";

ownDatabase();

let sky: Sky;
let planner = "";
beforeAll(async () => {
  sky = await makeSky();
  planner = await tokenOf("planner");
});

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
