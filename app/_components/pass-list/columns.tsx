import Link from "next/link";
import type { Column } from "@/app/_components/data-table";
import { StripOfPass } from "@/app/_components/pass-strip/strip-of-pass";
import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText, numberText } from "@/app/_format/figures";
import type { PassBody } from "@/lib/contracts/passes";
import { type EngagementState, STATES } from "@/lib/engagement/states";
import { HeightChange } from "./change-cell";

/** The columns of every list of passes. */
export const PASS_COLUMNS: readonly Column<PassBody>[] = [
  {
    head: "Fragment",
    lead: true,
    cell: (p) => (
      <Link prefetch={false} href={`/passes/${p.id}`} className="link font-bold text-ink">
        {p.fragmentName}
      </Link>
    ),
  },
  { head: "Station", cell: (p) => p.stationName },
  { head: "Rise", figure: true, cell: (p) => <UtcTime at={p.riseAt} show="short" /> },
  {
    head: "Length",
    figure: true,
    cell: (p) => (
      <span className="whitespace-nowrap">
        {durationText((Date.parse(p.setAt) - Date.parse(p.riseAt)) / 1000)}
      </span>
    ),
  },
  { head: "Highest", figure: true, cell: (p) => `${numberText(p.maxElevationDeg)}°` },
  {
    head: "Pass",
    cell: (p) => (
      // In line, so that the row's words stand beside the strip's middle and not at its foot.
      <span className="inline-block align-middle">
        <StripOfPass pass={p} size="small" />
      </span>
    ),
  },
  {
    head: "Semi-major axis",
    cell: (p) =>
      p.dwell ? (
        <HeightChange dropM={p.dwell.semiMajorAxisDropM} bandM={p.dwell.semiMajorAxisDropBandM} />
      ) : (
        <NoDwell pass={p} />
      ),
  },
  {
    head: "Perigee",
    cell: (p) =>
      p.dwell ? <HeightChange dropM={p.dwell.perigeeDropM} bandM={p.dwell.perigeeDropBandM} /> : null,
  },
  { head: "State", cell: (p) => <PassState pass={p} /> },
];

/** Why nothing is offered, in the words of the rules. */
export function NoDwell({ pass }: { readonly pass: PassBody }) {
  if (pass.engagementId) return <span className="text-quiet">booked</span>;
  return (
    <span className="block max-w-56 text-[0.8125rem] text-quiet">{pass.noDwellReason ?? "no dwell"}</span>
  );
}

/** The state of the engagement that holds the pass, or what the rules make of it. */
export function PassState({ pass }: { readonly pass: PassBody }) {
  const state = STATES.find((s): s is EngagementState => s === pass.engagementState);
  if (pass.engagementId && state) {
    return (
      <Link prefetch={false} href={`/engagements/${pass.engagementId}`} className="inline-block">
        <StateMark state={state} />
      </Link>
    );
  }
  if (!pass.dwell) return <StateMark state="closed" />;
  const pending = pass.closures.some((c) => c.verdict === "pending");
  return <StateMark state={pending ? "pending" : "open"} />;
}
