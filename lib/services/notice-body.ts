import type { Queryable } from "@/db/client";
import { findNotices, type NoticeView } from "@/db/queries/notices";
import type { NoticeBody } from "@/lib/contracts/engagements";
import { notFound } from "@/lib/engagement/refusal";
import { asState } from "@/lib/engagement/states";

const KINDS = ["request", "revised request", "cancellation", "completion"] as const;
const DELIVERIES = ["queued", "sent", "failed"] as const;

/** A word from the database as one of ours; the check constraint holds the same list. */
function oneOf<T extends string>(words: readonly T[], word: string): T {
  const known = words.find((candidate) => candidate === word);
  if (known === undefined) throw new Error(`"${word}" is none of ${words.join(", ")}`);
  return known;
}

/** A notice as it goes over the wire. */
export function noticeBody(view: NoticeView): NoticeBody {
  const { notice: n, answer } = view;
  return {
    id: n.id,
    engagementId: n.engagementId,
    engagementNumber: view.engagementNumber,
    engagementState: asState(view.engagementState),
    authorityId: n.authorityId,
    authorityName: view.authorityName,
    kind: noticeKind(n.kind),
    sequence: n.sequence,
    toEmail: n.toEmail,
    subject: n.subject,
    delivery: oneOf(DELIVERIES, n.delivery),
    attempts: n.attempts,
    lastError: n.lastError,
    createdAt: n.createdAt.toISOString(),
    sentAt: n.sentAt?.toISOString() ?? null,
    openedAt: n.openedAt?.toISOString() ?? null,
    answerBy: n.answerBy?.toISOString() ?? null,
    superseded: n.supersededAt !== null,
    dwellFrom: view.dwellFrom.toISOString(),
    dwellTo: view.dwellTo.toISOString(),
    stationName: view.stationName,
    fragmentName: view.fragmentName,
    answer: answer && {
      outcome: answer.outcome,
      conditions: answer.conditions,
      reasons: answer.reasons,
      answeredBy: answer.answeredByName,
      answeredAt: answer.answeredAt.toISOString(),
      via: answer.via,
    },
  };
}

/** The kind of a stored notice. */
export function noticeKind(word: string): NoticeBody["kind"] {
  return oneOf(KINDS, word);
}

/** One notice with its answer in force; throws 404. */
export async function noticeBodyById(q: Queryable, id: string): Promise<NoticeBody> {
  const [view] = await findNotices(q, { id });
  if (view === undefined) throw notFound("notice");
  return noticeBody(view);
}
