import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { confirmEngagement } from "@/lib/services/confirm-engagement";

/** `{checklist, attestations?}`: gives one of the two names that a confirmation needs. */
export const POST = handle(({ request, params, actor, nowMs }) =>
  confirmEngagement(actor, pathId(params, "engagement"), () => readJson(request), nowMs),
);
