import type { Queryable } from "@/db/client";
import { engagementView } from "@/db/queries/engagements";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { notFound } from "@/lib/engagement/refusal";
import { engagementBody } from "./engagement-body";

/** The engagement as it now stands, for the answer to a change; throws 404. */
export async function currentBody(q: Queryable, id: string, nowMs: number): Promise<EngagementBody> {
  const view = await engagementView(q, id);
  if (view === null) throw notFound("engagement");
  return engagementBody(view, nowMs);
}
