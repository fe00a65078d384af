interface ElevationFanProps {
  readonly minElevationDeg: number;
  readonly maxElevationDeg: number;
}

const RADIUS = 100;
const CENTRE = { x: 116, y: 118 };

/** A cut through the sky over the station: the two sectors in which the beam may point. */
export function ElevationFan({ minElevationDeg, maxElevationDeg }: ElevationFanProps) {
  const words = `The beam may point between ${minElevationDeg}° and ${maxElevationDeg}° of elevation.`;
  return (
    <svg viewBox="0 0 232 134" className="block h-auto w-full max-w-72" role="img" aria-label={words}>
      {[1, -1].map((side) => (
        <path
          key={side}
          d={sector(minElevationDeg, maxElevationDeg, side)}
          fill="var(--worth)"
          opacity="0.75"
        />
      ))}
      <path
        d={`M${CENTRE.x - RADIUS} ${CENTRE.y} A${RADIUS} ${RADIUS} 0 0 1 ${CENTRE.x + RADIUS} ${CENTRE.y}`}
        fill="none"
        stroke="var(--ink)"
        strokeWidth="1.6"
      />
      <line x1="4" x2="228" y1={CENTRE.y} y2={CENTRE.y} stroke="var(--ink)" />
      <Label elevationDeg={minElevationDeg} />
      <Label elevationDeg={maxElevationDeg} />
      <circle cx={CENTRE.x} cy={CENTRE.y} r="3.5" fill="var(--dwell)" />
    </svg>
  );
}

function Label({ elevationDeg }: { readonly elevationDeg: number }) {
  const at = point(elevationDeg, 1, RADIUS + 5);
  return (
    <text x={at.x} y={at.y} textAnchor="start" className="figures fill-quiet text-[10px]">
      {elevationDeg}°
    </text>
  );
}

function sector(lowDeg: number, highDeg: number, side: number): string {
  const [low, high] = [point(lowDeg, side, RADIUS), point(highDeg, side, RADIUS)];
  const sweep = side === 1 ? 0 : 1;
  return `M${CENTRE.x} ${CENTRE.y} L${low.x} ${low.y} A${RADIUS} ${RADIUS} 0 0 ${sweep} ${high.x} ${high.y} Z`;
}

/** Rounded, so that server and browser write the same digits. */
function point(elevationDeg: number, side: number, radius: number) {
  const angle = (elevationDeg * Math.PI) / 180;
  const round = (value: number) => Math.round(value * 10) / 10;
  return {
    x: round(CENTRE.x + side * radius * Math.cos(angle)),
    y: round(CENTRE.y - radius * Math.sin(angle)),
  };
}
