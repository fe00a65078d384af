import { sql } from "drizzle-orm";
import { database } from "@/db/client";
import { Refusal } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { answerNotice } from "@/lib/services/answer-notice";
import { bookEngagement } from "@/lib/services/book-engagement";
import { confirmEngagement } from "@/lib/services/confirm-engagement";
import { listNotices } from "@/lib/services/list-notices";
import { NOW } from "../world";
import { dwellIn, type Scene } from "./scene";

/** The refusal that work ends in; anything else that happens fails the test. */
export async function refusalOf(work: Promise<unknown>): Promise<Refusal> {
  const error: unknown = await work.then(
    () => new Error("nothing was refused"),
    (thrown: unknown) => thrown,
  );
  if (error instanceof Refusal) return error;
  throw error;
}

export async function statusOf(work: Promise<unknown>): Promise<number> {
  return (await refusalOf(work)).status;
}

/** Rows of a query, in the database's own names. */
export async function rowsOf(query: ReturnType<typeof sql>): Promise<Record<string, unknown>[]> {
  return (await database().execute(query)).rows;
}

/** Books a dwell around the culmination of a pass of the scene. */
export async function bookIn(scene: Scene, pass = scene.pass, nowMs = NOW) {
  return bookEngagement(scene.planner, { passId: pass.id, ...dwellIn(pass) }, nowMs);
}

/** The request that an authority may answer now. */
export async function openRequest(engagementId: string, authorityId: string) {
  const admin: Actor = {
    id: null,
    name: "test",
    role: "administrator",
    authorityId: null,
    isSafetyOfficer: false,
    via: "system",
  };
  const { notices } = await listNotices(admin, { engagement: engagementId });
  const open = notices.find(
    (notice) => notice.authorityId === authorityId && notice.answerBy !== null && !notice.superseded,
  );
  if (!open) throw new Error("there is no open request");
  return open;
}

/** Lets both authorities of the scene say no objection; the engagement clears. */
export async function clearAll(scene: Scene, engagementId: string, nowMs = NOW): Promise<void> {
  for (const person of [scene.coordinator, scene.airCoordinator]) {
    const notice = await openRequest(engagementId, person.authorityId ?? "");
    await answerNotice(person, notice.id, { outcome: "no objection" }, nowMs);
  }
}

/** A checklist as an operator would fill it in at that time. */
export function checklistAt(nowMs: number) {
  return {
    airUnitCalledAt: new Date(nowMs - 60_000).toISOString(),
    spotterInPlace: true,
    interlockTestedAt: new Date(nowMs - 3_600_000).toISOString(),
    clockOffsetMs: 3,
    weather: "clear, wind 3 m/s",
    crewedListCheckedAt: new Date(nowMs - 60_000).toISOString(),
  };
}

/** Confirms with two operators. */
export async function confirmAll(scene: Scene, engagementId: string, nowMs = NOW): Promise<void> {
  for (const person of [scene.operator, scene.secondOperator]) {
    await confirmEngagement(person, engagementId, { checklist: checklistAt(nowMs) }, nowMs);
  }
}

export async function stateOf(engagementId: string): Promise<unknown> {
  const [row] = await rowsOf(sql`select state from engagements where id = ${engagementId}`);
  return row?.state;
}

/** Actions in the ledger about an engagement, oldest first. */
export async function ledgerOf(engagementId: string): Promise<string[]> {
  const rows = await rowsOf(
    sql`select action, actor_name from ledger where subject_id = ${engagementId} order by id`,
  );
  return rows.map((row) => `${row.actor_name}: ${row.action}`);
}

/** Kinds and sequences of an authority's notices about an engagement, oldest first. */
export async function noticesOf(engagementId: string, authorityId: string): Promise<string[]> {
  const rows = await rowsOf(sql`
    select kind, sequence, calendar_method from notices
    where engagement_id = ${engagementId} and authority_id = ${authorityId} order by sequence`);
  return rows.map((row) => `${row.sequence} ${row.kind} (${row.calendar_method})`);
}
