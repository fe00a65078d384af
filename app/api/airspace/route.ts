import { handle } from "@/app/_server/handle";
import { listAirspace } from "@/lib/services/list-airspace";

/** Every airspace volume with its hours ahead. */
export const GET = handle(({ actor, nowMs }) => listAirspace(actor, nowMs));
