import { readFileSync } from "node:fs";
import { beforeAll, describe, expect, it } from "vitest";
import { POST } from "@/app/api/beam-screen/route";
import type { BeamScreenBody } from "@/lib/contracts/calculations";
import type { ErrorBody } from "@/lib/contracts/common";
import { DEG } from "@/lib/physics/constants";
import { makeSiteFrame, siteStateTeme } from "@/lib/physics/frames/earth";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { angleBetweenRad, subtract, type Vec3 } from "@/lib/physics/vector";
import { ownDatabase } from "../../database/support";
import { elementsFromLines } from "../../fixtures/read-tle";
import { call, tokenOf } from "./callers";

ownDatabase();

/** Real sets of October 2021 as published by CelesTrak; see the README beside the file. */
const lines = readFileSync("../shared/reference/published-debris-2021.tle", "utf8").split(/\r?\n/);
const setOf = (n: number) => ({ line1: lines[3 * n + 1] ?? "", line2: lines[3 * n + 2] ?? "" });
const TARGET = 0;
const protectedSets = Array.from({ length: 150 }, (_, n) => setOf(n + 1));
const station = { latitudeDeg: 46.5, longitudeDeg: 8.2, altitudeM: 1400 };
const span = { from: "2021-10-03T00:00:00.000Z", to: "2021-10-03T01:00:00.000Z" };
const HALF_ANGLE_DEG = 4;

let planner = "";
beforeAll(async () => {
  planner = await tokenOf("planner");
});

function screen(body: object, token: string | null = planner) {
  const question = {
    station,
    target: setOf(TARGET),
    protected: protectedSets,
    ...span,
    halfAngleDeg: HALF_ANGLE_DEG,
  };
  return call<BeamScreenBody & ErrorBody>(POST, { body: { ...question, ...body }, token });
}

function orbitOf({ line1, line2 }: { line1: string; line2: string }): Orbit {
  const made = makeOrbit(elementsFromLines(line1, line2));
  if (!made.ok) throw new Error(made.reason);
  return made.orbit;
}

const frame = makeSiteFrame(station);

/** The way from the station to an object, km, by SGP4 alone. */
function lineTo(orbit: Orbit, atMs: number): Vec3 {
  const state = orbit.stateAt(atMs);
  if (!state.ok) throw new Error(state.reason);
  return subtract(state.state.rKm, siteStateTeme(frame, atMs).rKm);
}

/** Separation of two objects as seen from the station, degrees, straight from the definition. */
function separationDeg(target: Orbit, other: Orbit, atMs: number): number {
  return angleBetweenRad(lineTo(target, atMs), lineTo(other, atMs)) / DEG;
}

describe("POST /api/beam-screen", () => {
  it("gives what a second-by-second look at every object gives", async () => {
    const { status, body } = await screen({});
    expect(status).toBe(200);
    expect(body.refused).toEqual([]);
    const [fromMs, toMs] = [Date.parse(span.from), Date.parse(span.to)];
    const target = orbitOf(setOf(TARGET));
    const seconds = Array.from({ length: (toMs - fromMs) / 1000 }, (_, n) => fromMs + 1000 * n);
    const targetLines = seconds.map((atMs) => lineTo(target, atMs));
    const wrong: string[] = [];
    let inside = 0;
    for (const other of protectedSets.map(orbitOf)) {
      const own = body.closures.filter((c) => c.catalogNumber === other.elements.catalogNumber);
      for (const [n, atMs] of seconds.entries()) {
        const apartDeg = angleBetweenRad(targetLines[n] as Vec3, lineTo(other, atMs)) / DEG;
        const closed = own.some(({ from, to }) => Date.parse(from) <= atMs && atMs < Date.parse(to));
        if (apartDeg < HALF_ANGLE_DEG) inside += 1;
        // Within 0.1 s of an edge either answer is right; nothing turns faster than some degrees a second.
        const isClear = Math.abs(apartDeg - HALF_ANGLE_DEG) > 0.5;
        if (isClear && closed !== apartDeg < HALF_ANGLE_DEG)
          wrong.push(`${other.elements.catalogNumber} ${atMs}`);
      }
      for (const { from, to, minSeparationDeg } of own) {
        if (Date.parse(from) > fromMs) {
          expect(separationDeg(target, other, Date.parse(from))).toBeCloseTo(HALF_ANGLE_DEG, 1);
        }
        if (Date.parse(to) < toMs) {
          expect(separationDeg(target, other, Date.parse(to))).toBeCloseTo(HALF_ANGLE_DEG, 1);
        }
        expect(minSeparationDeg).toBeLessThanOrEqual(HALF_ANGLE_DEG + 1e-6);
      }
    }
    expect(wrong).toEqual([]);
    expect(inside).toBeGreaterThan(50);
    expect(body.closures.length).toBeGreaterThan(5);
  });

  it("names bad protected sets by their index, and a bad target as a refusal", async () => {
    const bad = { ...setOf(1), line1: `${setOf(1).line1.slice(0, 68)}x` };
    const mixed = await screen({ protected: [setOf(2), bad, setOf(3)] });
    expect(mixed.status).toBe(200);
    expect(mixed.body.refused.map(({ index }) => index)).toEqual([1]);
    const lost = await screen({ target: bad });
    expect(lost.status).toBe(422);
    expect(lost.body.error.details[0]?.path).toBe("target");
  });

  it("ignores an elevation floor", async () => {
    const few = protectedSets.slice(0, 40);
    const without = await screen({ protected: few });
    const withFloor = await screen({ protected: few, station: { ...station, minElevationDeg: 60 } });
    expect(withFloor.body).toEqual(without.body);
  });

  it("is for planners, operators and administrators, and takes only so much", async () => {
    expect((await screen({}, null)).status).toBe(401);
    expect((await screen({}, await tokenOf("coordinator"))).status).toBe(403);
    expect((await screen({ halfAngleDeg: "wide" })).status).toBe(400);
    expect((await screen({ to: span.from })).status).toBe(422);
    const tooMuch = await screen({
      protected: Array.from({ length: 10_000 }, () => setOf(1)),
      to: "2021-10-05T00:00:00.000Z",
    });
    expect(tooMuch.status).toBe(422);
    expect(tooMuch.body.error.details[0]?.path).toBe("protected");
  });
});
