import { database } from "@/db/client";
import type { PassBody } from "@/lib/contracts/passes";
import type { Actor } from "@/lib/engagement/roles";
import { answerNotice } from "@/lib/services/answer-notice";
import { bookEngagement } from "@/lib/services/book-engagement";
import { confirmEngagement } from "@/lib/services/confirm-engagement";
import { listNotices } from "@/lib/services/list-notices";
import { searchPasses } from "@/lib/services/search-passes";
import { actorOf } from "./fill-people";

const MINUTE_MS = 60_000;

/** So that the demo shows every station at work, not the best one alone. */
const MOST_AT_STATION = 2;

/** The invented people who act in the demo's story. */
export interface Cast {
  readonly planner: Actor;
  readonly operator: Actor;
  readonly secondOperator: Actor;
  readonly coordinator: Actor;
}

/** Reads the cast from the people that were filled. */
export async function castOf(): Promise<Cast> {
  const q = database();
  return {
    planner: await actorOf(q, "ines@dwellbook.invalid"),
    operator: await actorOf(q, "tomas@dwellbook.invalid"),
    secondOperator: await actorOf(q, "ruth@dwellbook.invalid"),
    coordinator: await actorOf(q, "maren@brightwater.invalid"),
  };
}

/** A pass that the story books, with the dwell that was offered for it. */
export interface Chosen {
  readonly passId: string;
  readonly stationName: string;
  readonly from: string;
  readonly to: string;
}

/**
 * Passes worth booking between two times, best first, each of another fragment,
 * no two close together at one station, and only such as wait for the clearing
 * desk alone: every other authority would have to be played as well.
 */
export async function choosePasses(
  cast: Cast,
  span: { fromMs: number; toMs: number; nowMs: number },
  count: number,
): Promise<Chosen[]> {
  const query = { from: new Date(span.fromMs).toISOString(), to: new Date(span.toMs).toISOString() };
  const { passes } = await searchPasses(cast.planner, query, span.nowMs);
  const worthwhile = passes
    .filter((p) => p.dwell !== null && p.engagementId === null && waitsForOne(p))
    .sort((a, b) => (b.dwell?.semiMajorAxisDropM ?? 0) - (a.dwell?.semiMajorAxisDropM ?? 0));
  const chosen: PassBody[] = [];
  for (const pass of worthwhile) {
    if (chosen.length === count) break;
    const here = chosen.filter((other) => other.stationId === pass.stationId).length;
    if (here < MOST_AT_STATION && chosen.every((other) => staysClear(pass, other))) chosen.push(pass);
  }
  return chosen
    .sort((a, b) => a.riseAt.localeCompare(b.riseAt))
    .flatMap((p) =>
      p.dwell ? [{ passId: p.id, stationName: p.stationName, from: p.dwell.from, to: p.dwell.to }] : [],
    );
}

function waitsForOne(pass: PassBody): boolean {
  return !pass.closures.some((c) => c.rule === "airspace" || c.verdict === "not checked");
}

function staysClear(a: PassBody, b: PassBody): boolean {
  const apartMs = Math.abs(Date.parse(a.riseAt) - Date.parse(b.riseAt));
  return a.fragmentId !== b.fragmentId && (a.stationId !== b.stationId || apartMs > 60 * MINUTE_MS);
}

/** Books a chosen dwell as the planner; gives the engagement's id. */
export async function book(cast: Cast, chosen: Chosen, nowMs: number): Promise<string> {
  const input = { passId: chosen.passId, from: chosen.from, to: chosen.to };
  const engagement = await bookEngagement(cast.planner, input, nowMs);
  return engagement.id;
}

/** The clearing desk answers its notice of an engagement. */
export async function answer(
  cast: Cast,
  engagementId: string,
  input: { outcome: string; conditions?: string; reasons?: string },
  nowMs: number,
): Promise<void> {
  const { notices } = await listNotices(cast.coordinator, { engagement: engagementId });
  for (const notice of notices) await answerNotice(cast.coordinator, notice.id, input, nowMs);
}

/** One of the operators fills the checklist and confirms. */
export async function confirm(operator: Actor, engagementId: string, nowMs: number): Promise<void> {
  const minutesAgo = (minutes: number): string => new Date(nowMs - minutes * MINUTE_MS).toISOString();
  await confirmEngagement(
    operator,
    engagementId,
    {
      checklist: {
        airUnitCalledAt: minutesAgo(4),
        spotterInPlace: true,
        interlockTestedAt: minutesAgo(50),
        clockOffsetMs: 3,
        weather: "clear, wind 4 m/s",
        crewedListCheckedAt: minutesAgo(30),
      },
    },
    nowMs,
  );
}
