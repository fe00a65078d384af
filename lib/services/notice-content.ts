import type { Queryable } from "@/db/client";
import type { EngagementView } from "@/db/queries/engagements";
import { elementSetsById } from "@/db/queries/facts";
import { config } from "@/lib/config";
import { beamSpan } from "@/lib/notices/beam-span";
import type { BeamSpan, NoticeFacts } from "@/lib/notices/notice-facts";
import { makeSiteFrame } from "@/lib/physics/frames/earth";
import { makeOrbit } from "@/lib/physics/orbit/propagate";
import { elementsOf, siteOf } from "./domain-rows";

/** The figures of a notice that are the same for every authority. */
export type CommonFacts = Pick<
  NoticeFacts,
  | "engagementId"
  | "engagementNumber"
  | "station"
  | "fragment"
  | "laser"
  | "dwellFromMs"
  | "dwellToMs"
  | "beam"
  | "planner"
  | "engagementUrl"
>;

/** Gathers what a notice says of an engagement, the beam's direction worked out from its element set. */
export async function commonFacts(q: Queryable, view: EngagementView): Promise<CommonFacts> {
  const { engagement, station, fragment, laser } = view;
  return {
    engagementId: engagement.id,
    engagementNumber: engagement.number,
    station,
    fragment: { name: fragment.name, number: numberWords(fragment) },
    laser,
    dwellFromMs: engagement.dwellFrom.getTime(),
    dwellToMs: engagement.dwellTo.getTime(),
    beam: await beamOf(q, view),
    planner: { name: view.plannerName, email: view.plannerEmail },
    engagementUrl: new URL(`/engagements/${engagement.id}`, config().DWELLBOOK_BASE_URL).href,
  };
}

function numberWords(fragment: EngagementView["fragment"]): string {
  if (fragment.catalogNumber !== null) return `catalogue number ${fragment.catalogNumber}`;
  return `local number ${fragment.localNumber ?? "unknown"}`;
}

async function beamOf(q: Queryable, view: EngagementView): Promise<BeamSpan | null> {
  const { engagement, station } = view;
  const [set] = await elementSetsById(q, [engagement.elementSetId]);
  const made = set === undefined ? null : makeOrbit(elementsOf(set));
  if (!made?.ok) return null;
  const frame = makeSiteFrame(siteOf(station));
  return beamSpan(made.orbit, frame, engagement.dwellFrom.getTime(), engagement.dwellTo.getTime());
}
