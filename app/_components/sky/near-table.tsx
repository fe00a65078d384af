import { type Column, DataTable } from "@/app/_components/data-table";
import { numberText } from "@/app/_format/figures";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { NearObjectBody, PassSkyBody } from "@/lib/contracts/pass-surroundings";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { SeparationPlot } from "./separation-plot";

/** The protected objects near the beam: least separation, what is kept, and the separation over time. */
export function NearTable({ sky, sheet }: { readonly sky: PassSkyBody; readonly sheet: PassSheetBody }) {
  if (!sky.screenedAt) {
    return <p>Not checked: this pass has not been screened against the protected objects yet.</p>;
  }
  return (
    <div className="grid gap-3">
      {sky.near.length > 0 ? (
        <DataTable
          caption="Protected objects near the beam"
          columns={columnsFor(sky, sheet)}
          rows={sky.near}
          keyOf={(object) => `${object.name}-${object.from}`}
        />
      ) : (
        <p>No protected object comes within {sky.withinDeg}° of the beam.</p>
      )}
      <p className="max-w-[80ch] text-[0.8125rem] text-quiet">
        Seen from the station, at any distance, from the element sets of the screening at{" "}
        {utcTimeOfDay(Date.parse(sky.screenedAt))}. Plots: angle from the beam, 0 to {sky.withinDeg}°, from
        rise to set; the beam is closed while the curve is under the dashed line, and for the timing guard
        around that.
        {sky.nearCount > sky.near.length ? ` The ${sky.near.length} most pressing of ${sky.nearCount}.` : ""}
        {sky.unseen.length > 0
          ? ` Not checked, for want of a usable element set: ${listOf(sky.unseen)}.`
          : ""}
      </p>
    </div>
  );
}

function columnsFor(sky: PassSkyBody, sheet: PassSheetBody): readonly Column<NearObjectBody>[] {
  return [
    { head: "Object", lead: true, cell: (o) => <span className="whitespace-nowrap">{o.name}</span> },
    { head: "Class", cell: (o) => o.class },
    {
      head: "Nearest",
      figure: true,
      cell: (o) => `${numberText(o.minSeparationDeg, 2)}° at ${utcTimeOfDay(Date.parse(o.minSeparationAt))}`,
    },
    {
      head: "Kept free",
      figure: true,
      cell: (o) => `${numberText(o.halfAngleDeg, 2)}° + ${numberText(o.addedDeg, 2)}°`,
    },
    {
      head: "Verdict",
      cell: (o) => (o.minSeparationDeg < o.halfAngleDeg + o.addedDeg ? "closes the beam" : "stays clear"),
    },
    {
      head: "Angle from the beam",
      cell: (o) => (
        <SeparationPlot object={o} from={sheet.riseAt} to={sheet.setAt} withinDeg={sky.withinDeg} />
      ),
    },
  ];
}

/** At most six names, then how many more. */
function listOf(names: readonly string[]): string {
  const shown = names.slice(0, 6).join(", ");
  return names.length > 6 ? `${shown} and ${names.length - 6} more` : shown;
}
