"use client";

import { type KeyboardEvent, type PointerEvent, useRef } from "react";
import {
  clampEnd,
  clampStart,
  keyStepS,
  type Span,
  shiftDwell,
} from "@/app/_components/pass-sheet/dwell-time";
import { durationText } from "@/app/_format/figures";
import { utcTimeOfDay } from "@/app/_format/utc";
import { barPlace } from "./dwell-bar";
import { msAt, type StripFrame, xOf } from "./geometry";

interface DwellHandlesProps {
  readonly frame: StripFrame;
  readonly dwell: Span;
  readonly onChange: (next: Span) => void;
}

/**
 * The dwell's edges and its bar, to be dragged by mouse or finger over the large strip. Each edge is a
 * slider for the keyboard; the bar between them moves as a whole by pointer only, since the edges reach
 * every dwell.
 */
export function DwellHandles({ frame, dwell, onChange }: DwellHandlesProps) {
  const pass = { fromMs: frame.fromMs, toMs: frame.toMs };
  return (
    <>
      <BarGrip
        frame={frame}
        dwell={dwell}
        onChange={(byMs, start) => onChange(shiftDwell(start, byMs, pass))}
      />
      <EdgeHandle
        frame={frame}
        label="Start of the dwell"
        atMs={dwell.fromMs}
        onMove={(ms) => onChange({ ...dwell, fromMs: clampStart(ms, dwell, pass) })}
      />
      <EdgeHandle
        frame={frame}
        label="End of the dwell"
        atMs={dwell.toMs}
        onMove={(ms) => onChange({ ...dwell, toMs: clampEnd(ms, dwell, pass) })}
      />
    </>
  );
}

const percent = (part: number, whole: number): string => `${(100 * part) / whole}%`;

/** The instant under the pointer, read from the picture that the handle lies over. */
function instantUnder(event: PointerEvent<HTMLElement>, frame: StripFrame): number | null {
  const box = event.currentTarget.parentElement?.getBoundingClientRect();
  return box && box.width > 0 ? msAt(frame, ((event.clientX - box.left) / box.width) * frame.width) : null;
}

function EdgeHandle(props: {
  readonly frame: StripFrame;
  readonly label: string;
  readonly atMs: number;
  readonly onMove: (ms: number) => void;
}) {
  const { frame, label, atMs, onMove } = props;
  const { top, height } = barPlace(frame, true);
  const onPointerMove = (event: PointerEvent<HTMLDivElement>): void => {
    if (!event.currentTarget.hasPointerCapture(event.pointerId)) return;
    const ms = instantUnder(event, frame);
    if (ms !== null) onMove(ms);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const stepS = keyStepS(event.key, event.shiftKey);
    if (stepS === null) return;
    event.preventDefault();
    if (Number.isFinite(stepS)) onMove(atMs + stepS * 1000);
    else onMove(stepS > 0 ? frame.toMs : frame.fromMs);
  };
  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label={label}
      aria-valuemin={0}
      aria-valuemax={Math.round((frame.toMs - frame.fromMs) / 1000)}
      aria-valuenow={Math.round((atMs - frame.fromMs) / 1000)}
      aria-valuetext={`${utcTimeOfDay(atMs)}, ${durationText((atMs - frame.fromMs) / 1000)} after rise`}
      onKeyDown={onKeyDown}
      onPointerDown={(e) => e.currentTarget.setPointerCapture(e.pointerId)}
      onPointerMove={onPointerMove}
      className="group absolute flex w-7 -translate-x-1/2 -translate-y-1/2 cursor-ew-resize touch-none items-center justify-center"
      style={{
        left: percent(xOf(frame, atMs), frame.width),
        top: percent(top + height / 2, frame.height),
        height: "2.75rem",
      }}
    >
      <span className="h-7 w-3 rounded-[3px] border-2 border-dwell bg-sheet group-hover:bg-dwell" />
    </div>
  );
}

function BarGrip(props: {
  readonly frame: StripFrame;
  readonly dwell: Span;
  readonly onChange: (byMs: number, start: Span) => void;
}) {
  const { frame, dwell, onChange } = props;
  const held = useRef<{ readonly atMs: number; readonly dwell: Span } | null>(null);
  const { top, height } = barPlace(frame, true);
  const x1 = xOf(frame, dwell.fromMs);
  const onPointerDown = (event: PointerEvent<HTMLDivElement>): void => {
    const atMs = instantUnder(event, frame);
    if (atMs === null) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    held.current = { atMs, dwell };
  };
  const onPointerMove = (event: PointerEvent<HTMLDivElement>): void => {
    const start = held.current;
    if (!start || !event.currentTarget.hasPointerCapture(event.pointerId)) return;
    const atMs = instantUnder(event, frame);
    if (atMs !== null) onChange(atMs - start.atMs, start.dwell);
  };
  return (
    <div
      aria-hidden="true"
      onPointerDown={onPointerDown}
      onPointerMove={onPointerMove}
      className="absolute -translate-y-1/2 cursor-grab touch-none active:cursor-grabbing"
      style={{
        left: percent(x1, frame.width),
        width: percent(xOf(frame, dwell.toMs) - x1, frame.width),
        top: percent(top + height / 2, frame.height),
        height: "2.25rem",
      }}
    />
  );
}
