import { StateMark } from "@/app/_components/state-mark";
import { UtcTime } from "@/app/_components/utc-time";
import { numberText } from "@/app/_format/figures";
import type { AirspaceVolumeBody } from "@/lib/contracts/airspace";
import type { StationBody } from "@/lib/contracts/stations";
import { RingPicture } from "./ring-picture";

interface VolumeCardProps {
  readonly volume: AirspaceVolumeBody;
  readonly stations: readonly StationBody[];
}

const SPANS_SHOWN = 6;

/** One volume: outline, limits as published and as used, hours, and what lifts it. */
export function VolumeCard({ volume, stations }: VolumeCardProps) {
  return (
    <article className="sheet p-4 sm:p-5">
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
        <h2 className="text-lg font-bold">
          {volume.name}{" "}
          <span className="text-[0.9375rem] font-normal text-quiet">version {volume.version}</span>
        </h2>
        <Now volume={volume} />
      </div>
      <div className="mt-3 grid gap-x-6 gap-y-4 sm:grid-cols-[13rem_minmax(0,1fr)]">
        <RingPicture volume={volume} stations={stations} />
        <div className="min-w-0">
          <p className="figures font-semibold">
            {volume.floorText} to {volume.ceilingText}
          </p>
          <p className="text-[0.8125rem] text-quiet">
            in the geometry {numberText(volume.floorM)} to {numberText(volume.ceilingM)} m above the ellipsoid
          </p>
          <Hours volume={volume} />
          <p className="mt-3">
            {volume.liftable && volume.authorityName
              ? `Pending until ${volume.authorityName} answers “no objection”.`
              : "Closed while it is active: no answer lifts it."}
          </p>
          <p className="mt-2 text-[0.8125rem] text-quiet">
            {volume.stations.length > 0
              ? `Within reach of the beam from ${volume.stations.map((station) => station.name).join(", ")}.`
              : "Out of reach of every station’s beam."}{" "}
            Source: {volume.source}.
          </p>
        </div>
      </div>
    </article>
  );
}

function Now({ volume }: { readonly volume: AirspaceVolumeBody }) {
  if (!volume.hoursKnown) return <StateMark state="not checked" />;
  if (!volume.activeNow) return <StateMark state="open" />;
  return <StateMark state={volume.liftable ? "pending" : "closed"} />;
}

function Hours({ volume }: { readonly volume: AirspaceVolumeBody }) {
  if (!volume.hoursKnown) {
    return <p className="mt-3">Nobody has told its hours: it reads “not checked” throughout.</p>;
  }
  const more = volume.activeSpans.length - SPANS_SHOWN;
  return (
    <>
      <h3 className="mt-3 font-semibold">Active</h3>
      {volume.activeSpans.length === 0 ? <p>not again before the end of the known schedule</p> : null}
      <ul>
        {volume.activeSpans.slice(0, SPANS_SHOWN).map((span) => (
          <li key={span.from}>
            <UtcTime at={span.from} show="short" /> to{" "}
            <UtcTime at={span.to} show={span.to.slice(0, 10) === span.from.slice(0, 10) ? "time" : "short"} />
          </li>
        ))}
      </ul>
      {more > 0 ? <p className="text-quiet">and {more} more</p> : null}
      <p className="text-[0.8125rem] text-quiet">
        schedule known until <UtcTime at={volume.scheduleKnownUntil} />
      </p>
    </>
  );
}
