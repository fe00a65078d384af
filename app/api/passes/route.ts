import { handle } from "@/app/_server/handle";
import { searchPasses } from "@/lib/services/search-passes";

/** `?station=&fragment=&from=&to=`: every pass that matches, by rise; the coming week unless told. */
export const GET = handle(({ request, actor, nowMs }) =>
  searchPasses(actor, Object.fromEntries(new URL(request.url).searchParams), nowMs),
);
