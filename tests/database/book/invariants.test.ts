import { eq } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { database, type Queryable } from "@/db/client";
import { databaseFault, isOverlap } from "@/db/errors";
import { confirmations, engagements } from "@/db/schema/engagements";
import { inTransaction } from "@/db/transaction";
import { STATES } from "@/lib/engagement/states";
import { TRANSITIONS } from "@/lib/engagement/transitions";
import { faultOf } from "../faults";
import { ownDatabase } from "../support";
import { addFragment, addPass, addPerson, addStation, HOUR, NOW, only } from "../world";

ownDatabase();

interface Place {
  readonly stationId: string;
  readonly laserSettingId: string;
  readonly fragmentId: string;
  readonly elementSetId: string;
}

let planner = "";
let operators: string[] = [];
let here: Place;
let elsewhere: Place;
let otherFragment: Place;

beforeAll(async () => {
  const db = database();
  planner = (await addPerson(db, "Plan Ner", "planner")).id;
  operators = [
    (await addPerson(db, "Op One", "operator")).id,
    (await addPerson(db, "Op Two", "operator")).id,
  ];
  const a = await addStation(db, "Alder Point", { slewS: 60, coolDownS: 120 });
  const b = await addStation(db, "Brackwater", { slewS: 60, coolDownS: 120 });
  const x = await addFragment(db, 88_001);
  const y = await addFragment(db, 88_002);
  here = placeOf(a, x);
  elsewhere = placeOf(b, x);
  otherFragment = placeOf(a, y);
});

function placeOf(
  station: { id: string; laserSettingId: string },
  fragment: { id: string; elementSetId: string },
): Place {
  return {
    stationId: station.id,
    laserSettingId: station.laserSettingId,
    fragmentId: fragment.id,
    elementSetId: fragment.elementSetId,
  };
}

const EFFECT = {
  aim: "decay",
  pulses: 600,
  energyJ: 1,
  deltaV: { radialMPerS: 0, transverseMPerS: -1, normalMPerS: 0 },
  semiMajorAxisBeforeKm: 7100,
  semiMajorAxisAfterKm: { p10: 7098, p50: 7099, p90: 7100 },
  perigeeBeforeKm: 700,
  perigeeAfterKm: { p10: 698, p50: 699, p90: 700 },
};

/** Inserts a dwell that begins so many seconds after `baseMs`, lasting a minute. */
async function insert(q: Queryable, place: Place, baseMs: number, afterS: number, lastsS = 60) {
  const fromMs = baseMs + afterS * 1000;
  const toMs = fromMs + lastsS * 1000;
  const pass = await addPass(q, place, fromMs - 100_000, toMs + 100_000);
  const row = {
    ...place,
    passId: pass.id,
    dwellFrom: new Date(fromMs),
    dwellTo: new Date(toMs),
    holdFrom: new Date(fromMs),
    holdUntil: new Date(toMs),
    state: "proposed",
    plannerId: planner,
    effect: EFFECT,
  };
  return only(await q.insert(engagements).values(row).returning());
}

describe("no two live engagements", () => {
  it("of one station share a second, with slew before and cool-down after", async () => {
    const base = NOW + HOUR;
    const first = await insert(database(), here, base, 0);
    expect(first.holdFrom).toEqual(new Date(base - 60_000));
    expect(first.holdUntil).toEqual(new Date(base + 180_000));
    // The next may begin when cool-down and its own slew are over: 60 + 120 + 60 s after the first began.
    expect(await faultOf(insert(database(), otherFragment, base, 239))).toEqual({
      code: "23P01",
      constraint: "engagements_station_free",
    });
    await expect(insert(database(), otherFragment, base, 240)).resolves.toBeTruthy();
  });

  it("lase one fragment at once from two stations, by the bare dwell", async () => {
    const base = NOW + 2 * HOUR;
    await insert(database(), here, base, 0);
    expect(await faultOf(insert(database(), elsewhere, base, 59))).toEqual({
      code: "23P01",
      constraint: "engagements_fragment_free",
    });
    await expect(insert(database(), elsewhere, base, 60)).resolves.toBeTruthy();
  });

  it("but an ended one frees its time", async () => {
    const base = NOW + 3 * HOUR;
    const first = await insert(database(), here, base, 0);
    await setState(database(), first.id, "scrubbed");
    await expect(insert(database(), here, base, 0)).resolves.toBeTruthy();
  });

  it("and the hold cannot be written smaller than slew and cool-down make it", async () => {
    const first = await insert(database(), here, NOW + 4 * HOUR, 0);
    const changed = only(
      await database()
        .update(engagements)
        .set({ holdFrom: first.dwellFrom, holdUntil: first.dwellTo })
        .where(eq(engagements.id, first.id))
        .returning(),
    );
    expect([changed.holdFrom, changed.holdUntil]).toEqual([first.holdFrom, first.holdUntil]);
  });

  it("of exactly one of two simultaneous transactions is taken, the other told of the overlap", async () => {
    const base = NOW + 5 * HOUR;
    const results = await Promise.allSettled(
      [0, 1].map(() => inTransaction((tx) => insert(tx, here, base, 0))),
    );
    expect(results.filter((result) => result.status === "fulfilled")).toHaveLength(1);
    const lost = results.find((result) => result.status === "rejected");
    expect(isOverlap(lost?.status === "rejected" ? lost.reason : null)).toBe(true);
  });
});

