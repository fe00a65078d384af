import { database, type Queryable } from "@/db/client";
import { findNotices, markOpened, type NoticeView, noticeById } from "@/db/queries/notices";
import { inTransaction } from "@/db/transaction";
import { secret } from "@/lib/config";
import { type AnswerPageBody, answerInput } from "@/lib/contracts/answers";
import { notFound, refused } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { asState, isLive } from "@/lib/engagement/states";
import { readLink } from "@/lib/notices/answer-link";
import { oneLine } from "@/lib/notices/words";
import { noticeReasons, takeAnswer } from "./answer-notice";
import { noticeKind } from "./notice-body";
import { readBody } from "./read-input";

/** What the page behind a link shows. Reading changes nothing: mail scanners open links too. */
export async function readAnswerPage(token: string, nowMs: number): Promise<AnswerPageBody> {
  const view = await viewOf(database(), noticeIdOf(token));
  return pageBody(view, nowMs);
}

/** Notes that a person's browser opened the page; asked for by the page's script, not by the address. */
export async function openByLink(token: string, nowMs: number): Promise<void> {
  const view = await viewOf(database(), noticeIdOf(token));
  await markOpened(database(), view.notice.id, new Date(nowMs));
}

/** Takes the answer given on the page; the name is needed, since nobody signed in. */
export async function answerByLink(token: string, input: unknown, nowMs: number): Promise<AnswerPageBody> {
  const noticeId = noticeIdOf(token);
  const answer = await readBody(answerInput, input);
  const name = oneLine(answer.name ?? "");
  if (name === "") throw refused("Who answers?", [{ path: "name", message: "Give your name." }]);
  return inTransaction(async (tx) => {
    const notice = await noticeById(tx, noticeId);
    if (notice === null) throw notFound("answer link");
    await takeAnswer(tx, linkActor(name, notice.authorityId), notice, answer, nowMs);
    return pageBody(await viewOf(tx, noticeId), nowMs);
  });
}

function linkActor(name: string, authorityId: string): Actor {
  return { id: null, name, role: "authority by link", authorityId, isSafetyOfficer: false, via: "link" };
}

/** 404 for anything that we did not sign; whether it is still open is said by the notice. */
function noticeIdOf(token: string): string {
  const claim = readLink(secret("DWELLBOOK_LINK_SECRET"), token);
  if (claim === null) throw notFound("answer link");
  return claim.noticeId;
}

async function viewOf(q: Queryable, noticeId: string): Promise<NoticeView> {
  const [view] = await findNotices(q, { id: noticeId });
  if (view === undefined) throw notFound("answer link");
  return view;
}

function pageBody(view: NoticeView, nowMs: number): AnswerPageBody {
  const { notice, answer } = view;
  const closedBecause = closedReason(view, nowMs);
  return {
    engagementNumber: view.engagementNumber,
    engagementState: asState(view.engagementState),
    kind: noticeKind(notice.kind),
    authorityName: view.authorityName,
    authorityTimeZone: view.authorityTimeZone,
    stationName: view.stationName,
    fragmentName: view.fragmentName,
    dwellFrom: view.dwellFrom.toISOString(),
    dwellTo: view.dwellTo.toISOString(),
    answerBy: notice.answerBy?.toISOString() ?? null,
    subject: notice.subject,
    text: notice.textBody,
    canAnswer: closedBecause === null,
    closedBecause,
    answer: answer && {
      outcome: answer.outcome,
      conditions: answer.conditions,
      reasons: answer.reasons,
      answeredBy: answer.answeredByName,
      answeredAt: answer.answeredAt.toISOString(),
    },
  };
}

function closedReason(view: NoticeView, nowMs: number): string | null {
  const state = asState(view.engagementState);
  const [reason] = noticeReasons(view.notice);
  // What has ended is not answered by a later notice either.
  if (!isLive(state)) return `The engagement is ${state}: there is nothing left to answer.`;
  if (reason !== undefined) return reason.message;
  return nowMs >= view.dwellFrom.getTime() ? "The dwell has begun or is over." : null;
}
