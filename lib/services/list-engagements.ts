import { database } from "@/db/client";
import { findEngagements } from "@/db/queries/engagements";
import { type EngagementBody, engagementQuery } from "@/lib/contracts/engagements";
import { notAllowed, unreadable } from "@/lib/engagement/refusal";
import { type Actor, may } from "@/lib/engagement/roles";
import { type EngagementState, STATES } from "@/lib/engagement/states";
import { engagementBody } from "./engagement-body";
import { readQuery } from "./read-input";

/**
 * Every engagement that matches, by dwell. Coordinators see those about which their
 * authority has a notice. Without `from` and `to` all of them: no paging surprise.
 */
export async function listEngagements(
  actor: Actor,
  query: unknown,
  nowMs: number,
): Promise<{ engagements: EngagementBody[] }> {
  const noticedAuthorityId = scopeOf(actor);
  const filter = readQuery(engagementQuery, query);
  const views = await findEngagements(database(), {
    stationId: filter.station,
    fragmentId: filter.fragment,
    states: filter.state === undefined ? undefined : statesOf(filter.state),
    fromMs: filter.from === undefined ? undefined : Date.parse(filter.from),
    toMs: filter.to === undefined ? undefined : Date.parse(filter.to),
    noticedAuthorityId,
  });
  return { engagements: views.map((view) => engagementBody(view, nowMs)) };
}

/** Undefined for those who read the whole book, the authority for coordinators; else 403. */
export function scopeOf(actor: Actor): string | undefined {
  if (may(actor, "read book")) return undefined;
  if (may(actor, "see own notices") && actor.authorityId !== null) return actor.authorityId;
  throw notAllowed("read the book");
}

function statesOf(text: string): EngagementState[] {
  return text.split(",").map((word) => {
    const state = STATES.find((known) => known === word.trim());
    if (state !== undefined) return state;
    const message = `“${word}” is not a state; states are ${STATES.join(", ")}.`;
    throw unreadable("The query does not have the expected form.", [{ path: "state", message }]);
  });
}
