import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { engagementSheet } from "@/lib/services/engagement-sheet";
import { moveEngagement } from "@/lib/services/move-engagement";

/** Everything about one engagement, and what the caller may do with it now. */
export const GET = handle(({ params, actor, nowMs }) =>
  engagementSheet(actor, pathId(params, "engagement"), nowMs),
);

/** `{from, to, version}`: moves it. */
export const PATCH = handle(({ request, params, actor, nowMs }) =>
  moveEngagement(actor, pathId(params, "engagement"), () => readJson(request), nowMs),
);
