import { isWaiting } from "@/app/_components/engagement/notice-words";
import type { NoticeBody } from "@/lib/contracts/engagements";

export interface SortedNotices {
  /** Asks, and nothing has been answered: the most urgent first. */
  readonly waiting: readonly NoticeBody[];
  /** Answered, of engagements whose answer may still be changed or is still of use: by dwell. */
  readonly answered: readonly NoticeBody[];
  /** What asks nothing any more, newest first. */
  readonly others: readonly NoticeBody[];
}

/** Notices as a desk works through them. */
export function sortNotices(notices: readonly NoticeBody[]): SortedNotices {
  const waiting = notices.filter(isWaiting);
  const answered = notices.filter((n) => n.answer !== null && !n.superseded);
  const rest = new Set([...waiting, ...answered]);
  return {
    waiting: waiting.sort((a, b) => dueOf(a).localeCompare(dueOf(b))),
    answered: answered.sort((a, b) => b.dwellFrom.localeCompare(a.dwellFrom)),
    others: notices.filter((n) => !rest.has(n)).sort((a, b) => b.createdAt.localeCompare(a.createdAt)),
  };
}

/** ISO times in UTC sort as text. */
function dueOf(n: NoticeBody): string {
  return n.answerBy ?? n.dwellFrom;
}
