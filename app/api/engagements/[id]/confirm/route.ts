import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { confirmEngagement } from "@/lib/services/confirm-engagement";
import { engagementSheet } from "@/lib/services/engagement-sheet";

/** `{checklist, attestations?}`: gives one of the two names that a confirmation needs; answers with both. */
export const POST = handle(async ({ request, params, actor, nowMs }) => {
  const id = pathId(params, "engagement");
  await confirmEngagement(actor, id, () => readJson(request), nowMs);
  return engagementSheet(actor, id, nowMs);
});
