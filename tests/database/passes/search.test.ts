import { eq, sql } from "drizzle-orm";
import { beforeAll, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import { elementSets, protectedObjects } from "@/db/schema/objects";
import { passes } from "@/db/schema/passes";
import { stations } from "@/db/schema/stations";
import type { PassBody } from "@/lib/contracts/passes";
import { Refusal } from "@/lib/engagement/refusal";
import { bookEngagement } from "@/lib/services/book-engagement";
import { judgeDwell } from "@/lib/services/judge-dwell";
import { passSheet } from "@/lib/services/pass-sheet";
import { replanPasses } from "@/lib/services/replan-passes";
import { searchPasses } from "@/lib/services/search-passes";
import { ownDatabase } from "../support";
import { HOUR, NOW } from "../world";
import { cross, makeSky, type Sky } from "./sky";

ownDatabase();

let sky: Sky;
beforeAll(async () => {
  sky = await makeSky();
});

/** The passes of two days, as the planner reads them. */
async function search(nowMs = NOW): Promise<PassBody[]> {
  return (await searchPasses(sky.planner, {}, nowMs)).passes;
}

async function judge(passId: string, span: { from: string; to: string }, nowMs = NOW) {
  const [fromMs, toMs] = [Date.parse(span.from), Date.parse(span.to)];
  return await judgeDwell(database(), { passId, fromMs, toMs, nowMs, engagementId: null });
}

function offeredOf(found: readonly PassBody[]): (PassBody & { dwell: NonNullable<PassBody["dwell"]> })[] {
  return found.filter((pass): pass is PassBody & { dwell: NonNullable<PassBody["dwell"]> } => !!pass.dwell);
}

describe("searching passes", () => {
  it("gives every pass of the span by rise, with a strip, and a dwell or the reason why there is none", async () => {
    const found = await search();
    expect(found.length).toBe(sky.passIds.length);
    expect(new Set(found.map((pass) => pass.id))).toEqual(new Set(sky.passIds));
    const rises = found.map((pass) => pass.riseAt);
    expect(rises).toEqual([...rises].sort());
    for (const pass of found) {
      expect(pass.strip.elevationDeg).toHaveLength(32);
      expect(pass.strip.worthPerS).toHaveLength(32);
      expect(pass.dwell === null).toBe(pass.noDwellReason !== null);
    }
    expect(offeredOf(found).length).toBeGreaterThan(5);
    expect(found.filter((pass) => !pass.dwell).length).toBeGreaterThan(0);
  });

  it("offers only what the judge allows, now and some minutes later", async () => {
    const offered = offeredOf(await search());
    for (const pass of offered) {
      for (const nowMs of [NOW, NOW + 4 * 60_000]) {
        const judgement = await judge(pass.id, pass.dwell, nowMs);
        expect(judgement.closed).toEqual([]);
        expect(judgement.limits).toEqual([]);
        expect(judgement.effect).not.toBeNull();
      }
    }
  });

  it("says of an offered dwell what the judge works out for it", async () => {
    const [pass] = offeredOf(await search());
    if (!pass) throw new Error("nothing is offered");
    const { effect } = await judge(pass.id, pass.dwell);
    const dropM = ((effect?.semiMajorAxisBeforeKm ?? 0) - (effect?.semiMajorAxisAfterKm.p50 ?? 0)) * 1000;
    // The plan's pulses are spread on a track of the whole pass, the judge's on one of the dwell.
    expect(pass.dwell.semiMajorAxisDropM / dropM).toBeCloseTo(1, 2);
    const [least, most] = pass.dwell.semiMajorAxisDropBandM;
    expect(least).toBeLessThan(pass.dwell.semiMajorAxisDropM);
    expect(most).toBeGreaterThan(pass.dwell.semiMajorAxisDropM);
  });

  it("measures the beam against the airspace and names its authority where it may be lifted", async () => {
    const through = (name: string, verdict: string) => (pass: PassBody) =>
      pass.closures.some((c) => c.rule === "airspace" && c.label === name && c.verdict === verdict);
    const found = await search();
    const crossing = found.find(through("Brume east", "pending"));
    expect(crossing).toBeDefined();
    expect(found.some(through("Alder range", "closed"))).toBe(true);
    for (const pass of found.filter((p) => p.stationId === sky.brine.id)) {
      expect(pass.closures.some((c) => c.rule === "airspace")).toBe(false);
    }
    const closure = crossing?.closures.find((c) => c.label === "Brume east");
    if (!crossing || !closure) throw new Error("no pass runs through the volume");
    const inside = await judge(crossing.id, closure);
    expect(inside.concerned.map((c) => c.name)).toContain("Brume Air Unit");
    const before = { from: crossing.riseAt, to: closure.from };
    if (before.from < before.to) {
      expect((await judge(crossing.id, before)).concerned.map((c) => c.name)).not.toContain("Brume Air Unit");
    }
  });

  it("filters by station, fragment and span, and refuses a query it can't read", async () => {
    const all = await search();
    const atBrine = (await searchPasses(sky.planner, { station: sky.brine.id }, NOW)).passes;
    expect(atBrine.map((p) => p.id)).toEqual(
      all.filter((p) => p.stationId === sky.brine.id).map((p) => p.id),
    );
    const [first] = all;
    const ofOne = (await searchPasses(sky.planner, { fragment: first?.fragmentId }, NOW)).passes;
    expect(ofOne.map((p) => p.id)).toEqual(
      all.filter((p) => p.fragmentId === first?.fragmentId).map((p) => p.id),
    );
    const span = { from: new Date(NOW + 5 * HOUR).toISOString(), to: new Date(NOW + 9 * HOUR).toISOString() };
    const inSpan = (await searchPasses(sky.planner, span, NOW)).passes;
    expect(inSpan.map((p) => p.id)).toEqual(
      all.filter((p) => p.riseAt < span.to && p.setAt > span.from).map((p) => p.id),
    );
    for (const query of [
      { station: "x" },
      { from: "yesterday" },
      { limit: "5" },
      { from: span.to, to: span.from },
    ]) {
      const refusal = await searchPasses(sky.planner, query, NOW).catch((error: unknown) => error);
      expect(refusal).toBeInstanceOf(Refusal);
      expect(refusal).toMatchObject({ status: 400 });
    }
  });

  it("closes what is too near to ask, and what is over", async () => {
    const offered = offeredOf(await search()).filter((pass) => pass.stationId === sky.alder.id);
    const [pass] = offered;
    if (!pass) throw new Error("nothing is offered at Alder Point");
    const lateMs = Date.parse(pass.dwell.from) - 29 * 60_000;
    const late = await judge(pass.id, pass.dwell, lateMs);
    expect(late.closed.map((c) => c.rule)).toEqual(["authority answers"]);
    const again = (await search(lateMs)).find((p) => p.id === pass.id);
    expect(again?.dwell?.from).not.toBe(pass.dwell.from);
    const over = await judge(pass.id, pass.dwell, Date.parse(pass.dwell.to));
    expect(over.closed.map((c) => c.rule)).toContain("time passed");
  });
});

describe("the facts behind a pass", () => {
  it("move the offered dwell out of the way of a protected object, without a new plan", async () => {
    const pass = offeredOf(await search()).find((p) => p.dwell && p.stationId === sky.brine.id);
    if (!pass) throw new Error("nothing is offered at Brine Flat");
    const [from, to] = [
      new Date(Date.parse(pass.dwell.from) + 5000),
      new Date(Date.parse(pass.dwell.from) + 15_000),
    ];
    await cross(pass.id, sky.payloadId, from, to);
    expect((await judge(pass.id, pass.dwell)).closed.map((c) => c.label)).toEqual([
      "payload Object 70002, 0.8°",
    ]);
    const after = (await search()).find((p) => p.id === pass.id);
    const dwell = after?.dwell;
    if (dwell) {
      expect(
        Date.parse(dwell.to) <= from.getTime() - 2000 || Date.parse(dwell.from) >= to.getTime() + 2000,
      ).toBe(true);
      expect((await judge(pass.id, dwell)).closed).toEqual([]);
      expect((await judge(pass.id, dwell)).limits).toEqual([]);
    } else {
      expect(after?.noDwellReason).toBeTruthy();
    }
    const sheet = await passSheet(sky.planner, pass.id, NOW);
    expect(sheet.crossings.map((c) => c.name)).toEqual(["Object 70002"]);
  });

  it("read not checked once the protected catalogue changed after the screening", async () => {
    const [pass] = offeredOf(await search());
    if (!pass) throw new Error("nothing is offered");
    const db = database();
    await db
      .update(elementSets)
      .set({ importedAt: new Date(NOW + 1000) })
      .where(eq(elementSets.protectedObjectId, sky.payloadId));
    const judgement = await judge(pass.id, pass.dwell, NOW + 2000);
    expect(judgement.notChecked.map((c) => [c.label, c.overridable])).toEqual([
      ["screening outdated", false],
    ]);
    await db.update(passes).set({ screenedAt: new Date(NOW + 1500) });
    expect((await judge(pass.id, pass.dwell, NOW + 2000)).notChecked).toEqual([]);
  });

  it("treat an empty crewed list and an unscreened pass as not checked, and a blind crewed object as closed", async () => {
    const [pass] = offeredOf(await search());
    if (!pass) throw new Error("nothing is offered");
    const db = database();
    const crewed = eq(protectedObjects.id, sky.crewedId);
    await db.update(protectedObjects).set({ class: "own" }).where(crewed);
    expect((await judge(pass.id, pass.dwell)).notChecked.map((c) => c.label)).toEqual(["no crewed list"]);
    await db.update(protectedObjects).set({ class: "crewed" }).where(crewed);
    const one = eq(passes.id, pass.id);
    await db
      .update(passes)
      .set({ screeningGaps: [sky.crewedId] })
      .where(one);
    expect((await judge(pass.id, pass.dwell)).closed.map((c) => c.rule)).toEqual(["protected objects"]);
    expect((await search()).find((p) => p.id === pass.id)?.dwell).toBeNull();
    await db
      .update(passes)
      .set({ screeningGaps: [sky.payloadId] })
      .where(one);
    expect((await judge(pass.id, pass.dwell)).notChecked.map((c) => c.overridable)).toEqual([true]);
    const kept = await db.select({ at: passes.screenedAt }).from(passes).where(one);
    await db.update(passes).set({ screeningGaps: [], screenedAt: null }).where(one);
    expect((await judge(pass.id, pass.dwell)).notChecked.map((c) => c.label)).toEqual(["not screened"]);
    await db
      .update(passes)
      .set({ screenedAt: kept[0]?.at ?? null })
      .where(one);
  });

  it("measure a pass anew when the station's limits or the airspace have changed", async () => {
    const db = database();
    const before = (await search()).filter((pass) => pass.stationId === sky.alder.id);
    await db
      .update(stations)
      .set({ maxElevationDeg: 30, version: sql`${stations.version} + 1` })
      .where(eq(stations.id, sky.alder.id));
    const sheets = [];
    for (const { id } of before) sheets.push(await passSheet(sky.planner, id, NOW));
    const high = sheets.filter((sheet) => sheet.maxElevationDeg > 31);
    expect(high.length).toBeGreaterThan(0);
    for (const sheet of high) {
      expect(sheet.closures.some((c) => c.label === "above 30°" && c.verdict === "closed")).toBe(true);
      expect(sheet.closures.some((c) => c.verdict === "not checked")).toBe(false);
    }
    const offered = offeredOf((await search()).filter((pass) => pass.stationId === sky.alder.id));
    for (const pass of offered) expect((await judge(pass.id, pass.dwell)).closed).toEqual([]);
    await db
      .update(stations)
      .set({ maxElevationDeg: 75, version: sql`${stations.version} + 1` })
      .where(eq(stations.id, sky.alder.id));
    await replanPasses(db, sky.passIds, NOW);
    // Two passes that were crossed or attested above may differ; the geometry is back.
    const again = (await search()).filter((pass) => pass.stationId === sky.alder.id);
    expect(again.map((p) => p.dwell?.from)).toEqual(before.map((p) => p.dwell?.from));
  });
});

describe("offers and booking", () => {
  it("agree: every offered dwell books, and what is left is offered without contradiction", async () => {
    let booked = 0;
    for (;;) {
      const [pass] = offeredOf(await search());
      if (!pass || booked >= 12) break;
      const { from, to } = pass.dwell;
      const engagement = await bookEngagement(sky.planner, { passId: pass.id, from, to }, NOW);
      // Nobody is asked about Brine Flat, so nothing stands between its engagements and clearing.
      const state = pass.stationId === sky.alder.id ? "proposed" : "cleared";
      expect(engagement.state).toBe(state);
      booked += 1;
      const after = (await search()).find((p) => p.id === pass.id);
      expect(after).toMatchObject({ dwell: null, engagementId: engagement.id, engagementState: state });
      expect(after?.booked).toEqual({ from, to });
      expect(after?.noDwellReason).toBe(`E-${engagement.number} (${state}) holds this pass.`);
    }
    expect(booked).toBe(12);
  });

  it("show a coordinator the passes of his own notices, and hide the rest", async () => {
    const mine = (await searchPasses(sky.coordinator, {}, NOW)).passes;
    const all = await search();
    const engaged = all.filter((pass) => pass.engagementId && pass.stationId === sky.alder.id);
    expect(engaged.length).toBeGreaterThan(0);
    expect(mine.map((p) => p.id)).toEqual(engaged.map((p) => p.id));
    const [own] = engaged;
    const other = all.find((pass) => !pass.engagementId);
    expect((await passSheet(sky.coordinator, own?.id ?? "", NOW)).id).toBe(own?.id);
    await expect(passSheet(sky.coordinator, other?.id ?? "", NOW)).rejects.toMatchObject({ status: 404 });
  });
});

describe("the pass sheet", () => {
  it("carries samples, estimate, the concerned and the assumptions with their sources", async () => {
    const found = await search();
    const pass = offeredOf(found).find((p) => p.stationId === sky.alder.id) ?? offeredOf(found)[0];
    if (!pass) throw new Error("nothing is offered");
    const sheet = await passSheet(sky.operator, pass.id, NOW);
    expect(sheet.dwell).toEqual(pass.dwell);
    expect(sheet.openings).toEqual(pass.openings);
    expect(sheet.samples.length).toBeGreaterThan(10);
    expect(sheet.samples.length).toBeLessThanOrEqual(120);
    const highest = Math.max(...sheet.samples.map((sample) => sample.elevationDeg));
    expect(Math.abs(highest - pass.maxElevationDeg)).toBeLessThan(1.5);
    expect(sheet.estimate).toMatchObject({ from: pass.dwell.from, to: pass.dwell.to });
    expect(sheet.estimate?.pulses).toBe(
      ((Date.parse(pass.dwell.to) - Date.parse(pass.dwell.from)) / 1000) * 10,
    );
    expect(sheet.assumptions.length).toBeGreaterThan(8);
    for (const assumption of sheet.assumptions) expect(assumption.source).not.toBe("");
    const names = sheet.concerned.map((c) => c.name);
    expect(names.includes("Tessel Clearing Desk")).toBe(pass.stationId === sky.alder.id);
  });

  it("is not there for an unknown pass", async () => {
    const id = "00000000-0000-4000-8000-000000000000";
    await expect(passSheet(sky.planner, id, NOW)).rejects.toMatchObject({ status: 404 });
    await expect(
      judge(id, { from: new Date(NOW).toISOString(), to: new Date(NOW + 1000).toISOString() }),
    ).rejects.toMatchObject({ status: 404 });
  });
});
