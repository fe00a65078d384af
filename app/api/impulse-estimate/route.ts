import { handle, readJson } from "@/app/_server/handle";
import { requestImpulseEstimate } from "@/lib/services/calculate-request";

const LIMIT_BYTES = 10 * 1024 * 1024;

/** What a laser does to a fragment's orbit, without the book. */
export const POST = handle(({ request, actor }) =>
  requestImpulseEstimate(actor, () => readJson(request, LIMIT_BYTES)),
);
