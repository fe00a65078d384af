import type { Transaction } from "@/db/client";
import { databaseFault } from "@/db/errors";
import { type HeldBy, holdersOf } from "@/db/queries/engagements";
import { conflict, type Refusal } from "@/lib/engagement/refusal";
import type { Interval } from "@/lib/planning/interval";
import { timeWords } from "@/lib/planning/words";
import type { StationRow } from "./engagement-lock";

/** Throws 409, naming who holds the time, when a live engagement is in the dwell's way. */
export async function refuseWhenHeld(
  tx: Transaction,
  station: StationRow,
  wanted: { fragmentId: string; dwell: Interval; exceptId: string | null },
): Promise<void> {
  const holders = await holdersOf(tx, {
    stationId: station.id,
    fragmentId: wanted.fragmentId,
    from: new Date(wanted.dwell.fromMs),
    to: new Date(wanted.dwell.toMs),
    slewS: station.slewS,
    coolDownS: station.coolDownS,
    exceptId: wanted.exceptId,
  });
  if (holders.length === 0) return;
  const reasons = holders.map((holder) => ({ path: "from", message: heldWords(holder, station) }));
  throw conflict(reasons.map(({ message }) => message).join(" "), reasons);
}

function heldWords(holder: HeldBy, station: StationRow): string {
  const span = `${timeWords(holder.dwellFrom.getTime())} to ${timeWords(holder.dwellTo.getTime())}`;
  const who = `E-${holder.number} (${holder.plannerName})`;
  if (holder.stationId !== station.id) return `The fragment is taken by ${who} at another station, ${span}.`;
  return `Taken by ${who}, ${span}, with ${station.slewS} s slew and ${station.coolDownS} s cool-down.`;
}

/** The database's own refusal of an overlap as 409; null for any other error. */
export function overlapRefusal(error: unknown): Refusal | null {
  const fault = databaseFault(error);
  if (fault?.code !== "23P01") return null;
  const what = fault.constraint === "engagements_fragment_free" ? "The fragment" : "The station";
  return conflict(`${what} was taken by another engagement at the same moment.`);
}
