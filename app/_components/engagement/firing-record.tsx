import { Facts } from "@/app/_components/facts";
import { UtcTime } from "@/app/_components/utc-time";
import { numberText, scaled } from "@/app/_format/figures";
import type { EngagementSheetBody } from "@/lib/contracts/engagements";
import { utcWords } from "./read-utc";

type Firing = NonNullable<EngagementSheetBody["firing"]>;

/** What was fired, as the operator recorded it. */
export function FiringRecord({ firing }: { readonly firing: Firing }) {
  const energy = scaled(firing.deliveredEnergyJ, "J");
  const time = (at: string | null) => (at ? utcWords(Date.parse(at), true) : "it stayed closed");
  return (
    <div className="max-w-3xl">
      <Facts
        facts={[
          { label: "Outcome", value: firing.outcome },
          { label: "Shutter opened", value: time(firing.openedAt), figure: true },
          { label: "Shutter closed", value: time(firing.closedAt), figure: true },
          { label: "Pulses", value: numberText(firing.pulses), figure: true },
          {
            label: "Laser energy sent",
            note: "pulses times pulse energy of the laser setting",
            value: `${energy.value}\u202f${energy.unit}`,
            figure: true,
          },
          ...firing.interruptions.map((i, index) => ({
            label: `Interruption ${index + 1}: ${i.cause}`,
            note: `at ${utcWords(Date.parse(i.at), true)}`,
            value: `${numberText(i.secondsLost, Number.isInteger(i.secondsLost) ? 0 : 1)}\u202fs lost`,
            figure: true,
          })),
        ]}
      />
      {firing.note ? <p className="mt-3">Note: {firing.note}</p> : null}
      <p className="mt-3 text-quiet">
        Recorded by {firing.recordedBy}, <UtcTime at={firing.recordedAt} />
      </p>
    </div>
  );
}
