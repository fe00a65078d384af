"use client";

import { DataTable } from "@/app/_components/data-table";
import { ENGAGEMENT_COLUMNS } from "@/app/_components/engagement/engagement-columns";
import { HeightChange } from "@/app/_components/pass-list/change-cell";
import { StripOfPass } from "@/app/_components/pass-strip/strip-of-pass";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { type OfferEntry, offerName } from "./entries";

interface EntryListProps {
  readonly engagements: readonly EngagementBody[];
  readonly offers: readonly OfferEntry[];
  readonly onPick: (offer: OfferEntry) => void;
}

/** The calendar's entries as two tables: the way in for a keyboard and for small screens. */
export function EntryList({ engagements, offers, onPick }: EntryListProps) {
  return (
    <div className="grid gap-6">
      {engagements.length > 0 ? (
        <DataTable
          caption="Engagements"
          captionShown
          columns={ENGAGEMENT_COLUMNS}
          rows={engagements}
          keyOf={(e) => e.id}
        />
      ) : (
        <p className="text-quiet">No engagement in this span.</p>
      )}
      {offers.length > 0 ? (
        <DataTable
          caption="Passes that can be booked"
          captionShown
          rows={offers}
          keyOf={(o) => o.pass.id}
          columns={[
            { head: "Fragment", lead: true, cell: (o) => <b>{o.pass.fragmentName}</b> },
            { head: "Station", cell: (o) => o.pass.stationName },
            {
              head: "Dwell from",
              figure: true,
              cell: (o) => <UtcTime at={o.pass.dwell?.from ?? o.opening.from} show="short" />,
            },
            { head: "Length", figure: true, cell: (o) => lengthOf(o) },
            { head: "Pass", cell: (o) => <StripOfPass pass={o.pass} size="small" /> },
            {
              head: "Orbit drops by",
              cell: (o) =>
                o.pass.dwell ? (
                  <HeightChange
                    dropM={o.pass.dwell.semiMajorAxisDropM}
                    bandM={o.pass.dwell.semiMajorAxisDropBandM}
                  />
                ) : null,
            },
            {
              head: "",
              cell: (o) => (
                <button
                  type="button"
                  className="act min-h-9"
                  aria-label={offerName(o)}
                  onClick={() => onPick(o)}
                >
                  Book
                </button>
              ),
            },
          ]}
        />
      ) : (
        <p className="text-quiet">No pass in this span can be booked.</p>
      )}
    </div>
  );
}

function lengthOf({ pass }: OfferEntry) {
  if (!pass.dwell) return null;
  const seconds = (Date.parse(pass.dwell.to) - Date.parse(pass.dwell.from)) / 1000;
  return <span className="whitespace-nowrap">{durationText(seconds)}</span>;
}
