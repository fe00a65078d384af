import Link from "next/link";
import type { Column } from "@/app/_components/data-table";
import { heightText } from "@/app/_components/pass-list/change-cell";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { EngagementBody } from "@/lib/contracts/engagements";

/** The columns of every list of engagements. */
export const ENGAGEMENT_COLUMNS: readonly Column<EngagementBody>[] = [
  {
    head: "Engagement",
    lead: true,
    cell: (e) => (
      <Link href={`/engagements/${e.id}`} className="link font-bold text-ink">
        E-{e.number}
      </Link>
    ),
  },
  {
    head: "State",
    cell: (e) => (
      <>
        <StateMark state={e.state} />
        {e.overdue ? <span className="block text-[0.8125rem] text-dwell">firing record overdue</span> : null}
      </>
    ),
  },
  { head: "Fragment", cell: (e) => e.fragmentName },
  { head: "Station", cell: (e) => e.stationName },
  { head: "Dwell from", figure: true, cell: (e) => <UtcTime at={e.from} show="short" /> },
  {
    head: "Length",
    figure: true,
    cell: (e) => (
      <span className="whitespace-nowrap">
        {durationText((Date.parse(e.to) - Date.parse(e.from)) / 1000)}
      </span>
    ),
  },
  {
    head: "Change of orbit",
    figure: true,
    cell: (e) => <span className="whitespace-nowrap">{heightText(-e.semiMajorAxisDropM)}</span>,
  },
  { head: "Booked by", cell: (e) => e.planner },
  {
    head: "Why it ended",
    cell: (e) => (e.endReason ? <span className="block max-w-64">{e.endReason}</span> : null),
  },
];
