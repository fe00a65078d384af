import { heightText } from "@/app/_components/pass-list/change-cell";
import type { EngagementBody } from "@/lib/contracts/engagements";
import type { OpeningBody, PassBody } from "@/lib/contracts/passes";

/** Passes drawn beside the engagements: the most worthwhile, or all of a chosen fragment. */
export const PASSES_SHOWN = 30;

/** A pass that can be booked, drawn over the opening that its dwell lies in. */
export interface OfferEntry {
  readonly pass: PassBody;
  readonly opening: OpeningBody;
}

/** The passes worth drawing: bookable, best first, as many as a week's grid can bear; then by time. */
export function offersOf(passes: readonly PassBody[], wholeFragment: boolean): OfferEntry[] {
  const bookable = passes.flatMap((pass): OfferEntry[] => {
    const { dwell } = pass;
    if (dwell === null || pass.engagementId !== null) return [];
    const opening = pass.openings.find((o) => o.from <= dwell.from && dwell.to <= o.to);
    return [{ pass, opening: opening ?? { from: dwell.from, to: dwell.to, pending: [] } }];
  });
  const gain = (entry: OfferEntry): number => entry.pass.dwell?.semiMajorAxisDropM ?? 0;
  const best = bookable.sort((a, b) => gain(b) - gain(a));
  return (wholeFragment ? best : best.slice(0, PASSES_SHOWN)).sort((a, b) =>
    a.opening.from.localeCompare(b.opening.from),
  );
}

/** What the entry of a bookable pass says: fragment and what its dwell does. */
export function offerTitle({ pass }: OfferEntry): string {
  return `${pass.fragmentName} ${heightText(-(pass.dwell?.semiMajorAxisDropM ?? 0))}`;
}

/** A bookable pass in a sentence, for those who don't see the grid. */
export function offerName({ pass, opening }: OfferEntry): string {
  return `Book ${pass.fragmentName} over ${pass.stationName}, open from ${opening.from.slice(11, 19)}Z to ${opening.to.slice(11, 19)}Z, orbit ${heightText(-(pass.dwell?.semiMajorAxisDropM ?? 0))}`;
}

/** The same in the grid, beginning with the words that the entry shows. */
export function offerEntryName(entry: OfferEntry): string {
  const { pass, opening } = entry;
  return `${offerTitle(entry)} ${pass.stationName}, open from ${opening.from.slice(11, 19)}Z to ${opening.to.slice(11, 19)}Z: book`;
}

/** An engagement in a sentence, beginning with the words that its entry shows. */
export function engagementName(e: EngagementBody): string {
  return `E-${e.number} ${e.state} ${e.from.slice(11, 19)}Z ${e.fragmentName} over ${e.stationName}, until ${e.to.slice(11, 19)}Z on ${e.from.slice(0, 10)}`;
}

/** Only the planner who booked it moves an engagement; in the calendar while it is proposed. */
export function mayDrag(e: EngagementBody, personId: string): boolean {
  return e.state === "proposed" && e.plannerId === personId;
}
