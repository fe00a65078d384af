import type { AirspaceVolumeBody } from "@/lib/contracts/airspace";
import type { StationBody } from "@/lib/contracts/stations";
import { fitRing } from "./fit-ring";

interface RingPictureProps {
  readonly volume: AirspaceVolumeBody;
  readonly stations: readonly StationBody[];
}

const SIZE = 208;
/** A strip of its own under the picture, so that no station hides the scale. */
const SCALE_HEIGHT = 24;

/** The outline seen from above, north up, with the stations near it and a scale. */
export function RingPicture({ volume, stations }: RingPictureProps) {
  const near = stations.filter((station) => volume.stations.some(({ id }) => id === station.id));
  const fit = fitRing(
    volume.ring,
    near.map((station) => [station.longitudeDeg, station.latitudeDeg]),
    SIZE,
  );
  return (
    <svg
      viewBox={`0 0 ${SIZE} ${SIZE + SCALE_HEIGHT}`}
      className="block h-auto w-full max-w-52 border border-line bg-paper"
      role="img"
      aria-label={`Outline of ${volume.name}, north up${near.length > 0 ? `, with ${near.map((s) => s.name).join(", ")}` : ""}`}
    >
      <polygon
        points={fit.ring.map(([x, y]) => `${x},${y}`).join(" ")}
        fill="var(--harm)"
        fillOpacity="0.45"
        stroke="var(--ink)"
        strokeWidth="1.5"
      />
      {near.map((station, index) => {
        const [x, y] = fit.points[index] ?? [0, 0];
        return (
          <g key={station.id}>
            <circle cx={x} cy={y} r="4" fill="var(--dwell)" />
            <text
              x={x > SIZE / 2 ? x - 7 : x + 7}
              y={y + 3.5}
              textAnchor={x > SIZE / 2 ? "end" : "start"}
              className="fill-ink stroke-paper text-[11px] [paint-order:stroke] [stroke-width:3px]"
            >
              {station.name}
            </text>
          </g>
        );
      })}
      <path d={`M10 ${SIZE + SCALE_HEIGHT - 8}h${fit.scalePx}`} stroke="var(--ink)" strokeWidth="2" />
      <text x="10" y={SIZE + SCALE_HEIGHT - 13} className="figures fill-quiet text-[10px]">
        {fit.scaleKm} km
      </text>
    </svg>
  );
}
