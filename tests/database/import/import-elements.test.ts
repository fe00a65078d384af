import { readFileSync } from "node:fs";
import { sql } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, it } from "vitest";
import { database } from "@/db/client";
import type { ImportReportBody } from "@/lib/contracts/element-sets";
import type { Actor } from "@/lib/engagement/roles";
import { importElements, importTexts } from "@/lib/services/import-elements";
import { listElementSets } from "@/lib/services/list-element-sets";
import { ownDatabase } from "../support";
import { addPerson, addProtected, addStation } from "../world";

ownDatabase();

const NOW = Date.UTC(2021, 9, 3);

/** Real sets of October 2021 as published by CelesTrak; see the README beside the file. */
const published = readFileSync("../shared/reference/published-debris-2021.tle", "utf8").split(/\r?\n/);
const set = (n: number) => published.slice(3 * n, 3 * n + 3).join("\n");
const numberOf = (n: number) => Number(published[3 * n + 1]?.slice(2, 7));

/** The same set with the last digit of its line 1, the checksum, turned into another. */
const badChecksum = (n: number) =>
  set(n).replace(
    /^(1 .{66})([0-9])$/m,
    (_, head: string, digit: string) => head + ((Number(digit) + 1) % 10),
  );

let planner: Actor;

beforeAll(async () => {
  planner = await addPerson(database(), "Plan Ner", "planner");
  await addStation(database(), "Alder Point");
});

beforeEach(async () => {
  await database().execute(sql`delete from element_sets`);
  await database().execute(sql`delete from element_imports`);
  await database().execute(sql`delete from fragments`);
  await database().execute(sql`delete from protected_objects`);
  await database().execute(sql`delete from sweeps`);
  await database().execute(sql`delete from graphile_worker._private_jobs`);
});

async function counts(): Promise<Record<string, number>> {
  const { rows } = await database().execute<Record<string, number>>(sql`
    select (select count(*)::int from element_sets) as sets, (select count(*)::int from element_imports) as imports,
      (select count(*)::int from fragments) as fragments, (select count(*)::int from protected_objects) as guarded,
      (select count(*)::int from sweeps) as sweeps, (select count(*)::int from graphile_worker.jobs) as jobs`);
  return rows[0] ?? {};
}

async function ledgerActions(): Promise<number> {
  const { rows } = await database().execute<{ n: number }>(
    sql`select count(*)::int as n from ledger where action = 'imported element sets'`,
  );
  return rows[0]?.n ?? -1;
}

function importText(text: string, more: object = {}): Promise<ImportReportBody> {
  return importElements(planner, { text, source: "a file.tle", ...more }, NOW);
}

