import Link from "next/link";
import { EmptyState } from "@/app/_components/empty-state";
import { Figure, Figures } from "@/app/_components/figure";
import { HoursBar, hoursText } from "@/app/_components/hours-bar";
import { PageHeader } from "@/app/_components/page-header";
import { UtcTime } from "@/app/_components/utc-time";
import { coordinateText, numberText } from "@/app/_format/figures";
import { zoneTime } from "@/app/_format/utc";
import { requirePerson } from "@/app/_server/require-person";
import type { StationBody } from "@/lib/contracts/stations";
import { listStations } from "@/lib/services/list-stations";

export const metadata = { title: "Stations" };

export default async function StationsPage() {
  const person = await requirePerson("read book");
  const nowMs = Date.now();
  const { stations } = await listStations(person, nowMs);
  return (
    <>
      <PageHeader title="Stations" aside={`${stations.length} sites`}>
        Each site with its limits and the laser setting that plans are made with. Passes are cut by these
        limits.
      </PageHeader>
      {stations.length === 0 ? <EmptyState title="No station has been set up" /> : null}
      <ul className="grid gap-5 xl:grid-cols-2">
        {stations.map((station) => (
          <li key={station.id} className="min-w-0">
            <StationCard station={station} nowMs={nowMs} />
          </li>
        ))}
      </ul>
    </>
  );
}

function StationCard({ station, nowMs }: { readonly station: StationBody; readonly nowMs: number }) {
  const laser = station.lasers.find((setting) => setting.active);
  return (
    <article className="sheet h-full p-4 sm:p-5">
      <h2 className="text-lg font-bold">
        <Link prefetch={false} href={`/stations/${station.id}`} className="link text-ink">
          {station.name}
        </Link>{" "}
        <span className="figures text-[0.8125rem] font-normal text-quiet">
          {coordinateText(station.latitudeDeg, "latitude")}{" "}
          {coordinateText(station.longitudeDeg, "longitude")}, {numberText(station.altitudeM)} m,{" "}
          {zoneTime(nowMs, station.timeZone)} local
        </span>
      </h2>
      <div className="my-4">
        <Figures label={`Figures of ${station.name}`}>
          <Figure
            value={`${numberText(station.minElevationDeg)} – ${numberText(station.maxElevationDeg)}`}
            unit="°"
            label="elevation"
            note="station setting"
          />
          <Figure
            value={`${station.minDwellS} – ${station.maxDwellS}`}
            unit="s"
            label="dwell"
            note="station setting: shortest and longest"
          />
          <Figure value={numberText(station.passesAhead)} label="passes ahead" note="from the last sweep" />
          <Figure value={numberText(station.liveEngagements)} label="live engagements" note="from the book" />
        </Figures>
      </div>
      <div className="grid gap-x-8 gap-y-3 sm:grid-cols-2">
        <div>
          <p className="mb-1">
            Hours: <span className="figures">{hoursText(station.openingHours)}</span>
          </p>
          <HoursBar hours={station.openingHours} nowMs={nowMs} />
        </div>
        <div className="text-quiet">
          <p>
            {laser ? `Laser setting: ${laser.name}` : "No laser setting is active: nothing can be planned."}
          </p>
          <p>
            Next pass:{" "}
            {station.nextPassAt ? (
              <UtcTime at={station.nextPassAt} />
            ) : (
              "none in the coming week, or not swept yet"
            )}
          </p>
        </div>
      </div>
    </article>
  );
}
