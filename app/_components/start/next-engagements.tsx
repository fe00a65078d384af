import Link from "next/link";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { EngagementBody } from "@/lib/contracts/engagements";
import { InTime } from "./in-time";

/** The engagements to come as lines, the nearest first. */
export function NextEngagements(props: {
  readonly engagements: readonly EngagementBody[];
  readonly nowMs: number;
}) {
  return (
    <ol className="max-w-4xl border-y border-line">
      {props.engagements.map((e) => (
        <li
          key={e.id}
          className="flex min-h-12 flex-wrap items-center gap-x-5 gap-y-1 border-b md:grid md:grid-cols-[5rem_7rem_minmax(0,1fr)_15rem_8rem] border-line py-2 last:border-0"
        >
          <Link prefetch={false} href={`/engagements/${e.id}`} className="link font-bold text-ink">
            E-{e.number}
          </Link>
          <span>
            <StateMark state={e.state} />
          </span>
          <span>
            {e.fragmentName} over {e.stationName}
          </span>
          <span className="figures text-[0.875rem]">
            <UtcTime at={e.from} show="short" />,{" "}
            {durationText((Date.parse(e.to) - Date.parse(e.from)) / 1000)}
          </span>
          <span className="text-quiet">
            <InTime atMs={Date.parse(e.from)} nowMs={props.nowMs} />
          </span>
        </li>
      ))}
    </ol>
  );
}
