"use client";

import { type KeyboardEvent, useState } from "react";
import { Field } from "@/app/_components/field";
import { utcTimeOfDay } from "@/app/_format/utc";
import { clampEnd, clampStart, readTime, type Span } from "./dwell-time";

interface DwellEditorProps {
  readonly dwell: Span;
  /** The pass: the dwell stays within it. */
  readonly pass: Span;
  readonly onChange: (next: Span) => void;
}

const STEPS_S = [-10, -1, 1, 10] as const;

/** Start and end of a dwell, by typed UTC time, by buttons and by arrow keys (1 s; with Shift 10 s). */
export function DwellEditor({ dwell, pass, onChange }: DwellEditorProps) {
  return (
    <div className="flex flex-wrap gap-x-8 gap-y-4">
      <Edge
        label="Dwell from"
        atMs={dwell.fromMs}
        pass={pass}
        onChange={(ms) => onChange({ ...dwell, fromMs: clampStart(ms, dwell, pass) })}
      />
      <Edge
        label="Dwell to"
        atMs={dwell.toMs}
        pass={pass}
        onChange={(ms) => onChange({ ...dwell, toMs: clampEnd(ms, dwell, pass) })}
      />
    </div>
  );
}

function Edge(props: {
  readonly label: string;
  readonly atMs: number;
  readonly pass: Span;
  readonly onChange: (ms: number) => void;
}) {
  const [typed, setTyped] = useState<string | null>(null);
  const wrong = typed !== null && readTime(typed, props.pass) === null;
  const commit = (): void => {
    const ms = typed === null ? null : readTime(typed, props.pass);
    if (ms !== null) props.onChange(ms);
    if (ms !== null || typed === "") setTyped(null);
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (event.key === "Enter") {
      event.preventDefault();
      commit();
    }
    if (event.key !== "ArrowUp" && event.key !== "ArrowDown") return;
    event.preventDefault();
    const stepS = (event.shiftKey ? 10 : 1) * (event.key === "ArrowUp" ? 1 : -1);
    setTyped(null);
    props.onChange(props.atMs + stepS * 1000);
  };
  return (
    <div>
      <Field
        label={props.label}
        hint="UTC; arrow up and down: 1 s, with Shift 10 s"
        error={wrong ? "Write a time inside the pass, like 03:12:45." : null}
      >
        {(control) => (
          <input
            {...control}
            className={`${control.className} figures w-32`}
            inputMode="numeric"
            autoComplete="off"
            value={typed ?? utcTimeOfDay(props.atMs).replace("Z", "")}
            onChange={(e) => setTyped(e.target.value)}
            onBlur={commit}
            onKeyDown={onKeyDown}
          />
        )}
      </Field>
      <div className="mt-1.5 flex gap-1.5">
        {STEPS_S.map((s) => (
          <button
            key={s}
            type="button"
            className="figures min-h-9 rounded border border-quiet px-2 text-[0.875rem] whitespace-nowrap hover:bg-ink hover:text-sheet"
            aria-label={`${props.label}: ${s > 0 ? "later" : "earlier"} by ${Math.abs(s)} s`}
            onClick={() => props.onChange(props.atMs + s * 1000)}
          >
            {s > 0 ? `+${s}` : `−${-s}`} s
          </button>
        ))}
      </div>
    </div>
  );
}
