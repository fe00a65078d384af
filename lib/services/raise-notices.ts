import { randomUUID } from "node:crypto";
import type { Transaction } from "@/db/client";
import { engagementView } from "@/db/queries/engagements";
import { type AuthorityRow, insertNotice } from "@/db/queries/notices";
import { config, secret } from "@/lib/config";
import { answerByMs } from "@/lib/engagement/answer-deadline";
import { signLink } from "@/lib/notices/answer-link";
import { composeNotice } from "@/lib/notices/compose";
import { messageIdOf, readMailbox } from "@/lib/notices/mail-names";
import type { FiredFacts, NoticeFacts, NoticeKind } from "@/lib/notices/notice-facts";
import type { Interval } from "@/lib/planning/interval";
import { type CommonFacts, commonFacts } from "./notice-content";
import { addJob } from "./queue";

/** One authority in a round of notices. */
export interface RoundMember {
  readonly authority: AuthorityRow;
  readonly kind: NoticeKind;
  readonly because: string;
}

/** A round of notices about one change of an engagement; all carry its calendar sequence. */
export interface Round {
  readonly engagementId: string;
  readonly members: readonly RoundMember[];
  /** Why it ends, for cancellations. */
  readonly reason?: string | null;
  /** What changed, for revised requests. */
  readonly change?: string | null;
  readonly fired?: FiredFacts | null;
  /** The times that no longer hold, after a move. */
  readonly former?: Interval | null;
  readonly nowMs: number;
}

/** Attempts that the queue makes; the sender gives up earlier and says so, see send-notice.ts. */
const QUEUE_ATTEMPTS = 25;

/**
 * Writes a round of notices and the jobs that send them, in the transaction of
 * the change: either the change and its notices exist, or neither. Older notices
 * to the same authorities are superseded. Gives one line of words for each.
 */
export async function raiseNotices(tx: Transaction, round: Round): Promise<string[]> {
  const view = await engagementView(tx, round.engagementId);
  if (view === null) throw new Error("notices are raised for an engagement that is there");
  const common = await commonFacts(tx, view);
  const sequence = view.engagement.calendarSequence;
  for (const member of round.members) await raiseOne(tx, round, member, common, sequence);
  return round.members.map(({ kind, authority }) => `${kind} to ${authority.name}`);
}

async function raiseOne(
  tx: Transaction,
  round: Round,
  member: RoundMember,
  common: CommonFacts,
  sequence: number,
): Promise<void> {
  const id = randomUUID();
  const facts = factsFor(id, round, member, common, sequence);
  const { DWELLBOOK_BASE_URL: baseUrl, MAIL_FROM } = config();
  await insertNotice(tx, {
    id,
    engagementId: round.engagementId,
    authorityId: member.authority.id,
    kind: member.kind,
    sequence,
    messageId: messageIdOf(id, baseUrl),
    toEmail: member.authority.email,
    ...composeNotice(facts, readMailbox(MAIL_FROM), round.nowMs),
    answerBy: facts.answerByMs === null ? null : new Date(facts.answerByMs),
    createdAt: new Date(round.nowMs),
  });
  await addJob(
    tx,
    "send-notice",
    { noticeId: id },
    { jobKey: `send-notice ${id}`, maxAttempts: QUEUE_ATTEMPTS },
  );
}

function factsFor(
  noticeId: string,
  round: Round,
  member: RoundMember,
  common: CommonFacts,
  sequence: number,
): NoticeFacts {
  const { authority, kind, because } = member;
  const asks = kind === "request" || kind === "revised request";
  return {
    ...common,
    kind,
    sequence,
    authority,
    because,
    formerFromMs: kind === "revised request" ? (round.former?.fromMs ?? null) : null,
    formerToMs: kind === "revised request" ? (round.former?.toMs ?? null) : null,
    change: round.change ?? null,
    reason: round.reason ?? null,
    fired: round.fired ?? null,
    answerByMs: asks ? answerByMs(round.nowMs, common.dwellFromMs, authority.changeDeadlineMin) : null,
    link: asks ? answerUrl(noticeId, common.dwellToMs) : null,
  };
}

/** Where an authority answers a notice without signing in, until the dwell is over. */
export function answerUrl(noticeId: string, expiresMs: number): string {
  const token = signLink(secret("DWELLBOOK_LINK_SECRET"), { noticeId, expiresMs });
  return new URL(`/answer/${token}`, config().DWELLBOOK_BASE_URL).href;
}
