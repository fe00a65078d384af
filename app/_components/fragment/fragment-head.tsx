import { Figure, Figures } from "@/app/_components/figure";
import { PageHeader } from "@/app/_components/page-header";
import { durationText, numberText, significantText } from "@/app/_format/figures";
import type { FragmentSheetBody } from "@/lib/contracts/fragments";

const KEPLER = "from the mean motion by Kepler's law, above the equatorial radius";

/** What is known of a fragment: its orbit by the newest element set, its body by estimate. */
export function FragmentHead({ sheet }: { readonly sheet: FragmentSheetBody }) {
  const { orbit } = sheet;
  const number = sheet.catalogNumber ?? sheet.localNumber;
  return (
    <div>
      <PageHeader title={sheet.name} aside={number === null ? undefined : `number ${number}`}>
        {sheet.newestSet
          ? `Newest element set ${durationText(sheet.newestSet.ageH * 3600)} old, from ${sheet.newestSet.source}.`
          : "No element set yet: nothing can be planned."}
        {sheet.awaitsNewElements
          ? " It was fired upon since: its later passes wait for a newer element set."
          : ""}
      </PageHeader>
      <div className="grid gap-5">
        {orbit ? (
          <Figures label="Orbit">
            <Figure value={numberText(orbit.perigeeKm, 1)} unit="km" label="perigee height" note={KEPLER} />
            <Figure value={numberText(orbit.apogeeKm, 1)} unit="km" label="apogee height" note={KEPLER} />
            <Figure
              value={numberText(orbit.inclinationDeg, 2)}
              unit="°"
              label="inclination"
              note="newest element set"
            />
            <Figure
              value={numberText(orbit.eccentricity, 5)}
              label="eccentricity"
              note="newest element set"
            />
            <Figure
              value={numberText(orbit.periodMin, 2)}
              unit="min"
              label="period"
              note="newest element set"
            />
          </Figures>
        ) : null}
        <Figures label="Body">
          <Figure
            value={significantText(sheet.massKg, 2)}
            unit="kg"
            label="mass"
            note={sheet.bodySource}
            size="small"
          />
          <Figure
            value={significantText(sheet.areaM2, 2)}
            unit="m²"
            label="area"
            note={sheet.bodySource}
            size="small"
          />
          <Figure
            value={significantText(sheet.massKg / sheet.areaM2, 2)}
            unit="kg/m²"
            label="mass per area"
            note={sheet.bodySource}
            size="small"
          />
          <Figure value={sheet.material} label="material" note={sheet.bodySource} size="small" />
          <Figure value={sheet.shape.replace("-", " ")} label="shape" note={sheet.bodySource} size="small" />
        </Figures>
        <p className="text-[0.875rem] text-quiet">Body figures: {sheet.bodySource}.</p>
      </div>
    </div>
  );
}
