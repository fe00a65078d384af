import { handle, readJson } from "@/app/_server/handle";
import { pathId } from "@/app/_server/path-id";
import { answerNotice } from "@/lib/services/answer-notice";

/** `{outcome, conditions?, reasons?}`: the answer of the caller's own authority. */
export const POST = handle(({ request, params, actor, nowMs }) =>
  answerNotice(actor, pathId(params, "notice"), () => readJson(request), nowMs),
);
