import { useId } from "react";
import { archPath, type StripFrame, worthPath, xOf, yOf } from "./geometry";

export interface StripClosure {
  readonly fromMs: number;
  readonly toMs: number;
  readonly verdict: "closed" | "pending" | "not checked";
  /** Two or three words: "payload QS-88, 1.9°". */
  readonly label: string;
}

export interface StripProps {
  readonly size: "small" | "medium" | "large";
  readonly riseMs: number;
  readonly setMs: number;
  readonly elevationDeg: readonly number[];
  readonly worthPerS: readonly number[];
  readonly closures: readonly StripClosure[];
  readonly dwell: { readonly fromMs: number; readonly toMs: number } | null;
  /** What the picture shows, in one sentence: its accessible name. */
  readonly name: string;
  readonly className?: string;
}

const SIZES = {
  small: { width: 180, height: 42, left: 2, right: 2, groundY: 32, topY: 3, harmDepth: 4 },
  medium: { width: 320, height: 96, left: 4, right: 4, groundY: 72, topY: 6, harmDepth: 9 },
  large: { width: 760, height: 204, left: 4, right: 4, groundY: 142, topY: 26, harmDepth: 14 },
  largeNarrow: { width: 350, height: 190, left: 4, right: 4, groundY: 132, topY: 26, harmDepth: 12 },
} as const;

const HATCH: Record<StripClosure["verdict"], { angle: number; opacity: number; gap: number }> = {
  closed: { angle: 55, opacity: 0.75, gap: 5 },
  pending: { angle: -55, opacity: 0.35, gap: 8 },
  "not checked": { angle: 0, opacity: 0.45, gap: 4 },
};

/**
 * The pass strip: one pass as an arch over its seconds. Amber under the arch is
 * worth, below the ground line harm, hatching a closure, the bar under the
 * ground line the dwell. The large size writes times and causes, and is drawn a
 * second time for narrow screens so that its words keep their size.
 */
export function PassStrip(props: StripProps) {
  if (props.size !== "large") return <StripPicture {...props} layout={props.size} />;
  return (
    <>
      <StripPicture {...props} layout="large" className={`hidden sm:block ${props.className ?? ""}`} />
      <StripPicture {...props} layout="largeNarrow" className={`sm:hidden ${props.className ?? ""}`} />
    </>
  );
}

function StripPicture(props: StripProps & { layout: keyof typeof SIZES }) {
  const hatchId = useId();
  const frame: StripFrame = { ...SIZES[props.layout], fromMs: props.riseMs, toMs: props.setMs };
  const large = props.layout === "large" || props.layout === "largeNarrow";
  return (
    <svg
      viewBox={`0 0 ${frame.width} ${frame.height}`}
      role="img"
      aria-label={props.name}
      className={`block ${large ? "h-auto w-full" : "h-auto max-w-full"} ${props.className ?? ""}`}
      {...(large ? {} : { width: frame.width, height: frame.height })}
    >
      <HatchPatterns id={hatchId} />
      {large ? <ElevationGrid frame={frame} /> : null}
      <path d={worthPath(frame, props.worthPerS, 1)} fill="var(--worth)" opacity={0.75} />
      <path d={worthPath(frame, props.worthPerS, -1)} fill="var(--harm)" opacity={0.8} />
      <path
        d={archPath(frame, props.elevationDeg)}
        fill="none"
        stroke="var(--ink)"
        strokeWidth={large ? 2.2 : 1.6}
        strokeLinejoin="round"
      />
      <Closures frame={frame} closures={props.closures} hatchId={hatchId} written={large} />
      <line
        x1={frame.left}
        x2={frame.width - frame.right}
        y1={frame.groundY}
        y2={frame.groundY}
        stroke="var(--ink)"
      />
      {props.dwell ? <DwellBar frame={frame} dwell={props.dwell} written={large} /> : null}
    </svg>
  );
}

function HatchPatterns({ id }: { id: string }) {
  return (
    <defs>
      {Object.entries(HATCH).map(([verdict, h]) => (
        <pattern
          key={verdict}
          id={`${id}-${verdict.replace(" ", "-")}`}
          width={h.gap}
          height={h.gap}
          patternUnits="userSpaceOnUse"
          patternTransform={`rotate(${h.angle})`}
        >
          <line x1={0} y1={0} x2={0} y2={h.gap} stroke="var(--shut)" strokeWidth={2.2} opacity={h.opacity} />
        </pattern>
      ))}
    </defs>
  );
}

