import type { StoredEffect } from "@/db/schema/engagements";
import { type Reason, refused } from "@/lib/engagement/refusal";
import type { Effect } from "@/lib/planning/effect";
import type { Judgement } from "./judge-dwell";

/** The predicted effect to be kept; throws 422 with every reason against the dwell. */
export function acceptedEffect(
  judgement: Judgement,
  aim: string,
  more: readonly Reason[] = [],
): StoredEffect {
  const reasons = [...more, ...reasonsAgainst(judgement)];
  if (reasons.length > 0 || judgement.effect === null) {
    throw refused(`The rules do not allow this dwell: ${reasons.map((r) => r.message).join(" ")}`, reasons);
  }
  return storedEffect(judgement.effect, aim);
}

/** Every closed reason, broken limit and missing figure, each once. */
export function reasonsAgainst(judgement: Judgement): Reason[] {
  const effect = judgement.effectRefusal ?? "No effect could be worked out.";
  const reasons: Reason[] = [
    ...judgement.closed.map(({ rule, cause }) => ({ path: rule, message: cause })),
    ...judgement.limits,
    ...(judgement.effect === null ? [{ path: "effect", message: effect }] : []),
  ];
  return [...new Map(reasons.map((reason) => [`${reason.path}\n${reason.message}`, reason])).values()];
}

/** The part of an effect that is kept with the engagement. */
export function storedEffect(effect: Effect, aim: string): StoredEffect {
  const { pulses, energyJ, deltaV, semiMajorAxisBeforeKm, semiMajorAxisAfterKm } = effect;
  const { perigeeBeforeKm, perigeeAfterKm } = effect;
  return {
    aim,
    pulses,
    energyJ,
    deltaV,
    semiMajorAxisBeforeKm,
    semiMajorAxisAfterKm,
    perigeeBeforeKm,
    perigeeAfterKm,
  };
}
