import { handle } from "@/app/_server/handle";
import { endCalendarLink, renewCalendarLink } from "@/lib/services/calendar-link";

/** Makes a new secret calendar address for the caller; it is shown this once. */
export const POST = handle(async ({ actor }) =>
  Response.json(await renewCalendarLink(actor), { status: 201 }),
);

/** Ends the caller's calendar address. */
export const DELETE = handle(async ({ actor }) => {
  await endCalendarLink(actor);
  return new Response(null, { status: 204 });
});
