import type { coordinationRows, liveEngagementRows } from "@/db/queries/facts";
import type { Interval } from "@/lib/planning/interval";
import type { AnswerFacts, EngagementFacts, VolumeFacts } from "@/lib/planning/pass-facts";

type VolumeRow = Awaited<ReturnType<typeof coordinationRows>>["volumeRows"][number];
type EngagementRow = Awaited<ReturnType<typeof liveEngagementRows>>[number];

/** A half-open interval from two instants. */
export function intervalOf(from: Date, to: Date): Interval {
  return { fromMs: from.getTime(), toMs: to.getTime() };
}

/** An airspace volume with its hours as the rules read them; hours that can't be read are not known. */
export function volumeFacts(row: VolumeRow): VolumeFacts {
  const spans = row.activeSpans.map(({ from, to }) => ({ fromMs: Date.parse(from), toMs: Date.parse(to) }));
  return {
    id: row.id,
    name: row.name,
    version: row.version,
    authorityId: row.authorityId,
    floorText: row.floorText,
    ceilingText: row.ceilingText,
    activeSpans: spans.every(({ fromMs, toMs }) => fromMs <= toMs) ? spans : [],
    scheduleKnownUntilMs: row.scheduleKnownUntil.getTime(),
    liftable: row.liftable,
  };
}

/** A live engagement as the rules read it. */
export function engagementFacts(row: EngagementRow): EngagementFacts {
  return {
    id: row.id,
    number: row.number,
    state: row.state,
    version: row.version,
    plannerName: row.plannerName,
    stationId: row.stationId,
    stationName: row.stationName,
    fragmentId: row.fragmentId,
    dwell: intervalOf(row.dwellFrom, row.dwellTo),
    hold: intervalOf(row.holdFrom, row.holdUntil),
  };
}

/** An answer in force; an outcome that we don't know counts as an objection. */
export function answerFacts(row: {
  authorityId: string;
  outcome: string;
  conditions: string | null;
  reasons: string | null;
  answeredAt: Date;
}): AnswerFacts {
  const { authorityId, outcome, conditions, reasons, answeredAt } = row;
  const known =
    outcome === "no objection" || outcome === "no objection with conditions" ? outcome : "objection";
  return { authorityId, outcome: known, conditions, reasons, answeredMs: answeredAt.getTime() };
}

/** Rows by a key, in their order. */
export function groupedBy<T>(rows: readonly T[], keyOf: (row: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const row of rows) {
    const group = groups.get(keyOf(row));
    if (group) group.push(row);
    else groups.set(keyOf(row), [row]);
  }
  return groups;
}
