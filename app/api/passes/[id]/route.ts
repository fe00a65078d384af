import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { passSheet } from "@/lib/services/pass-sheet";

/** The pass sheet: samples, closures, openings, dwell and what they rest on. */
export const GET = handle(({ params, actor, nowMs }) => passSheet(actor, pathId(params, "pass"), nowMs));
