import { handlePublic, readJson } from "@/app/_server/handle";
import { answerByLink, readAnswerPage } from "@/lib/services/answer-by-link";

/** What the page behind the link shows. Changes nothing, however often a scanner asks. */
export const GET = handlePublic(({ params, nowMs }) => readAnswerPage(params.token ?? "", nowMs));

/** `{outcome, name, conditions?, reasons?}`: the answer, without a sign-in. */
export const POST = handlePublic(({ request, params, nowMs }) =>
  answerByLink(params.token ?? "", () => readJson(request), nowMs),
);