async function setState(q: Queryable, id: string, state: string): Promise<void> {
  await q.update(engagements).set({ state, endReason: "for the test" }).where(eq(engagements.id, id));
}

async function addNames(q: Queryable, engagementId: string, personIds: readonly string[]): Promise<void> {
  for (const personId of personIds) {
    await q.insert(confirmations).values({
      engagementId,
      personId,
      capacity: "operator",
      checklist: {
        airUnitCalledAt: "",
        spotterInPlace: true,
        interlockTestedAt: "",
        clockOffsetMs: 0,
        weather: "clear",
        crewedListCheckedAt: "",
      },
    });
  }
}

/** The ways that bring a fresh engagement into each state. */
const WAYS: Readonly<Record<string, readonly string[]>> = {
  proposed: [],
  cleared: ["cleared"],
  confirmed: ["cleared", "confirmed"],
  fired: ["cleared", "confirmed", "fired"],
  scrubbed: ["scrubbed"],
  lapsed: ["lapsed"],
};

/** Raised by the test below to roll its transaction back. */
class Undo extends Error {}

async function tryTransition(from: string, to: string): Promise<"taken" | "refused"> {
  const work = database().transaction(async (tx) => {
    const row = await insert(tx, here, NOW + 200 * HOUR, 0);
    await addNames(tx, row.id, operators);
    for (const state of WAYS[from] ?? []) await setState(tx, row.id, state);
    await setState(tx, row.id, to);
    throw new Undo();
  });
  const error: unknown = await work.catch((thrown: unknown) => thrown);
  if (error instanceof Undo) return "taken";
  if (databaseFault(error)?.constraint === "engagements_transition") return "refused";
  throw error;
}

describe("the database's own guard of transitions", () => {
  const legal = new Set(TRANSITIONS.map((row) => `${row.state} to ${row.next}`));
  for (const from of STATES) {
    for (const to of STATES) {
      if (from === to) continue;
      // The table has no way from confirmed to lapsed; the database leaves that one open for a standstill.
      if (from === "confirmed" && to === "lapsed") continue;
      const expected = legal.has(`${from} to ${to}`) ? "taken" : "refused";
      it(`${from} to ${to}: ${expected}`, async () => {
        expect(await tryTransition(from, to)).toBe(expected);
      });
    }
  }

  it("lets nothing start as anything but proposed", async () => {
    const pass = await addPass(database(), here, NOW, NOW + HOUR);
    const row = {
      ...here,
      passId: pass.id,
      dwellFrom: new Date(NOW + 300 * HOUR),
      dwellTo: new Date(NOW + 300 * HOUR + 60_000),
      holdFrom: new Date(NOW),
      holdUntil: new Date(NOW),
      state: "confirmed",
      plannerId: planner,
      effect: EFFECT,
    };
    const fault = await faultOf(database().insert(engagements).values(row).execute());
    expect(fault?.constraint).toBe("engagements_transition");
  });

  it("lets nothing of an ended engagement change", async () => {
    const row = await insert(database(), here, NOW + 301 * HOUR, 0);
    await setState(database(), row.id, "scrubbed");
    const change = database().update(engagements).set({ version: 9 }).where(eq(engagements.id, row.id));
    expect((await faultOf(change.execute()))?.constraint).toBe("engagements_transition");
  });

  it("confirms with two different names in force only", async () => {
    const row = await insert(database(), here, NOW + 302 * HOUR, 0);
    await setState(database(), row.id, "cleared");
    const fault = () => faultOf(setState(database(), row.id, "confirmed"));
    expect((await fault())?.constraint).toBe("engagements_two_people");
    await addNames(database(), row.id, operators.slice(0, 1));
    expect((await fault())?.constraint).toBe("engagements_two_people");
    expect((await faultOf(addNames(database(), row.id, operators.slice(0, 1))))?.constraint).toBe(
      "confirmations_once",
    );
    await addNames(database(), row.id, operators.slice(1));
    expect(await fault()).toBeNull();
  });
});
