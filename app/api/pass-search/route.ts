import { handle, readJson } from "@/app/_server/handle";
import { requestPassSearch } from "@/lib/services/calculate-request";

const LIMIT_BYTES = 10 * 1024 * 1024;

/** Passes of many objects over one station, without the book. */
export const POST = handle(({ request, actor }) =>
  requestPassSearch(actor, () => readJson(request, LIMIT_BYTES)),
);
