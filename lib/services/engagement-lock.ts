import type { Transaction } from "@/db/client";
import {
  type EngagementRow,
  engagementForUpdate,
  lockStation,
  stationOfEngagement,
} from "@/db/queries/engagements";
import type { EngagementFacts } from "@/lib/engagement/facts";
import { notFound } from "@/lib/engagement/refusal";
import { asState } from "@/lib/engagement/states";

export type StationRow = NonNullable<Awaited<ReturnType<typeof lockStation>>>;

/** An engagement that nobody else changes while the transaction lasts. */
export interface Locked {
  readonly station: StationRow;
  readonly engagement: EngagementRow;
}

/** Locks the station, then the engagement: always in this order. Throws 404 when there is none. */
export async function lockEngagement(tx: Transaction, id: string): Promise<Locked> {
  const stationId = await stationOfEngagement(tx, id);
  const station = stationId === null ? null : await lockStation(tx, stationId);
  const engagement = station === null ? null : await engagementForUpdate(tx, id);
  if (station === null || engagement === null) throw notFound("engagement");
  return { station, engagement };
}

/** The row as decisions see it. */
export function factsOfRow(row: EngagementRow): EngagementFacts {
  return {
    state: asState(row.state),
    plannerId: row.plannerId,
    dwellFromMs: row.dwellFrom.getTime(),
    dwellToMs: row.dwellTo.getTime(),
  };
}
