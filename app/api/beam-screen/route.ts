import { handle, readJson } from "@/app/_server/handle";
import { requestBeamScreen } from "@/lib/services/calculate-request";

const LIMIT_BYTES = 10 * 1024 * 1024;

/** When protected objects stand near a beam, without the book. */
export const POST = handle(({ request, actor }) =>
  requestBeamScreen(actor, () => readJson(request, LIMIT_BYTES)),
);
