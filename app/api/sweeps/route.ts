import { handle, readJson } from "@/app/_server/handle";
import { requestSweep } from "@/lib/services/request-sweep";
import { listSweeps } from "@/lib/services/sweep-progress";

/** The newest sweeps with their progress. */
export const GET = handle(({ actor }) => listSweeps(actor));

/** Starts a sweep of all fragments, or of those named. */
export const POST = handle(async ({ request, actor, nowMs }) =>
  Response.json(await requestSweep(actor, () => readJson(request), nowMs), { status: 201 }),
);
