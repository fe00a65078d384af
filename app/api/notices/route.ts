import { handle } from "@/app/_server/handle";
import { listNotices } from "@/lib/services/list-notices";

/** `?engagement=`: notices with the answers in force; a coordinator's own authority's only. */
export const GET = handle(({ request, actor }) =>
  listNotices(actor, Object.fromEntries(new URL(request.url).searchParams)),
);
