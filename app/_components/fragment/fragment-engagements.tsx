import Link from "next/link";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { FragmentSheetBody } from "@/lib/contracts/fragments";
import { type EngagementState, STATES } from "@/lib/engagement/states";

/** The engagements of a fragment as lines. */
export function FragmentEngagements({ engagements }: Pick<FragmentSheetBody, "engagements">) {
  if (engagements.length === 0) return <p>Nothing has been booked on this fragment yet.</p>;
  return (
    <ul>
      {engagements.map((e) => {
        const state = STATES.find((s): s is EngagementState => s === e.state);
        return (
          <li
            key={e.id}
            className="flex min-h-11 flex-wrap items-center gap-x-5 gap-y-1 border-b border-line py-1.5 last:border-0"
          >
            <Link prefetch={false} href={`/engagements/${e.id}`} className="link font-bold text-ink">
              E-{e.number}
            </Link>
            {state ? <StateMark state={state} /> : null}
            <span>{e.stationName}</span>
            <span className="figures">
              <UtcTime at={e.from} />, {durationText((Date.parse(e.to) - Date.parse(e.from)) / 1000)}
            </span>
          </li>
        );
      })}
    </ul>
  );
}
