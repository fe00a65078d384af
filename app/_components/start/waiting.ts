import type { EngagementBody } from "@/lib/contracts/engagements";

export interface WaitingLine {
  readonly text: string;
  readonly href: string;
}

/** What waits in the book, most pressing first, in sentences that lead there. */
export function waitingLines(
  engagements: readonly EngagementBody[],
  fragmentsAwaitingSets: number,
): WaitingLine[] {
  const count = (state: EngagementBody["state"]): number =>
    engagements.filter((e) => e.state === state && !e.overdue).length;
  const overdue = engagements.filter((e) => e.overdue).length;
  const proposed = count("proposed");
  const cleared = count("cleared");
  const lines: (WaitingLine | null)[] = [
    line(overdue, "firing record is missing", "firing records are missing", "confirmed", {
      when: "past",
    }),
    line(cleared, "engagement is cleared and waits", "engagements are cleared and wait", "cleared", {
      rest: " for two people to confirm",
    }),
    line(proposed, "engagement is proposed and waits", "engagements are proposed and wait", "proposed", {
      rest: " for answers",
    }),
    fragmentsAwaitingSets > 0
      ? {
          text: `${fragmentsAwaitingSets} ${fragmentsAwaitingSets === 1 ? "fragment was" : "fragments were"} fired upon and ${fragmentsAwaitingSets === 1 ? "waits" : "wait"} for a newer element set.`,
          href: "/fragments",
        }
      : null,
  ];
  return lines.filter((l) => l !== null);
}

function line(
  n: number,
  one: string,
  many: string,
  state: string,
  more: { readonly rest?: string; readonly when?: string } = {},
): WaitingLine | null {
  if (n === 0) return null;
  const query = new URLSearchParams(more.when ? { state, when: more.when } : { state });
  return { text: `${n} ${n === 1 ? one : many}${more.rest ?? ""}.`, href: `/engagements?${query}` };
}
