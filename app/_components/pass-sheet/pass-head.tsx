import Link from "next/link";
import { Figure, Figures } from "@/app/_components/figure";
import { PageHeader } from "@/app/_components/page-header";
import { UtcTime } from "@/app/_components/utc-time";
import { durationText, numberText } from "@/app/_format/figures";
import type { PassSheetBody } from "@/lib/contracts/passes";

/** Whose pass it is, when, and how well its orbit is known. */
export function PassHead({ sheet }: { readonly sheet: PassSheetBody }) {
  const { station, elementSet } = sheet;
  return (
    <div>
      <PageHeader
        title={
          <>
            <Link prefetch={false} href={`/fragments/${sheet.fragmentId}`} className="link text-ink">
              {sheet.fragmentName}
            </Link>{" "}
            over{" "}
            <Link prefetch={false} href={`/stations/${station.id}`} className="link text-ink">
              {station.name}
            </Link>
          </>
        }
        aside={<UtcTime at={sheet.riseAt} zone={station.timeZone} />}
      >
        Element set {durationText(sheet.elementSetAgeH * 3600)} old at the pass, along-track error some ±
        {numberText(elementSet.alongTrackKm, 1)} km (common practice: 1 km at epoch and 1 km a day). Laser:{" "}
        {sheet.laser.name}, {sheet.laser.summary}.
        {sheet.underWayAtFrom || sheet.underWayAtTo
          ? " The pass was already under way at the edge of the sweep; its true length may be greater."
          : ""}
      </PageHeader>
      <Figures label="The pass">
        <Figure
          value={<UtcTime at={sheet.riseAt} show="time" />}
          label={`rise, azimuth ${numberText(sheet.riseAzimuthDeg)}°`}
          size="small"
        />
        <Figure
          value={<UtcTime at={sheet.culminateAt} show="time" />}
          label={`culmination, azimuth ${numberText(sheet.culminationAzimuthDeg)}°`}
          size="small"
        />
        <Figure
          value={<UtcTime at={sheet.setAt} show="time" />}
          label={`set, azimuth ${numberText(sheet.setAzimuthDeg)}°`}
          size="small"
        />
        <Figure
          value={`${numberText(sheet.maxElevationDeg, 1)}°`}
          label={`highest, nearest ${numberText(sheet.minRangeKm)} km`}
          size="small"
        />
        <Figure
          value={durationText((Date.parse(sheet.setAt) - Date.parse(sheet.riseAt)) / 1000)}
          label={`above ${numberText(station.minElevationDeg)}°`}
          size="small"
        />
      </Figures>
    </div>
  );
}
