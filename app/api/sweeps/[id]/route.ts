import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { readSweep } from "@/lib/services/sweep-progress";

/** One sweep: how far it is, and what could not be worked out. */
export const GET = handle(({ actor, params }) => readSweep(actor, pathId(params, "sweep")));
