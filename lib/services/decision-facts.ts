import type { Queryable } from "@/db/client";
import { attestationsInForce, confirmationsInForce } from "@/db/queries/engagement-records";
import { askedAuthorities } from "@/db/queries/notices";
import { type DecisionFacts, plainFacts } from "@/lib/engagement/facts";
import type { Actor } from "@/lib/engagement/roles";
import type { Judgement } from "./judge-dwell";

/** What is known of an engagement's coordination, apart from the rules. */
export async function coordinationFacts(
  q: Queryable,
  actor: Actor,
  engagementId: string,
): Promise<DecisionFacts> {
  const asked = await askedAuthorities(q, engagementId);
  const names = await confirmationsInForce(q, engagementId);
  const words = await attestationsInForce(q, engagementId);
  const missing = asked.filter(({ answer }) => answer === null);
  const deadlines = missing.flatMap(({ notice }) => (notice.answerBy ? [notice.answerBy.getTime()] : []));
  return {
    ...plainFacts(actor),
    attested: words.map(({ attestation }) => attestation.rule),
    confirmedBy: names.map(({ confirmation }) => confirmation.personId),
    changeDeadlines: asked.map(({ authority }) => ({
      authority: authority.name,
      minutes: authority.changeDeadlineMin,
    })),
    earliestAnswerByMs: deadlines.length > 0 ? Math.min(...deadlines) : null,
  };
}

/**
 * The same facts with what the rules say of the dwell. Beside the rule about answers,
 * each concerned authority's answer is looked for here: no answer is ever taken as given.
 */
export async function judgedFacts(
  q: Queryable,
  actor: Actor,
  engagementId: string,
  judgement: Judgement,
): Promise<DecisionFacts> {
  const facts = await coordinationFacts(q, actor, engagementId);
  const asked = await askedAuthorities(q, engagementId);
  const content = asked.filter(({ answer }) => answer !== null && answer.outcome !== "objection");
  const answered = new Set(content.map(({ authority }) => authority.id));
  return {
    ...facts,
    closed: closedWords(judgement),
    pending: [...new Set(judgement.pending.map(({ cause }) => cause))],
    notChecked: judgement.notChecked.map(({ rule, cause, overridable }) => ({
      rule,
      cause,
      attestable: overridable,
    })),
    unanswered: judgement.concerned
      .filter(({ authorityId }) => !answered.has(authorityId))
      .map(({ name }) => name),
  };
}

/** Everything that forbids a dwell, in words: closed time, broken limits, an effect that can't be worked out. */
export function closedWords(judgement: Judgement): string[] {
  const effect =
    judgement.effect === null ? [judgement.effectRefusal ?? "No effect could be worked out."] : [];
  const causes = judgement.closed.map(({ cause }) => cause);
  return [...new Set([...causes, ...judgement.limits.map(({ message }) => message), ...effect])];
}
