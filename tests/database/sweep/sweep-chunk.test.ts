import { eq, sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { engagements } from "@/db/schema/engagements";
import { elementSets, fragments } from "@/db/schema/objects";
import { beamCrossings, passes, sweepChunks, sweeps } from "@/db/schema/passes";
import { laserSettings, stations } from "@/db/schema/stations";
import { inTransaction } from "@/db/transaction";
import type { Actor } from "@/lib/engagement/roles";
import { DEG } from "@/lib/physics/constants";
import { lookAngles, makeSiteFrame, temeToEcef } from "@/lib/physics/frames/earth";
import { makeOrbit, type Orbit } from "@/lib/physics/orbit/propagate";
import { cancelSweep } from "@/lib/services/cancel-sweep";
import { elementsOf, siteOf } from "@/lib/services/domain-rows";
import { keepWeekFilled, startSweep } from "@/lib/services/start-sweep";
import { sweepChunk } from "@/lib/services/sweep-chunk";
import { readSweep } from "@/lib/services/sweep-progress";
import { ownDatabase } from "../support";
import { addPerson, addStation, elementSetRow, HOUR, only } from "../world";
import { addFragments, addGuarded, epoch, passSnapshot } from "./ground";

ownDatabase();

/** The database's own clock stamps imports and screenings, so the sweep happens now. */
const now = Math.floor(Date.now() / 1000) * 1000;
const DAY = 24 * HOUR;

let planner: Actor & { id: string };
let fragmentIds: string[] = [];
let shadow = "";
let blind = "";
let stale = "";

beforeAll(async () => {
  planner = await addPerson(database(), "Plan Ner", "planner");
  await addStation(database(), "Alder Point");
  await addStation(database(), "Brackwater", { latitudeDeg: -31, longitudeDeg: 149, minElevationDeg: 30 });
  fragmentIds = await addFragments(2, now);
  const fresh = epoch(now - 3 * HOUR);
  await addGuarded(99_001, "crewed", { ...fresh, inclinationDeg: 51.6, meanMotionRevPerDay: 15.5 });
  // On the first fragment's own orbit, one degree of mean anomaly ahead: never far from its beam.
  shadow = await addGuarded(99_002, "payload", {
    ...epoch(now - 6 * HOUR),
    meanAnomalyDeg: 0.3,
    raanDeg: 120,
  });
  blind = await addGuarded(99_003, "payload", null);
  stale = await addGuarded(99_004, "optical payload", epoch(now - 20 * DAY));
});

async function sweep(ids: string[] | "all", nowMs = now): Promise<string> {
  const { sweepId } = await inTransaction((tx) =>
    startSweep(tx, { fragmentIds: ids, reason: "a test", requestedBy: planner.id, nowMs }),
  );
  return sweepId;
}

async function chunksOf(sweepId: string): Promise<string[]> {
  const rows = await database().select().from(sweepChunks).where(eq(sweepChunks.sweepId, sweepId));
  return rows.map(({ id }) => id);
}

async function workOff(sweepId: string, nowMs = now): Promise<void> {
  for (const id of await chunksOf(sweepId)) await sweepChunk(id, nowMs);
}

async function passCounts(sweepId: string): Promise<Map<string, number | null>> {
  const rows = await database().select().from(sweepChunks).where(eq(sweepChunks.sweepId, sweepId));
  return new Map(rows.flatMap(({ fragmentIds: ids, passCount }) => ids.map((id) => [id, passCount])));
}

async function passesOf(fragmentId: string) {
  return database().select().from(passes).where(eq(passes.fragmentId, fragmentId)).orderBy(passes.riseAt);
}

async function jobs(task: string): Promise<number> {
  const { rows } = await database().execute<{ n: number }>(
    sql`select count(*)::int as n from graphile_worker.jobs where task_identifier = ${task}`,
  );
  return rows[0]?.n ?? -1;
}

/** Elevation in degrees by SGP4 alone, without any search. */
function elevationDeg(orbit: Orbit, site: Parameters<typeof siteOf>[0], at: Date): number {
  const atMs = at.getTime();
  const state = orbit.stateAt(atMs);
  if (!state.ok) throw new Error(state.reason);
  return lookAngles(makeSiteFrame(siteOf(site)), temeToEcef(state.state, atMs)).elevationRad / DEG;
}

describe("a sweep", () => {
  it("is cut into chunks, each a job of the same transaction, and runs until the last is done", async () => {
    const before = await jobs("sweep-chunk");
    const sweepId = await sweep("all");
    const chunkIds = await chunksOf(sweepId);
    expect(chunkIds).toHaveLength(2);
    expect(await jobs("sweep-chunk")).toBe(before + 2);
    const [first = "", last = ""] = chunkIds;
    await sweepChunk(first, now);
    const half = await readSweep(planner, sweepId);
    expect(half).toMatchObject({ state: "running", finishedAt: null, fragments: { total: 2, done: 1 } });
    await sweepChunk(last, now);
    const done = await readSweep(planner, sweepId);
    expect(done).toMatchObject({ state: "done", fragments: { total: 2, done: 2, failed: 0 }, failures: [] });
    expect(done.finishedAt).not.toBeNull();
    expect(done.passCount).toBeGreaterThan(20);
    const stored = await database().select().from(passes);
    expect(stored).toHaveLength(done.passCount);
  });

  it("leaves nothing in the queue when its transaction rolls back", async () => {
    const before = await jobs("sweep-chunk");
    const broken = inTransaction(async (tx) => {
      await startSweep(tx, { fragmentIds: "all", reason: "x", requestedBy: null, nowMs: now });
      throw new Error("changed our mind");
    });
    await expect(broken).rejects.toThrow("changed our mind");
    expect(await jobs("sweep-chunk")).toBe(before);
  });

  it("stores passes that rise, culminate and set where the station's floor says", async () => {
    const [set] = await database()
      .select()
      .from(elementSets)
      .where(eq(elementSets.fragmentId, fragmentIds[0] ?? ""));
    const made = makeOrbit(elementsOf(only(set ? [set] : [])));
    if (!made.ok) throw new Error(made.reason);
    const sites = await database().select().from(stations);
    expect(sites).toHaveLength(2);
    for (const pass of await passesOf(fragmentIds[0] ?? "")) {
      const station = only(sites.filter(({ id }) => id === pass.stationId));
      // A millisecond is at most 0.001° here.
      expect(elevationDeg(made.orbit, station, pass.riseAt)).toBeCloseTo(station.minElevationDeg, 2);
      expect(elevationDeg(made.orbit, station, pass.setAt)).toBeCloseTo(station.minElevationDeg, 2);
      expect(elevationDeg(made.orbit, station, pass.culminateAt)).toBeCloseTo(pass.maxElevationDeg, 2);
      expect(pass.plan).toMatchObject({ elementSetId: pass.elementSetId, refusal: null });
    }
  });
});

describe("the screening of a sweep", () => {
  it("closes the beam where an object on the same orbit flies ahead", async () => {
    const closed = await database()
      .select()
      .from(beamCrossings)
      .innerJoin(passes, eq(passes.id, beamCrossings.passId))
      .where(eq(beamCrossings.protectedObjectId, shadow));
    const own = closed.filter((row) => row.passes.fragmentId === fragmentIds[0]);
    expect(own.length).toBeGreaterThan(0);
    for (const { beam_crossings: crossing } of own) {
      expect(crossing.halfAngleDeg).toBe(1);
      expect(crossing.addedDeg).toBeGreaterThan(0);
      expect(crossing.minSeparationDeg).toBeLessThanOrEqual(crossing.halfAngleDeg + crossing.addedDeg);
      expect(crossing.timingGuardS).toBeGreaterThan(0);
    }
  });

  it("names objects without a usable element set as gaps, in every pass", async () => {
    for (const pass of await database().select().from(passes)) {
      expect(pass.screeningGaps).toEqual([blind, stale].sort());
      expect(pass.screenedAt).not.toBeNull();
    }
  });
});

describe("a chunk", () => {
  it("gives the same rows when it is done twice, under the same identities", async () => {
    const sweepId = await sweep("all");
    await workOff(sweepId);
    const [rows, ids] = [await passSnapshot(0), await passIds()];
    expect(rows.length).toBeGreaterThan(20);
    await database().update(sweepChunks).set({ state: "waiting" }).where(eq(sweepChunks.sweepId, sweepId));
    await database().update(sweeps).set({ state: "running" }).where(eq(sweeps.id, sweepId));
    await workOff(sweepId);
    expect(await passSnapshot(0)).toEqual(rows);
    expect(await passIds()).toEqual(ids);
    expect((await readSweep(planner, sweepId)).state).toBe("done");
  });

  it("gives the same rows when two workers do it at once", async () => {
    const rows = await passSnapshot(0);
    const sweepId = await sweep("all");
    const [first = ""] = await chunksOf(sweepId);
    await Promise.all([sweepChunk(first, now), sweepChunk(first, now)]);
    expect(await passSnapshot(0)).toEqual(rows);
  });

  it("does nothing once its sweep is cancelled", async () => {
    const sweepId = await sweep("all");
    await cancelSweep(planner, sweepId, now);
    await workOff(sweepId);
    const after = await readSweep(planner, sweepId);
    expect(after).toMatchObject({ state: "cancelled", fragments: { total: 2, done: 0 } });
    await expect(cancelSweep(planner, sweepId, now)).rejects.toMatchObject({ status: 409 });
  });

  it("leaves a fragment to a later sweep that takes it on too, unless that one is cancelled", async () => {
    const earlier = await sweep("all");
    const later = await sweep(fragmentIds.slice(0, 1));
    await workOff(earlier);
    const counts = await passCounts(earlier);
    expect(counts.get(fragmentIds[0] ?? "")).toBe(0);
    expect(counts.get(fragmentIds[1] ?? "")).toBeGreaterThan(10);
    await workOff(later);
    expect((await passCounts(later)).get(fragmentIds[0] ?? "")).toBeGreaterThan(10);
    const third = await sweep("all");
    await cancelSweep(planner, await sweep("all"), now);
    await workOff(third);
    expect((await passCounts(third)).get(fragmentIds[0] ?? "")).toBeGreaterThan(10);
  });

  it("says in one sentence what it can't work out", async () => {
    const values = { catalogNumber: 88_100, massKg: 1, areaM2: 0.1, material: "steel", shape: "sphere" };
    const bare = only(
      await database()
        .insert(fragments)
        .values({ ...values, name: "Bare", bodySource: "invented for a test" })
        .returning(),
    );
    const low = only(
      await database()
        .insert(fragments)
        .values({ ...values, name: "Low", catalogNumber: 88_101, bodySource: "invented for a test" })
        .returning(),
    );
    const falling = {
      meanMotionRevPerDay: 16.35,
      eccentricity: 0.0005,
      bstar: 0.05,
      ...epoch(now - 6 * HOUR),
    };
    await database()
      .insert(elementSets)
      .values(elementSetRow(88_101, { fragmentId: low.id, ...falling }));
    const sweepId = await sweep([bare.id, low.id]);
    await workOff(sweepId);
    const { failures, state } = await readSweep(planner, sweepId);
    expect(state).toBe("done");
    expect(failures).toEqual([
      { fragmentId: bare.id, fragmentName: "Bare", message: "The fragment has no element set." },
      {
        fragmentId: low.id,
        fragmentName: "Low",
        message: expect.stringMatching(/^Propagation fails at .*\.$/),
      },
    ]);
  });

  it("says that a station without an active laser setting was left out", async () => {
    const lasers = await database().select().from(laserSettings);
    const off = only(lasers.slice(0, 1));
    await database().update(laserSettings).set({ active: false }).where(eq(laserSettings.id, off.id));
    const sweepId = await sweep(fragmentIds);
    await workOff(sweepId);
    const { failures } = await readSweep(planner, sweepId);
    expect(failures.map(({ message }) => message)).toEqual([
      expect.stringContaining("has no active laser setting"),
      expect.stringContaining("has no active laser setting"),
    ]);
    await database().update(laserSettings).set({ active: true }).where(eq(laserSettings.id, off.id));
    await workOff(await sweep(fragmentIds));
  });
});

async function passIds(): Promise<string[]> {
  const rows = await database().select({ id: passes.id }).from(passes).orderBy(passes.id);
  return rows.map(({ id }) => id);
}

describe("a new element set", () => {
  it("moves passes under their identities when the object comes 20 s later", async () => {
    const fragmentId = fragmentIds[0] ?? "";
    const before = await passesOf(fragmentId);
    // 20 s at 14.4 revolutions a day are 1.2° of mean anomaly.
    await addSet(fragmentId, { meanAnomalyDeg: 358.8, ...epoch(now - 6 * HOUR + 1) });
    await workOff(await sweep([fragmentId]));
    const after = new Map((await passesOf(fragmentId)).map((pass) => [pass.id, pass]));
    const kept = before.flatMap((pass) => {
      const moved = after.get(pass.id);
      return moved ? [{ pass, moved }] : [];
    });
    expect(kept.length).toBeGreaterThan(before.length - 3);
    for (const { pass, moved } of kept) {
      const laterS = (moved.culminateAt.getTime() - pass.culminateAt.getTime()) / 1000;
      expect(laterS).toBeGreaterThan(15);
      expect(laterS).toBeLessThan(25);
      expect(moved.elementSetId).not.toBe(pass.elementSetId);
    }
  });

  it("takes out passes it no longer shows, but marks the one that is booked and has it judged again", async () => {
    const fragmentId = fragmentIds[0] ?? "";
    const booked = only((await passesOf(fragmentId)).slice(3, 4));
    await book(booked);
    const before = await jobs("rescreen-engagement");
    // An orbit over the equator at this height never rises over 46° north or 31° south.
    await addSet(fragmentId, { inclinationDeg: 0.5, ...epoch(now - 6 * HOUR + 2) });
    await workOff(await sweep([fragmentId]));
    const coming = (await passesOf(fragmentId)).filter(({ riseAt }) => riseAt.getTime() > now);
    expect(coming.map(({ id }) => id)).toEqual([booked.id]);
    expect(coming[0]?.vanishedAt).toEqual(new Date(now));
    expect(await jobs("rescreen-engagement")).toBe(before + 1);
  });

  it("brings a pass back that had vanished, under its identity", async () => {
    const fragmentId = fragmentIds[0] ?? "";
    const [gone] = (await passesOf(fragmentId)).filter(({ vanishedAt }) => vanishedAt !== null);
    await addSet(fragmentId, { meanAnomalyDeg: 358.8, ...epoch(now - 6 * HOUR + 3) });
    await workOff(await sweep([fragmentId]));
    const back = (await passesOf(fragmentId)).filter(({ id }) => id === gone?.id);
    expect(back.map(({ vanishedAt }) => vanishedAt)).toEqual([null]);
    expect((await passesOf(fragmentId)).length).toBeGreaterThan(20);
  });
});

async function addSet(fragmentId: string, set: Partial<typeof elementSets.$inferInsert>): Promise<void> {
  await database()
    .insert(elementSets)
    .values(elementSetRow(88_001, { fragmentId, raanDeg: 120, ...set }));
}

async function book(pass: typeof passes.$inferSelect): Promise<string> {
  const dwellFrom = new Date(Math.ceil(pass.riseAt.getTime() / 1000) * 1000);
  const band = { p10: 1, p50: 1, p90: 1 };
  const row = only(
    await database()
      .insert(engagements)
      .values({
        passId: pass.id,
        fragmentId: pass.fragmentId,
        stationId: pass.stationId,
        laserSettingId: pass.laserSettingId,
        elementSetId: pass.elementSetId,
        dwellFrom,
        dwellTo: new Date(dwellFrom.getTime() + 20_000),
        holdFrom: dwellFrom,
        holdUntil: dwellFrom,
        state: "proposed",
        plannerId: planner.id,
        effect: {
          aim: "decay",
          pulses: 200,
          energyJ: 1,
          deltaV: { radialMPerS: 0, transverseMPerS: -1, normalMPerS: 0 },
          semiMajorAxisBeforeKm: 1,
          semiMajorAxisAfterKm: band,
          perigeeBeforeKm: 1,
          perigeeAfterKm: band,
        },
      })
      .returning(),
  );
  return row.id;
}

describe("the week", () => {
  it("is filled again once its end lags by six hours, for the fragments that lag", async () => {
    await workOff(await sweep("all"));
    expect(await keepWeekFilled(now + 5 * HOUR)).toBeNull();
    await workOff(await sweep([fragmentIds[1] ?? ""], now + 4 * HOUR), now + 4 * HOUR);
    const filled = await keepWeekFilled(now + 7 * HOUR);
    const swept = await database()
      .select()
      .from(sweepChunks)
      .where(eq(sweepChunks.sweepId, filled?.sweepId ?? ""));
    const ids = swept.flatMap((chunk) => chunk.fragmentIds);
    expect(ids).toContain(fragmentIds[0]);
    expect(ids).not.toContain(fragmentIds[1]);
    expect(await keepWeekFilled(now + 7 * HOUR)).toBeNull();
  });

  it("gives up a chunk whose job has used up its attempts, with the last error", async () => {
    const sweepId = await sweep([fragmentIds[0] ?? ""]);
    const [chunkId = ""] = await chunksOf(sweepId);
    await database().execute(sql`
      update graphile_worker._private_jobs set attempts = max_attempts, last_error = 'out of memory'
      where key = ${`sweep-chunk:${chunkId}`}`);
    await keepWeekFilled(now);
    const given = await readSweep(planner, sweepId);
    expect(given).toMatchObject({ state: "done", fragments: { total: 1, done: 0, failed: 1 } });
    expect(given.failures[0]?.message).toMatch(/^The calculation broke off 6 times: out of memory/);
  });
});
