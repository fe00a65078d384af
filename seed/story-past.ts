import { lapseEngagements } from "@/lib/services/lapse-engagements";
import { recordFiring } from "@/lib/services/record-firing";
import { scrubEngagement } from "@/lib/services/scrub-engagement";
import { INVENTED_STATIONS } from "./stations";
import { answer, book, type Cast, type Chosen, castOf, choosePasses, confirm } from "./story";

const HOUR_MS = 3_600_000;
const MINUTE_MS = 60_000;

/** What became of the demo's earlier engagements, in the order of their passes. */
const ENDINGS = ["fired", "in part", "scrubbed", "not fired", "lapsed", "not yet recorded"] as const;

/** Books, answers, confirms and ends a few engagements of the last two days, each at its own time. */
export async function bookPast(pastMs: number, nowMs: number): Promise<void> {
  const cast = await castOf();
  const bookMs = pastMs + 10 * MINUTE_MS;
  const span = { fromMs: pastMs + 3 * HOUR_MS, toMs: nowMs - HOUR_MS, nowMs: bookMs };
  const chosen = await choosePasses(cast, span, ENDINGS.length);
  for (const [i, pass] of chosen.entries()) {
    const ending = ENDINGS[i];
    if (!ending) break;
    const id = await book(cast, pass, bookMs);
    if (ending === "lapsed") continue;
    await answer(cast, id, { outcome: "no objection" }, bookMs + HOUR_MS);
    if (ending === "scrubbed") {
      const reason = "Cloud moved in from the west before the rise.";
      await scrubEngagement(cast.operator, id, { reason }, Date.parse(pass.from) - 15 * MINUTE_MS);
      continue;
    }
    await confirm(cast.operator, id, Date.parse(pass.from) - 25 * MINUTE_MS);
    await confirm(cast.secondOperator, id, Date.parse(pass.from) - 20 * MINUTE_MS);
    if (ending !== "not yet recorded") await fire(cast, id, ending, pass);
  }
  await lapseEngagements(nowMs);
}

async function fire(
  cast: Cast,
  id: string,
  outcome: "fired" | "in part" | "not fired",
  dwell: Chosen,
): Promise<void> {
  const fromMs = Date.parse(dwell.from);
  const recordedMs = Date.parse(dwell.to) + 6 * MINUTE_MS;
  if (outcome === "not fired") {
    const note = "Fine track was not reached before the end of the dwell; the shutter stayed closed.";
    await recordFiring(cast.operator, id, { outcome, pulses: 0, interruptions: [], note }, recordedMs);
    return;
  }
  const lengthS = (Date.parse(dwell.to) - fromMs) / 1000;
  const stopped = outcome === "in part";
  const lostS = stopped ? Math.min(6, Math.floor(lengthS / 3)) : 0;
  const at = new Date(fromMs + Math.floor(lengthS / 3) * 1000).toISOString();
  const input = {
    outcome,
    openedAt: new Date(fromMs + 120).toISOString(),
    closedAt: new Date(Date.parse(dwell.to) - 340).toISOString(),
    pulses: Math.floor((lengthS - lostS - 1) * rateOf(dwell.stationName)),
    interruptions: stopped ? [{ at, cause: "aircraft within 25° of the beam", secondsLost: lostS }] : [],
  };
  await recordFiring(cast.operator, id, input, recordedMs);
}

function rateOf(stationName: string): number {
  const found = INVENTED_STATIONS.find((s) => s.station.name === stationName);
  if (!found) throw new Error(`no invented station named ${stationName}`);
  return found.laser.repetitionRateHz;
}
