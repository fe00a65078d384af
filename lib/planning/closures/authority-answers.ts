import type { Closure } from "../closure";
import { answerOf, type Concerned, concernedBy } from "../concerned";
import { type Interval, intersect, subtract } from "../interval";
import type { AnswerFacts, PassFacts } from "../pass-facts";
import type { PassGeometry } from "../pass-geometry";
import { spanWords, timeWords } from "../words";
import type { Rule } from "./rule";

/**
 * Every concerned authority must be asked in time and say no objection. Without an engagement nobody has
 * been asked: what is too near for a lead time is closed, the rest pending.
 */
export const authorityAnswers: Rule = (pass, facts) =>
  concernedBy(pass, facts, facts.dwell).flatMap((concerned) => {
    const answer = answerOf(facts.own, concerned.authority.id);
    if (answer && facts.own) return answered(concerned, answer, facts.own.dwell);
    return [...tooLate(concerned, pass, facts), ...awaited(concerned, facts)];
  });

function common(concerned: Concerned): Pick<Closure, "rule" | "input" | "overridable"> {
  const { authority } = concerned;
  const input = `authority ${authority.name}, version ${authority.version}`;
  return { rule: "authority answers", input, overridable: false };
}

/** An answer is about the dwell that was asked for; for other seconds the authority must be asked again. */
function answered(concerned: Concerned, answer: AnswerFacts, dwell: Interval): Closure[] {
  const { name } = concerned.authority;
  const elsewhere = concerned.spans.flatMap((span) => subtract(span, [dwell]));
  const again = elsewhere.map(
    (span): Closure => ({
      ...span,
      ...common(concerned),
      verdict: "pending",
      cause: `${name} has answered for another dwell and must be asked again.`,
      label: `answer of ${name}`,
      liftedBy: `no objection from ${name}`,
    }),
  );
  return answer.outcome === "objection" ? [...objected(concerned, answer, dwell), ...again] : again;
}

function objected(concerned: Concerned, answer: AnswerFacts, dwell: Interval): Closure[] {
  const { name } = concerned.authority;
  const reasons = answer.reasons ? `: ${answer.reasons}` : ".";
  const within = concerned.spans.map((span) => intersect(span, dwell)).filter((span) => span !== null);
  return within.map((span) => ({
    ...span,
    ...common(concerned),
    verdict: "closed",
    cause: `${name} objects${reasons}`,
    label: `${name} objects`,
    input: `answer of ${timeWords(answer.answeredMs)}`,
    liftedBy: `a new answer from ${name}`,
  }));
}

function awaited(concerned: Concerned, facts: PassFacts): Closure[] {
  const { authority, because } = concerned;
  const asked = facts.own?.requestedOf.has(authority.id) ?? false;
  const cause = asked
    ? `${authority.name} has been asked and has not answered (${because}).`
    : `${authority.name} must be asked: ${because}.`;
  return concerned.spans.map((span) => ({
    ...span,
    ...common(concerned),
    verdict: "pending",
    cause,
    label: `answer of ${authority.name}`,
    liftedBy: `no objection from ${authority.name}`,
  }));
}

/** The lead time counts back from the start of the dwell; as long as there is none, from each second. */
function tooLate(concerned: Concerned, pass: PassGeometry, facts: PassFacts): Closure[] {
  const { authority } = concerned;
  if (facts.own?.requestedOf.has(authority.id)) return [];
  const earliestMs = facts.nowMs + authority.leadTimeMin * 60_000;
  const lead = spanWords(authority.leadTimeMin * 60_000);
  const cause = `It is too late to ask ${authority.name}: the request must go out ${lead} before the dwell, and a dwell can begin at ${timeWords(earliestMs)} at the earliest.`;
  return lateSpans(concerned, earliestMs, facts.dwell?.fromMs ?? pass.riseMs).map((span) => ({
    ...span,
    ...common(concerned),
    verdict: "closed",
    cause,
    label: `too late for ${authority.name}`,
    liftedBy: `a shorter lead time of ${authority.name}, or a later pass`,
  }));
}

/**
 * Where an authority is always asked, every second before the earliest start is closed. A volume's
 * authority is asked about a stretch of the beam, so a dwell that began earlier reaches its stretch too
 * late: the stretch is closed as a whole unless the earliest possible start keeps the lead time.
 */
function lateSpans(concerned: Concerned, earliestMs: number, startMs: number): Interval[] {
  if (startMs >= earliestMs) return [];
  if (!concerned.always) return [...concerned.spans];
  const late = { fromMs: Number.NEGATIVE_INFINITY, toMs: earliestMs };
  return concerned.spans.map((span) => intersect(span, late)).filter((span) => span !== null);
}
