import type { NearObjectBody } from "@/lib/contracts/pass-surroundings";

const WIDTH = 220;
const HEIGHT = 56;

interface SeparationPlotProps {
  readonly object: NearObjectBody;
  /** Rise and set of the pass: all plots have the same time axis. */
  readonly from: string;
  readonly to: string;
  readonly withinDeg: number;
}

/**
 * An object's angle from the beam over the pass, nought below, with the angle that is kept free as a line.
 * The numbers stand in the row beside it, so screen readers pass it over.
 */
export function SeparationPlot({ object, from, to, withinDeg }: SeparationPlotProps) {
  const keepDeg = object.halfAngleDeg + object.addedDeg;
  const topDeg = Math.max(withinDeg, keepDeg);
  const y = (deg: number): number => HEIGHT - (HEIGHT * Math.min(deg, topDeg)) / topDeg;
  const [fromMs, toMs] = [Date.parse(from), Date.parse(to)];
  const x = (at: string): number => (WIDTH * (Date.parse(at) - fromMs)) / (toMs - fromMs);
  const curve = object.samples
    .map((s, i) => `${i ? "L" : "M"}${x(s.at).toFixed(1)} ${y(s.separationDeg).toFixed(1)}`)
    .join(" ");
  return (
    <svg viewBox={`-1 -3 ${WIDTH + 2} ${HEIGHT + 6}`} aria-hidden="true" className="h-auto w-full max-w-64">
      <rect
        x={0}
        y={y(keepDeg)}
        width={WIDTH}
        height={HEIGHT - y(keepDeg)}
        fill="var(--harm)"
        fillOpacity={0.35}
      />
      <path d={`M0 ${y(keepDeg)}H${WIDTH}`} stroke="var(--shut)" strokeWidth={1.2} strokeDasharray="4 3" />
      <path d={`M0 0V${HEIGHT}H${WIDTH}`} fill="none" stroke="var(--quiet)" strokeWidth={0.8} />
      <path d={curve} fill="none" stroke="var(--ink)" strokeWidth={1.6} strokeLinejoin="round" />
    </svg>
  );
}