function ElevationGrid({ frame }: { frame: StripFrame }) {
  return [30, 60].map((deg) => (
    <g key={deg}>
      <line
        x1={frame.left}
        x2={frame.width - frame.right}
        y1={yOf(frame, deg)}
        y2={yOf(frame, deg)}
        stroke="var(--line)"
      />
      <text
        x={frame.width - frame.right}
        y={yOf(frame, deg) - 4}
        textAnchor="end"
        fontSize={11}
        fill="var(--quiet)"
        className="font-mono"
      >
        {deg}°
      </text>
    </g>
  ));
}

function Closures(props: {
  frame: StripFrame;
  closures: readonly StripClosure[];
  hatchId: string;
  written: boolean;
}) {
  const { frame } = props;
  let labelEnd = Number.NEGATIVE_INFINITY;
  return props.closures.map((c) => {
    const x1 = xOf(frame, c.fromMs);
    // A crossing of a second would be a hair: it is drawn at least two pixels wide.
    const width = Math.max(2, xOf(frame, c.toMs) - x1);
    const middle = x1 + width / 2;
    const half = c.label.length * 3.1;
    const place = Math.min(Math.max(middle, frame.left + half), frame.width - frame.right - half);
    // A label that would run into its neighbour is left to the list under the picture.
    const shown = props.written && c.verdict === "closed" && place - half > labelEnd + 6;
    if (shown) labelEnd = place + half;
    return (
      <g key={`${c.fromMs}-${c.toMs}-${c.label}`}>
        <title>{c.label}</title>
        {c.verdict === "closed" ? (
          <rect
            x={x1}
            y={frame.topY - 4}
            width={width}
            height={frame.groundY - frame.topY + 4}
            fill="var(--sheet)"
          />
        ) : null}
        <rect
          x={x1}
          y={frame.topY - 4}
          width={width}
          height={frame.groundY - frame.topY + 4}
          fill={`url(#${props.hatchId}-${c.verdict.replace(" ", "-")})`}
        />
        {shown ? (
          <text x={place} y={frame.topY - 10} textAnchor="middle" fontSize={12} fill="var(--quiet)">
            {c.label}
          </text>
        ) : null}
      </g>
    );
  });
}

const clock = (ms: number): string => new Date(ms).toISOString().slice(11, 19);

function DwellBar(props: { frame: StripFrame; dwell: { fromMs: number; toMs: number }; written: boolean }) {
  const { frame, dwell } = props;
  const x1 = xOf(frame, dwell.fromMs);
  const x2 = Math.max(x1 + 2, xOf(frame, dwell.toMs));
  const top = frame.groundY + (props.written ? 8 : 4);
  const height = props.written ? 14 : 4;
  if (!props.written) return <rect x={x1} y={top} width={x2 - x1} height={height} fill="var(--dwell)" />;
  const narrow = frame.width < 500;
  return (
    <g className="font-mono" fontSize={13} fontWeight={600} fill="var(--dwell)">
      <rect x={x1} y={top} width={x2 - x1} height={height} />
      <line x1={x1} x2={x1} y1={frame.groundY} y2={top + height + 6} stroke="var(--dwell)" strokeWidth={2} />
      <line x1={x2} x2={x2} y1={frame.groundY} y2={top + height + 6} stroke="var(--dwell)" strokeWidth={2} />
      {narrow ? (
        <text
          x={Math.min(Math.max((x1 + x2) / 2, 76), frame.width - 76)}
          y={top + height + 20}
          textAnchor="middle"
        >
          {clock(dwell.fromMs)}–{clock(dwell.toMs)}Z
        </text>
      ) : (
        <>
          <text
            x={x1 > 80 ? x1 - 8 : x1}
            y={x1 > 80 ? top + 12 : top + height + 20}
            textAnchor={x1 > 80 ? "end" : "start"}
          >
            {clock(dwell.fromMs)}
          </text>
          <text
            x={frame.width - x2 > 90 ? x2 + 8 : x2}
            y={frame.width - x2 > 90 ? top + 12 : top + height + 20}
            textAnchor={frame.width - x2 > 90 ? "start" : "end"}
          >
            {clock(dwell.toMs)}Z
          </text>
        </>
      )}
    </g>
  );
}
