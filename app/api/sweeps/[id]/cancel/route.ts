import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { cancelSweep } from "@/lib/services/cancel-sweep";

/** Ends a running sweep; what was worked out stays. */
export const POST = handle(({ actor, params, nowMs }) => cancelSweep(actor, pathId(params, "sweep"), nowMs));
