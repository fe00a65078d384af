import { handlePublic } from "@/app/_server/handle";
import { openByLink } from "@/lib/services/answer-by-link";

/** Sent by the page's script once somebody has it open: opened is not answered. */
export const POST = handlePublic(async ({ params, nowMs }) => {
  await openByLink(params.token ?? "", nowMs);
  return new Response(null, { status: 204 });
});
