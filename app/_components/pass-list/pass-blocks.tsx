import Link from "next/link";
import { StripOfPass } from "@/app/_components/pass-strip/strip-of-pass";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText, numberText } from "@/app/_format/figures";
import type { PassBody } from "@/lib/contracts/passes";
import { HeightChange } from "./change-cell";
import { NoDwell, PassState } from "./columns";

/** Passes as blocks for narrow screens: name and state, when, the strip, the two changes side by side. */
export function PassBlocks(props: {
  readonly passes: readonly PassBody[];
  /** Inside another sheet they have no edge of their own. */
  readonly bare: boolean;
  readonly className: string;
}) {
  return (
    <ul className={`${props.bare ? "" : "sheet px-4"} ${props.className}`}>
      {props.passes.map((p) => (
        <li key={p.id} className="border-b border-line py-3 last:border-0">
          <div className="flex flex-wrap items-center justify-between gap-2">
            <span>
              <Link prefetch={false} href={`/passes/${p.id}`} className="link font-bold text-ink">
                {p.fragmentName}
              </Link>{" "}
              over {p.stationName}
            </span>
            <PassState pass={p} />
          </div>
          <p className="text-[0.875rem] text-quiet">
            <UtcTime at={p.riseAt} show="short" />,{" "}
            {durationText((Date.parse(p.setAt) - Date.parse(p.riseAt)) / 1000)}, up to{" "}
            {numberText(p.maxElevationDeg)}°
          </p>
          <div className="mt-2">
            <StripOfPass pass={p} size="medium" />
          </div>
          {p.dwell ? (
            <dl className="mt-1 flex flex-wrap gap-x-6 gap-y-1">
              <Change
                label="Semi-major axis"
                dropM={p.dwell.semiMajorAxisDropM}
                bandM={p.dwell.semiMajorAxisDropBandM}
              />
              <Change label="Perigee" dropM={p.dwell.perigeeDropM} bandM={p.dwell.perigeeDropBandM} />
            </dl>
          ) : (
            <NoDwell pass={p} />
          )}
        </li>
      ))}
    </ul>
  );
}

function Change(props: {
  readonly label: string;
  readonly dropM: number;
  readonly bandM: readonly [number, number];
}) {
  return (
    <div>
      <dt className="text-[0.8125rem] text-quiet">{props.label}</dt>
      <dd>
        <HeightChange dropM={props.dropM} bandM={props.bandM} />
      </dd>
    </div>
  );
}
