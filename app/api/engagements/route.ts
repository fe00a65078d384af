import { handle, readJson } from "@/app/_server/handle";
import { bookEngagement } from "@/lib/services/book-engagement";
import { listEngagements } from "@/lib/services/list-engagements";

/** `?station=&fragment=&state=&from=&to=`: every engagement that matches, by dwell. */
export const GET = handle(({ request, actor, nowMs }) =>
  listEngagements(actor, Object.fromEntries(new URL(request.url).searchParams), nowMs),
);

/** `{passId, from, to}`: books a dwell. */
export const POST = handle(async ({ request, actor, nowMs }) =>
  Response.json(await bookEngagement(actor, () => readJson(request), nowMs), { status: 201 }),
);
