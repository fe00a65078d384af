import Link from "next/link";
import { PageHeader } from "@/app/_components/page-header";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";

/** Number, state, what over where, and the dwell in UTC and at the station. */
export function EngagementHead(props: {
  readonly sheet: EngagementSheetBody;
  readonly zone: string | null;
  readonly readsBook: boolean;
}) {
  const { sheet, zone, readsBook } = props;
  const lengthS = (Date.parse(sheet.to) - Date.parse(sheet.from)) / 1000;
  const local = zone ? { zone } : {};
  return (
    <div>
      <PageHeader
        title={
          <span className="flex flex-wrap items-center gap-x-3 gap-y-1">
            <span>E-{sheet.number}</span>
            <StateMark state={sheet.state} />
            {sheet.overdue ? (
              <span className="text-[0.9375rem] text-dwell">its firing record is overdue</span>
            ) : null}
          </span>
        }
      >
        <p className="text-base text-ink">
          <Named href={readsBook ? `/fragments/${sheet.fragmentId}` : null}>{sheet.fragmentName}</Named> over{" "}
          <Named href={readsBook ? `/stations/${sheet.stationId}` : null}>{sheet.stationName}</Named>, booked
          by {sheet.planner}
        </p>
        {sheet.endReason ? <p className="mt-1 text-ink">Ended: {sheet.endReason}</p> : null}
      </PageHeader>
      <dl className="grid grid-cols-[5rem_1fr] gap-x-4 gap-y-1">
        <dt className="text-quiet">From</dt>
        <dd className="figures font-semibold">
          <UtcTime at={sheet.from} {...local} />
        </dd>
        <dt className="text-quiet">To</dt>
        <dd className="figures font-semibold">
          <UtcTime at={sheet.to} {...local} />
        </dd>
        <dt className="text-quiet">Length</dt>
        <dd className="figures">{durationText(lengthS)}</dd>
        <dt className="text-quiet">Held</dt>
        <dd className="figures text-quiet">
          <UtcTime at={sheet.holdFrom} show="time" /> – <UtcTime at={sheet.holdUntil} show="time" />{" "}
          <span className="font-text text-[0.8125rem]">with slew and cool-down</span>
        </dd>
      </dl>
    </div>
  );
}

function Named({ href, children }: { readonly href: string | null; readonly children: string }) {
  if (href === null) return <strong>{children}</strong>;
  return (
    <Link href={href} className="link text-ink">
      {children}
    </Link>
  );
}
