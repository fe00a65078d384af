import { handle } from "@/app/_server/handle";
import { listFragments } from "@/lib/services/list-fragments";

/** Every fragment with its newest element set and what lies ahead. */
export const GET = handle(({ actor, nowMs }) => listFragments(actor, nowMs));
