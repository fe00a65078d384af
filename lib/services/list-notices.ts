import { database } from "@/db/client";
import { findNotices } from "@/db/queries/notices";
import { type NoticeBody, type NoticeSheetBody, noticeQuery } from "@/lib/contracts/engagements";
import { notAllowed, notFound } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { noticeBody } from "./notice-body";
import { readQuery } from "./read-input";

/** Notices with the answers in force, newest first; coordinators see their own authority's only. */
export async function listNotices(actor: Actor, query: unknown): Promise<{ notices: NoticeBody[] }> {
  const authorityId = scopeOf(actor);
  const { engagement } = readQuery(noticeQuery, query);
  const views = await findNotices(database(), { engagementId: engagement, authorityId });
  return { notices: views.map(noticeBody) };
}

/** One notice with its words; 404 for one that the caller may not know of. */
export async function noticeSheet(actor: Actor, id: string): Promise<NoticeSheetBody> {
  const authorityId = scopeOf(actor);
  const [view] = await findNotices(database(), { id, authorityId });
  if (view === undefined) throw notFound("notice");
  return { ...noticeBody(view), text: view.notice.textBody };
}

function scopeOf(actor: Actor): string | undefined {
  if (may(actor, "see all notices")) return undefined;
  if (may(actor, "see own notices") && actor.authorityId !== null) return actor.authorityId;
  throw notAllowed("see notices");
}
