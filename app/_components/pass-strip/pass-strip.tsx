import { type ReactNode, useId } from "react";
import { ClosureMarks, HatchPatterns, type StripClosure } from "./closure-marks";
import { DwellBar } from "./dwell-bar";
import { archPath, floorOf, type StripFrame, worthPath, yOf } from "./geometry";
import { LARGE_LAYOUTS, STRIP_SIZES, type StripLayout } from "./strip-sizes";

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
  /** Handles over the large picture, drawn in its frame. */
  readonly handles?: (frame: StripFrame) => ReactNode;
}

/**
 * The pass strip: one pass as an arch over its seconds. Amber under the arch is
 * worth, below the ground line harm, hatching a closure, a dotted line on top
 * what is pending, the bar under the ground line the dwell. The large size
 * writes times and causes, and is drawn anew for each width of screen.
 */
export function PassStrip(props: StripProps) {
  if (props.size !== "large") return <StripPicture {...props} layout={props.size} />;
  return LARGE_LAYOUTS.map(({ layout, className }) => (
    <div key={layout} className={`relative ${className} ${props.className ?? ""}`}>
      <StripPicture {...props} layout={layout} className="" />
      {props.handles?.(frameOf(props, layout))}
    </div>
  ));
}

function frameOf(props: StripProps, layout: StripLayout): StripFrame {
  const { riseMs: fromMs, setMs: toMs, elevationDeg } = props;
  return { ...STRIP_SIZES[layout], floorDeg: floorOf(elevationDeg), fromMs, toMs };
}

function StripPicture(props: StripProps & { readonly layout: StripLayout }) {
  const hatchId = useId();
  const frame = frameOf(props, props.layout);
  const large = props.size === "large";
  return (
    <svg
      viewBox={`0 0 ${frame.width} ${frame.height}`}
      role="img"
      aria-label={props.name}
      className={`block h-auto ${large ? "w-full" : "max-w-full"} ${props.className ?? ""}`}
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
      <ClosureMarks frame={frame} closures={props.closures} hatchId={hatchId} written={large} />
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

/** Lines at 30° and 60° where they stand clear of the ground line. */
function ElevationGrid({ frame }: { readonly frame: StripFrame }) {
  return [30, 60]
    .filter((deg) => deg > frame.floorDeg + 8)
    .map((deg) => (
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
          fontSize={11.5}
          fill="var(--quiet)"
          className="figures"
        >
          {deg}°
        </text>
      </g>
    ));
}
