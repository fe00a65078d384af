import { coordinateText, numberText } from "@/app/_format/figures";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { GroundBody } from "@/lib/contracts/pass-surroundings";
import type { PassSheetBody } from "@/lib/contracts/passes";
import { drawGlobe, GLOBE_SIZE, type Place } from "./globe";

/** Where the fragment goes over the Earth, on an offline coastline. Drawn on the server. */
export function GroundTrack({ sheet }: { readonly sheet: PassSheetBody }) {
  const { ground } = sheet;
  if (!ground) return <p className="text-quiet">No ground track: the element set gives no state here.</p>;
  const pass = { from: sheet.riseAt, to: sheet.setAt };
  const globe = drawGlobe(ground, sheet.stationId, pass, sheet.booked ?? sheet.dwell);
  const own = globe.stations.find(({ id }) => id === sheet.stationId);
  const others = globe.stations.filter(({ id }) => id !== sheet.stationId);
  return (
    <figure>
      <svg
        viewBox={`0 0 ${GLOBE_SIZE} ${GLOBE_SIZE}`}
        role="img"
        aria-label={nameOf(sheet, ground)}
        className="h-auto w-full max-w-[30rem]"
      >
        <path d={globe.sphere} fill="var(--paper)" />
        <path d={globe.land} fill="var(--line)" />
        <path d={globe.night} fill="var(--ink)" fillOpacity={0.1} />
        <path d={globe.graticule} fill="none" stroke="var(--line)" strokeWidth={0.6} />
        {others.map((station) => (
          <g key={station.id}>
            <path d={station.footprint} fill="none" stroke="var(--quiet)" strokeDasharray="2 3" />
            <StationMark place={station.place} name={station.name} />
          </g>
        ))}
        {own ? (
          <path d={own.footprint} fill="var(--accent)" fillOpacity={0.14} stroke="var(--accent)" />
        ) : null}
        {[globe.before, globe.after].map((d, i) => (
          <path
            key={i ? "after" : "before"}
            d={d}
            fill="none"
            stroke="var(--ink)"
            strokeWidth={1.2}
            strokeDasharray="5 3"
          />
        ))}
        <path d={globe.pass} fill="none" stroke="var(--ink)" strokeWidth={2} />
        <path d={globe.dwell} fill="none" stroke="var(--dwell)" strokeWidth={5} />
        {own ? <StationMark place={own.place} name={own.name} /> : null}
        <TimeMark place={globe.rise} word={`rise ${utcTimeOfDay(Date.parse(sheet.riseAt))}`} />
        <TimeMark place={globe.set} word={`set ${utcTimeOfDay(Date.parse(sheet.setAt))}`} />
        <path d={globe.sphere} fill="none" stroke="var(--quiet)" strokeWidth={0.8} />
      </svg>
      <figcaption className="mt-2 max-w-[70ch] text-[0.8125rem] text-quiet">
        The Earth from above {sheet.stationName}, north up. Solid: the fragment's ground track from rise to
        set; dashed: a quarter of an orbit before and after. Thick: the dwell. Circles: where the fragment, at
        its {numberText(ground.heightKm)} km height at culmination, stands above a station's elevation floor (
        {sheet.stationName}: {numberText(sheet.station.minElevationDeg)}°, a radius of{" "}
        {numberText(radiusKm(ground, sheet.stationId))} km on the ground). Shaded: night at culmination.
        Coastline: Natural Earth.
      </figcaption>
    </figure>
  );
}

const KM_PER_DEG = 111.2;

/** Radius of a station's circle along the ground, to the nearest 10 km: it is drawn on a round Earth. */
function radiusKm(ground: GroundBody, stationId: string): number {
  const station = ground.stations.find(({ id }) => id === stationId);
  return 10 * Math.round(((station?.footprintDeg ?? Number.NaN) * KM_PER_DEG) / 10);
}

function StationMark({ place, name }: { readonly place: Place; readonly name: string }) {
  return (
    <g>
      <rect x={place.x - 2.6} y={place.y - 2.6} width={5.2} height={5.2} fill="var(--accent)" />
      <Label place={place} word={name} dy={11} />
    </g>
  );
}

function TimeMark({ place, word }: { readonly place: Place | null; readonly word: string }) {
  if (!place) return null;
  return (
    <g>
      <circle cx={place.x} cy={place.y} r={3} fill="var(--ink)" />
      <Label place={place} word={word} dy={-6} />
    </g>
  );
}

function Label({ place, word, dy }: { readonly place: Place; readonly word: string; readonly dy: number }) {
  const toLeft = place.x > GLOBE_SIZE / 2;
  return (
    <text
      x={place.x + (toLeft ? -6 : 6)}
      y={place.y + dy}
      textAnchor={toLeft ? "end" : "start"}
      fontSize={10}
      fill="var(--ink)"
      stroke="var(--sheet)"
      strokeWidth={2.5}
      paintOrder="stroke"
    >
      {word}
    </text>
  );
}

function nameOf(sheet: PassSheetBody, ground: GroundBody): string {
  const placeAt = (at: string): string => {
    const point = ground.points.find((p) => p.at === at);
    if (!point) return "an unknown place";
    const { latitudeDeg, longitudeDeg } = point;
    return `${coordinateText(latitudeDeg, "latitude", 1)} ${coordinateText(longitudeDeg, "longitude", 1)}`;
  };
  return `Ground track of ${sheet.fragmentName} around ${sheet.stationName}: over ${placeAt(sheet.riseAt)} at rise, ${placeAt(sheet.culminateAt)} at culmination, ${placeAt(sheet.setAt)} at set`;
}
