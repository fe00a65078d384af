import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { previewDwell } from "@/lib/services/preview-dwell";

/** What booking a dwell of this pass would meet, and what it would do: nothing is booked. */
export const GET = handle(({ request, params, actor, nowMs }) =>
  previewDwell(actor, pathId(params, "pass"), Object.fromEntries(new URL(request.url).searchParams), nowMs),
);
