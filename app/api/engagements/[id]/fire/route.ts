import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { recordFiring } from "@/lib/services/record-firing";

/** `{outcome, openedAt?, closedAt?, pulses?, interruptions?, note?}`: records what was fired. */
export const POST = handle(({ request, params, actor, nowMs }) =>
  recordFiring(actor, pathId(params, "engagement"), () => readJson(request), nowMs),
);
