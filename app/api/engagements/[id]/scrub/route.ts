import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { scrubEngagement } from "@/lib/services/scrub-engagement";

/** `{reason}`: gives it up, and tells everybody. */
export const POST = handle(({ request, params, actor, nowMs }) =>
  scrubEngagement(actor, pathId(params, "engagement"), () => readJson(request), nowMs),
);
