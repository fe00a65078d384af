import type { EngagementSheetBody } from "@/lib/contracts/engagements";

/** Rules that read "not checked" over the dwell, may be attested, and have nobody's word yet. */
export function toAttest(
  sheet: Pick<EngagementSheetBody, "closures" | "attestations">,
): { readonly rule: string; readonly causes: readonly string[] }[] {
  const given = new Set(sheet.attestations.map(({ rule }) => rule));
  const causes = new Map<string, Set<string>>();
  for (const c of sheet.closures) {
    if (c.verdict !== "not checked" || !c.overridable || given.has(c.rule)) continue;
    causes.set(c.rule, (causes.get(c.rule) ?? new Set()).add(c.cause));
  }
  return [...causes].map(([rule, set]) => ({ rule, causes: [...set] }));
}

type Command = EngagementSheetBody["commands"][number];

/**
 * What stands in the way of a command before its form is filled in. A missing word for a rule
 * that may be attested is given in the form of the confirmation, so it is no reason to keep it shut.
 */
export function refusalsBefore(command: Command, sheet: EngagementSheetBody): readonly string[] {
  if (command.command !== "confirm") return command.refusals;
  const inForm = toAttest(sheet).map(({ rule }) => `Not checked, ${rule}:`);
  return command.refusals.filter((words) => !inForm.some((start) => words.startsWith(start)));
}

/** Answers in force that let it pass under conditions. */
export function conditionsOf(notices: EngagementSheetBody["notices"]) {
  return notices.flatMap((n) =>
    !n.superseded && n.answer?.conditions
      ? [{ id: n.id, authority: n.authorityName, words: n.answer.conditions }]
      : [],
  );
}
