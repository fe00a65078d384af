import { type StripFrame, xOf } from "./geometry";

const clock = (ms: number): string => new Date(ms).toISOString().slice(11, 19);

interface DwellBarProps {
  readonly frame: StripFrame;
  readonly dwell: { readonly fromMs: number; readonly toMs: number };
  /** With its times beside it. */
  readonly written: boolean;
}

/** y of the bar's upper edge and its height: the handles lie over it. */
export function barPlace(frame: StripFrame, written: boolean): { top: number; height: number } {
  return written ? { top: frame.groundY + 8, height: 14 } : { top: frame.groundY + 4, height: 4 };
}

/** The dwell as a solid bar under the ground line. */
export function DwellBar({ frame, dwell, written }: DwellBarProps) {
  const x1 = xOf(frame, dwell.fromMs);
  const x2 = Math.max(x1 + 2, xOf(frame, dwell.toMs));
  const { top, height } = barPlace(frame, written);
  if (!written) return <rect x={x1} y={top} width={x2 - x1} height={height} fill="var(--dwell)" />;
  return (
    <g className="figures" fontSize={13} fontWeight={600} fill="var(--dwell)">
      <rect x={x1} y={top} width={x2 - x1} height={height} />
      {[x1, x2].map((x, i) => (
        <line
          key={i ? "to" : "from"}
          x1={x}
          x2={x}
          y1={frame.groundY}
          y2={top + height + 6}
          stroke="var(--dwell)"
          strokeWidth={2}
        />
      ))}
      <Times frame={frame} dwell={dwell} x1={x1} x2={x2} top={top} />
    </g>
  );
}

/** Beside the bar where there is room, else under it. */
function Times(props: Omit<DwellBarProps, "written"> & { x1: number; x2: number; top: number }) {
  const { frame, dwell, x1, x2, top } = props;
  const under = top + 34;
  if (frame.width < 500) {
    const middle = Math.min(Math.max((x1 + x2) / 2, 76), frame.width - 76);
    return (
      <text x={middle} y={under} textAnchor="middle">
        {clock(dwell.fromMs)}–{clock(dwell.toMs)}Z
      </text>
    );
  }
  const left = x1 > 84;
  const right = frame.width - x2 > 94;
  return (
    <>
      <text x={left ? x1 - 12 : x1} y={left ? top + 12 : under} textAnchor={left ? "end" : "start"}>
        {clock(dwell.fromMs)}
      </text>
      <text x={right ? x2 + 12 : x2} y={right ? top + 12 : under} textAnchor={right ? "start" : "end"}>
        {clock(dwell.toMs)}Z
      </text>
    </>
  );
}
