import type { EngagementView } from "@/db/queries/engagements";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { asState, isOverdue } from "@/lib/engagement/states";

/** An engagement as it goes over the wire. */
export function engagementBody(view: EngagementView, nowMs: number): EngagementBody {
  const { engagement: e, station, fragment } = view;
  const state = asState(e.state);
  return {
    id: e.id,
    number: e.number,
    state,
    version: e.version,
    passId: e.passId,
    stationId: e.stationId,
    stationName: station.name,
    fragmentId: e.fragmentId,
    fragmentName: fragment.name,
    from: e.dwellFrom.toISOString(),
    to: e.dwellTo.toISOString(),
    holdFrom: e.holdFrom.toISOString(),
    holdUntil: e.holdUntil.toISOString(),
    planner: view.plannerName,
    plannerId: e.plannerId,
    endReason: e.endReason,
    overdue: isOverdue(state, e.dwellTo.getTime(), nowMs),
    perigeeDropM: (e.effect.perigeeBeforeKm - e.effect.perigeeAfterKm.p50) * 1000,
    semiMajorAxisDropM: (e.effect.semiMajorAxisBeforeKm - e.effect.semiMajorAxisAfterKm.p50) * 1000,
    createdAt: e.createdAt.toISOString(),
  };
}
