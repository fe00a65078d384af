import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { afterDwellSheet } from "@/lib/services/after-dwell-sheet";

/** Protected objects that the fragment comes near in the days after the dwell: advice. */
export const GET = handle(({ params, actor }) => afterDwellSheet(actor, pathId(params, "engagement")));
