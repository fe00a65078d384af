import { handlePublic } from "@/app/_server/handle";
import { notFound } from "@/lib/engagement/refusal";
import { calendarFeed } from "@/lib/services/calendar-feed";

/** `/api/calendar/<secret>.ics`: a person's subscription calendar, without a sign-in. */
export const GET = handlePublic(async ({ params, nowMs }) => {
  const secret = /^([\w-]{43})\.ics$/.exec(params.file ?? "")?.[1];
  if (secret === undefined) throw notFound("calendar");
  const headers = { "content-type": "text/calendar; charset=utf-8" };
  return new Response(await calendarFeed(secret, nowMs), { headers });
});
