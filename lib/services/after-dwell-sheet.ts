import { database } from "@/db/client";
import { approachesOf, engagementById, screeningOf } from "@/db/queries/after-dwell";
import type { EngagementRow } from "@/db/queries/engagements";
import { hasNotice } from "@/db/queries/notices";
import { config } from "@/lib/config";
import type { AfterApproachBody, AfterDwellBody } from "@/lib/contracts/after-dwell";
import { notFound } from "@/lib/engagement/refusal";
import type { Actor } from "@/lib/engagement/roles";
import { scopeOf } from "./list-engagements";
import { AFTER_DAYS } from "./screen-after-dwell";

const DAY_MS = 86_400_000;

const ASSUMPTIONS = [
  "Nudged: the median effect of the whole dwell, carried on by an element set fitted to the state at its end. Untouched: the element set as it is. Both by SGP4.",
  "Element sets carry no covariance. Assumed as one standard deviation: 1 km along the track at epoch and 1 km a day more (common practice), a tenth of that across it (our setting).",
  "For the nudged fragment the band of the semi-major axis (P10 to P90) is added, growing along the track by Kepler's third law; it soon outweighs the rest.",
  "Radii: the disc of the fragment's area, 5 m for a protected object (our setting), 55 m for a crewed one (half of 109 m, from memory).",
  "2-D collision probability after Foster and Estes 1992, and Alfano 2005: as good as the covariance assumed.",
] as const;

/** What is known about the days after a dwell. Coordinators read it where their authority has a notice. */
export async function afterDwellSheet(actor: Actor, id: string): Promise<AfterDwellBody> {
  const authorityId = scopeOf(actor);
  const q = database();
  const engagement = await engagementById(q, id);
  const hidden = authorityId !== undefined && !(await hasNotice(q, id, authorityId));
  if (!engagement || hidden) throw notFound("engagement");
  const screening = await screeningOf(q, id);
  if (!screening) return waiting(engagement);
  const { state, reason, fromAt, toAt, thresholdKm, checked, total, unseen, updatedAt } = screening;
  // A moved dwell, or a newer element set, is screened anew; until then the old figures are not shown.
  if (
    fromAt.getTime() !== engagement.dwellTo.getTime() ||
    screening.elementSetId !== engagement.elementSetId
  ) {
    return waiting(engagement);
  }
  const rows = await approachesOf(q, screening.id);
  return {
    state: state === "done" || state === "refused" ? state : "running",
    reason,
    from: fromAt.toISOString(),
    to: toAt.toISOString(),
    thresholdKm,
    checked,
    total,
    unseen,
    updatedAt: updatedAt.toISOString(),
    approaches: rows.map(
      ({ approach, name, class: kind }): AfterApproachBody => ({
        path: approach.path === "nudged" ? "nudged" : "untouched",
        name,
        class: kind,
        at: approach.at.toISOString(),
        missKm: approach.missKm,
        relativeSpeedKmPerS: approach.relativeSpeedKmPerS,
        probability: approach.probability,
        atEdge: approach.atEdge,
      }),
    ),
    assumptions: ASSUMPTIONS,
  };
}

function waiting(engagement: EngagementRow): AfterDwellBody {
  const fromMs = engagement.dwellTo.getTime();
  return {
    state: "waiting",
    reason: null,
    from: new Date(fromMs).toISOString(),
    to: new Date(fromMs + AFTER_DAYS * DAY_MS).toISOString(),
    thresholdKm: config().DWELLBOOK_CLOSE_APPROACH_KM,
    checked: 0,
    total: 0,
    unseen: [],
    updatedAt: null,
    approaches: [],
    assumptions: ASSUMPTIONS,
  };
}
