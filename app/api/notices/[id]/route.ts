import { handle } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { noticeSheet } from "@/lib/services/list-notices";

/** One notice with its words as they were sent. */
export const GET = handle(({ params, actor }) => noticeSheet(actor, pathId(params, "notice")));
