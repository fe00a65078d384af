import type { Queryable } from "@/db/client";
import {
  askedAndAnswered,
  coordinationRows,
  crossingRows,
  lastFirings,
  liveEngagementRows,
  newestFragmentSets,
  passEngagementRows,
  protectedRowsById,
  protectedState,
  stationsWithLaser,
} from "@/db/queries/facts";
import { LIVE_STATES, type PassRow } from "@/db/queries/passes";
import type { AuthorityFacts, EngagementFacts } from "@/lib/planning/pass-facts";
import { engagementFacts, groupedBy } from "./fact-rows";
import { makeScene, type StationScene } from "./station-scene";

type Rows<F extends (...args: never[]) => Promise<unknown>> = Awaited<ReturnType<F>>;

/** An authority as the rules and the notices need it. */
export type AuthorityRow = Rows<typeof coordinationRows>["authorityRows"][number] & AuthorityFacts;

/** The engagement that a pass shows: the live one, else the last that was fired. */
export type PassEngagement = Rows<typeof passEngagementRows>[number] & { readonly live: boolean };

/** What the rules read of the database for a set of passes, each table asked once. */
export interface FactBook {
  readonly scenes: ReadonlyMap<string, StationScene>;
  readonly authorities: readonly AuthorityRow[];
  readonly newestSets: ReadonlyMap<string, Rows<typeof newestFragmentSets>[number]>;
  readonly crossings: ReadonlyMap<string, Rows<typeof crossingRows>>;
  readonly gapObjects: ReadonlyMap<string, Rows<typeof protectedRowsById>[number]>;
  readonly protectedState: Rows<typeof protectedState>;
  readonly live: readonly EngagementFacts[];
  readonly firings: ReadonlyMap<string, Rows<typeof lastFirings>[number]>;
  readonly passEngagements: ReadonlyMap<string, PassEngagement>;
  readonly asked: Rows<typeof askedAndAnswered>;
}

/** Room for what a dwell may reach beyond its pass, ms; slew and cool-down of the stations come on top. */
const MARGIN_MS = 600_000;

/**
 * Loads everything the rules need for these passes, in a fixed number of queries. Requests and answers
 * come for the engagements that the passes show and for `ownEngagementId`.
 */
export async function loadFactBook(
  q: Queryable,
  rows: readonly PassRow[],
  ownEngagementId: string | null = null,
): Promise<FactBook> {
  const stationIds = unique(rows.map((row) => row.stationId));
  const fragmentIds = unique(rows.map((row) => row.fragmentId));
  const passIds = rows.map((row) => row.id);
  const coordination = await coordinationRows(q);
  const stationRows = await stationsWithLaser(q, stationIds);
  const newest = await newestFragmentSets(q, fragmentIds);
  const crossings = await crossingRows(q, passIds);
  const gapObjects = await protectedRowsById(q, unique(rows.flatMap((row) => row.screeningGaps)));
  const live = await liveEngagements(q, rows, stationRows, fragmentIds);
  const firings = await lastFirings(q, fragmentIds);
  const shown = await passEngagementRows(q, passIds);
  const askedIds = shown.map((engagement) => engagement.id);
  if (ownEngagementId !== null) askedIds.push(ownEngagementId);
  return {
    scenes: new Map(stationRows.map((row) => [row.station.id, makeScene(row, coordination)])),
    authorities: coordination.authorityRows,
    newestSets: new Map(newest.map((set) => [set.fragmentId, set])),
    crossings: groupedBy(crossings, (crossing) => crossing.passId),
    gapObjects: new Map(gapObjects.map((object) => [object.id, object])),
    protectedState: await protectedState(q),
    live,
    firings: new Map(firings.map((firing) => [firing.fragmentId, firing])),
    passEngagements: shownEngagements(shown),
    asked: await askedAndAnswered(q, askedIds),
  };
}

function unique(values: readonly string[]): string[] {
  return [...new Set(values)];
}

async function liveEngagements(
  q: Queryable,
  rows: readonly PassRow[],
  stationRows: Rows<typeof stationsWithLaser>,
  fragmentIds: readonly string[],
): Promise<EngagementFacts[]> {
  if (rows.length === 0) return [];
  const holds = stationRows.map(({ station }) => 1000 * (station.slewS + station.coolDownS));
  const marginMs = MARGIN_MS + Math.max(...holds);
  let [fromMs, toMs] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const row of rows) {
    fromMs = Math.min(fromMs, row.riseAt.getTime());
    toMs = Math.max(toMs, row.setAt.getTime());
  }
  const scope = {
    stationIds: stationRows.map(({ station }) => station.id),
    fragmentIds,
    from: new Date(fromMs - marginMs),
    to: new Date(toMs + marginMs),
  };
  return (await liveEngagementRows(q, scope)).map(engagementFacts);
}

function shownEngagements(shown: Rows<typeof passEngagementRows>): Map<string, PassEngagement> {
  const byPass = new Map<string, PassEngagement>();
  for (const engagement of shown) {
    const live = LIVE_STATES.includes(engagement.state);
    if (live || !byPass.get(engagement.passId)?.live) byPass.set(engagement.passId, { ...engagement, live });
  }
  return byPass;
}
