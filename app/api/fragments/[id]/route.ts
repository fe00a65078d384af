import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { fragmentSheet } from "@/lib/services/fragment-sheet";

/** One fragment with its orbit, element sets and engagements. */
export const GET = handle(({ params, actor, nowMs }) =>
  fragmentSheet(actor, pathId(params, "fragment"), nowMs),
);
