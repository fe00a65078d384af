import Link from "next/link";
import { notFound } from "next/navigation";
import { Facts } from "@/app/_components/facts";
import { Figure, Figures } from "@/app/_components/figure";
import { HoursBar, hoursText } from "@/app/_components/hours-bar";
import { PageHeader } from "@/app/_components/page-header";
import { Section } from "@/app/_components/section";
import { UtcTime } from "@/app/_components/utc-time";
import { coordinateText, numberText } from "@/app/_format/figures";
import { requirePerson } from "@/app/_server/require-person";
import { identifierText } from "@/lib/contracts/common";
import type { StationBody } from "@/lib/contracts/stations";
import { readStation } from "@/lib/services/list-stations";
import { ElevationFan } from "./elevation-fan";
import { LaserSection } from "./laser-section";
import { stationLimits } from "./station-limits";

export const metadata = { title: "Station" };

export default async function StationPage({ params }: { readonly params: Promise<{ id: string }> }) {
  const person = await requirePerson("read book");
  const { id } = await params;
  const nowMs = Date.now();
  const station = identifierText.safeParse(id).success ? await readStation(person, id, nowMs) : null;
  if (!station) notFound();
  return (
    <>
      <PageHeader title={station.name} aside={`settings, version ${station.version}`}>
        <StationFigures station={station} nowMs={nowMs} />
      </PageHeader>
      <div className="grid items-start gap-5 lg:grid-cols-2">
        <Section
          title="Limits"
          intro="Every pass over this station is cut by them. Source: the station’s own settings."
        >
          <div className="mb-5 grid items-end gap-x-8 gap-y-4 sm:grid-cols-2">
            <ElevationFan
              minElevationDeg={station.minElevationDeg}
              maxElevationDeg={station.maxElevationDeg}
            />
            <div>
              <p className="mb-1">
                Hours: <span className="figures">{hoursText(station.openingHours)}</span>
              </p>
              <HoursBar hours={station.openingHours} nowMs={nowMs} />
            </div>
          </div>
          <Facts facts={stationLimits(station)} />
        </Section>
        <div className="grid min-w-0 gap-5">
          <LaserSection lasers={station.lasers} />
          <Concerned station={station} />
        </div>
      </div>
    </>
  );
}

function StationFigures({ station, nowMs }: { readonly station: StationBody; readonly nowMs: number }) {
  return (
    <div className="mt-3 text-ink">
      <Figures label={`Figures of ${station.name}`}>
        <Figure value={coordinateText(station.latitudeDeg, "latitude", 4)} label="latitude" note="WGS-84" />
        <Figure
          value={coordinateText(station.longitudeDeg, "longitude", 4)}
          label="longitude"
          note="WGS-84"
        />
        <Figure value={numberText(station.altitudeM)} unit="m" label="height" note="above the ellipsoid" />
        <Figure value={numberText(station.passesAhead)} label="passes ahead" note="from the last sweep" />
        <Figure value={numberText(station.liveEngagements)} label="live engagements" note="from the book" />
      </Figures>
      <p className="mt-3">
        <UtcTime at={nowMs} zone={station.timeZone} />
      </p>
      <p className="mt-1 flex gap-5">
        <Link prefetch={false} className="act" href={`/passes?station=${station.id}`}>
          Passes of this station
        </Link>
        <Link prefetch={false} className="act" href={`/calendar?station=${station.id}`}>
          Calendar of this station
        </Link>
      </p>
    </div>
  );
}

function Concerned({ station }: { readonly station: StationBody }) {
  return (
    <Section
      title="Asked about every engagement"
      intro="Air units are asked too where the beam crosses their airspace."
    >
      {station.authorities.length === 0 ? (
        <p className="text-quiet">No authority is set down for this station.</p>
      ) : (
        <ul>
          {station.authorities.map((authority) => (
            <li key={authority.id}>
              <Link prefetch={false} href={`/authorities#${authority.id}`} className="act">
                {authority.name}
              </Link>{" "}
              <span className="text-quiet">{authority.kind}</span>
            </li>
          ))}
        </ul>
      )}
    </Section>
  );
}
