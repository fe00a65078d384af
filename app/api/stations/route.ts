import { handle } from "@/app/_server/handle";
import { listStations } from "@/lib/services/list-stations";

/** Every station with its limits and laser settings. */
export const GET = handle(({ actor, nowMs }) => listStations(actor, nowMs));
