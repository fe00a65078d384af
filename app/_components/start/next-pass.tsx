import Link from "next/link";
import { ButtonLink } from "@/app/_components/button";
import { heightText } from "@/app/_components/pass-list/change-cell";
import { StripOfPass } from "@/app/_components/pass-strip/strip-of-pass";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText } from "@/app/_format/figures";
import type { PassBody } from "@/lib/contracts/passes";

/** The next pass with a dwell that may be proposed: its strip, what it would do, and the way to it. */
export function NextPass({ pass, mayPropose }: { readonly pass: PassBody; readonly mayPropose: boolean }) {
  const { dwell } = pass;
  if (!dwell) return null;
  const seconds = (Date.parse(dwell.to) - Date.parse(dwell.from)) / 1000;
  const [least, most] = dwell.perigeeDropBandM;
  return (
    <div>
      <p className="max-w-[65ch] text-base">
        <Link prefetch={false} href={`/passes/${pass.id}`} className="link font-bold text-ink">
          {pass.fragmentName}
        </Link>{" "}
        rises over {pass.stationName} at <UtcTime at={pass.riseAt} />. Its best dwell, {durationText(seconds)}{" "}
        from <UtcTime at={dwell.from} show="time" />, would change the perigee by{" "}
        <strong className="figures">{heightText(-dwell.perigeeDropM)}</strong> (median; in eight cases of ten
        between {heightText(-most)} and {heightText(-least)}) and the semi-major axis by{" "}
        <strong className="figures">{heightText(-dwell.semiMajorAxisDropM)}</strong>.
      </p>
      <div className="sheet my-5 w-fit max-w-full p-3">
        <StripOfPass pass={pass} size="medium" />
      </div>
      <div className="flex flex-wrap gap-3">
        <ButtonLink prefetch={false} look="solid" href={`/passes/${pass.id}`}>
          {mayPropose ? "Look at it and propose" : "Look at it"}
        </ButtonLink>
        <ButtonLink prefetch={false} href="/passes">
          All passes
        </ButtonLink>
      </div>
    </div>
  );
}