describe("importElements", () => {
  it("stores the good sets of a file with bad lines, names the bad ones and stores nothing else", async () => {
    const before = await ledgerActions();
    const text = [set(0), badChecksum(1), "this is no element set", set(2)].join("\n");
    const report = await importText(text);
    expect(report).toMatchObject({ accepted: 2, duplicates: [], older: [], preview: false });
    expect(report.rejected.map(({ line }) => line)).toEqual([5, 7]);
    expect(report.rejected[0]?.column).toBe(69);
    expect(report.rejected[0]?.message).toMatch(/checksum/i);
    expect(report.created.map(({ catalogNumber }) => catalogNumber)).toEqual([numberOf(0), numberOf(2)]);
    expect(await counts()).toEqual({ sets: 2, imports: 1, fragments: 2, guarded: 0, sweeps: 1, jobs: 2 });
    expect(await ledgerActions()).toBe(before + 1);
    const { rows } = await database().execute(sql`
      select accepted_count, duplicate_count, older_count, jsonb_array_length(rejected) as rejected, source
      from element_imports`);
    expect(rows).toEqual([
      { accepted_count: 2, duplicate_count: 0, older_count: 0, rejected: 2, source: "a file.tle" },
    ]);
  });

  it("keeps the raw text and the exact elements", async () => {
    await importText(set(0));
    const { elementSets } = await listElementSets(planner, { catalogNumber: String(numberOf(0)) });
    // Field by field from the printed lines of the published set.
    expect(elementSets).toEqual([
      expect.objectContaining({
        catalogNumber: 30024,
        objectName: "FENGYUN 1C DEB",
        objectId: "1999-025MZ",
        meanMotionRevPerDay: 15.0289611,
        eccentricity: 0.017284,
        inclinationDeg: 98.6728,
        raanDeg: 100.9502,
        argPericenterDeg: 342.7621,
        meanAnomalyDeg: 16.7776,
        bstar: 0.00014929,
        meanMotionDot: 0.0000268,
        meanMotionDdot: 0,
        format: "tle",
        raw: set(0),
        source: "a file.tle",
      }),
    ]);
    // Day 275.03063724 of 2021: 2 October, 0.03063724 of a day after midnight.
    expect(elementSets[0]?.epochMs).toBeCloseTo(Date.UTC(2021, 9, 2) + 0.03063724 * 86_400_000, 2);
  });

  it("names what is stored already, and stores it once", async () => {
    await importText(set(0));
    const again = await importText([set(0), set(3), set(3)].join("\n"));
    expect(again.accepted).toBe(1);
    expect(again.duplicates.map(({ line, catalogNumber }) => [line, catalogNumber])).toEqual([
      [1, numberOf(0)],
      [7, numberOf(3)],
    ]);
    expect(await counts()).toMatchObject({ sets: 2, imports: 2, fragments: 2 });
  });

  it("stores an older set, names it and sweeps nothing for it", async () => {
    const omm = (epoch: string) =>
      JSON.stringify({
        OBJECT_NAME: "INVENTED PIECE",
        NORAD_CAT_ID: 123456789,
        EPOCH: epoch,
        MEAN_MOTION: 14.4,
        ECCENTRICITY: 0.004,
        INCLINATION: 74,
        RA_OF_ASC_NODE: 120,
        ARG_OF_PERICENTER: 80,
        MEAN_ANOMALY: 20,
        BSTAR: 0.0002,
        MEAN_MOTION_DOT: 0,
        MEAN_MOTION_DDOT: 0,
      });
    const first = await importText(omm("2021-10-02T12:00:00.000001"));
    expect(first).toMatchObject({ accepted: 1, older: [], sweepId: expect.any(String) });
    const later = await importText(omm("2021-10-01T12:00:00"));
    expect(later).toMatchObject({ accepted: 1, sweepId: null });
    expect(later.older).toEqual([
      {
        line: 1,
        catalogNumber: 123456789,
        message: "The epoch 2021-10-01T12:00:00.000Z is older than the newest one, 2021-10-02T12:00:00.000Z.",
      },
    ]);
    const { elementSets } = await listElementSets(planner, { catalogNumber: "123456789" });
    expect(elementSets.map(({ epochMs }) => epochMs)).toEqual([
      Date.UTC(2021, 9, 2, 12) + 0.001,
      Date.UTC(2021, 9, 1, 12),
    ]);
  });

  it("reports the same in a preview and stores nothing, not even a ledger row", async () => {
    const text = [set(0), badChecksum(1), set(2)].join("\n");
    const before = await ledgerActions();
    const preview = await importText(text, { preview: true });
    expect(await counts()).toEqual({ sets: 0, imports: 0, fragments: 0, guarded: 0, sweeps: 0, jobs: 0 });
    expect(await ledgerActions()).toBe(before);
    const real = await importText(text);
    expect(preview).toEqual({ ...real, preview: true, importId: null, sweepId: null });
  });

  it("stores nothing at all when no set is good", async () => {
    const before = await ledgerActions();
    const report = await importText(`${badChecksum(0)}\n${badChecksum(1)}`);
    expect(report).toMatchObject({ accepted: 0, importId: null, sweepId: null });
    expect(report.rejected).toHaveLength(2);
    expect(await counts()).toEqual({ sets: 0, imports: 0, fragments: 0, guarded: 0, sweeps: 0, jobs: 0 });
    expect(await ledgerActions()).toBe(before);
  });

  it("assumes a body for a new fragment and says so", async () => {
    await importText(set(0));
    const { rows } = await database().execute(sql`select name, body_source, material from fragments`);
    expect(rows).toEqual([
      {
        name: "FENGYUN 1C DEB",
        body_source: expect.stringMatching(/^assumed at import: /),
        material: "unknown",
      },
    ]);
  });

  it("never makes a protected object a target, nor a fragment a protected object", async () => {
    await addProtected(database(), numberOf(0), "crewed");
    const report = await importText([set(0), set(2)].join("\n"));
    expect(report.accepted).toBe(1);
    expect(report.rejected).toEqual([
      { line: 1, column: 1, message: expect.stringContaining("is a protected object") },
    ]);
    const other = await importText(set(2), { as: "protected", class: "payload" });
    expect(other).toMatchObject({ accepted: 0, importId: null });
    expect(other.rejected).toEqual([
      { line: 1, column: 1, message: expect.stringContaining("is a fragment to be nudged") },
    ]);
    expect(await counts()).toMatchObject({ sets: 2, fragments: 1, guarded: 1 });
  });

  it("adds protected objects of a class and sweeps every fragment again", async () => {
    await importText([set(0), set(2), set(3), set(4), set(5)].join("\n"));
    const report = await importText(set(6), { as: "protected", class: "optical payload" });
    expect(report).toMatchObject({ accepted: 1, sweepId: expect.any(String) });
    const { rows } = await database().execute(
      sql`select class, catalog_number::int as number from protected_objects`,
    );
    expect(rows).toEqual([{ class: "optical payload", number: numberOf(6) }]);
    const swept = await database().execute<{ ids: string[] }>(sql`
      select c.fragment_ids as ids from sweep_chunks c where c.sweep_id = ${report.sweepId}`);
    expect(swept.rows.flatMap(({ ids }) => ids)).toHaveLength(5);
  });

  it("asks for the class of protected objects", async () => {
    await expect(importText(set(6), { as: "protected" })).rejects.toThrow(/need their class/);
  });

  it("takes several texts in one go and says which one a line belongs to", async () => {
    const texts = [
      { text: set(0), source: "one.tle" },
      { text: `${badChecksum(2)}\n${set(3)}`, source: "two.tle" },
    ];
    const report = await importTexts(planner, async () => texts, {}, NOW);
    expect(report.accepted).toBe(2);
    expect(report.rejected).toEqual([
      { line: 2, column: 69, message: expect.stringMatching(/^two\.tle: .*checksum/i) },
    ]);
    expect(await counts()).toMatchObject({ sets: 2, imports: 2, sweeps: 1 });
  });

  it("is refused to operators before a line is read", async () => {
    const operator = await addPerson(database(), "Op Erator", "operator");
    const unread = async () => {
      throw new Error("it was read");
    };
    await expect(importTexts(operator, unread, {}, NOW)).rejects.toMatchObject({ status: 403 });
  });
});

describe("two imports of the same new object at once", () => {
  it("create it once", async () => {
    const reports = await Promise.all([importText(set(7)), importText(set(7))]);
    expect(reports.map(({ accepted }) => accepted).sort()).toEqual([0, 1]);
    expect(await counts()).toMatchObject({ sets: 1, fragments: 1 });
  });
});
