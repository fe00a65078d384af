"use client";

import { type KeyboardEvent, useState } from "react";
import { Field } from "@/app/_components/field";
import { utcTimeOfDay } from "@/app/_format/utc";
import type { Span } from "./use-judgement";

interface DwellEditorProps {
  readonly dwell: Span;
  /** The pass: the dwell stays within it. */
  readonly pass: Span;
  readonly onChange: (next: Span) => void;
}

const STEPS_S = [-10, -1, 1, 10] as const;

/** Start and end of a dwell, by typed UTC time, by buttons and by arrow keys (1 s; with Shift 10 s). */
export function DwellEditor({ dwell, pass, onChange }: DwellEditorProps) {
  const clampStart = (ms: number): number =>
    Math.min(Math.max(ms, Math.ceil(pass.fromMs / 1000) * 1000), dwell.toMs - 1000);
  const clampEnd = (ms: number): number =>
    Math.max(Math.min(ms, Math.floor(pass.toMs / 1000) * 1000), dwell.fromMs + 1000);
  return (
    <div className="flex flex-wrap gap-x-8 gap-y-4">
      <Edge
        label="Dwell from"
        atMs={dwell.fromMs}
        pass={pass}
        onChange={(ms) => onChange({ ...dwell, fromMs: clampStart(ms) })}
      />
      <Edge
        label="Dwell to"
        atMs={dwell.toMs}
        pass={pass}
        onChange={(ms) => onChange({ ...dwell, toMs: clampEnd(ms) })}
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
        hint="UTC, hh:mm:ss; arrow keys move it by 1 s, with Shift by 10 s"
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
            className="act figures min-h-9 min-w-12"
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

/** A typed time of day as an instant inside the pass; a pass over midnight may mean the next day. */
function readTime(text: string, pass: Span): number | null {
  const match = /^\s*([01]?\d|2[0-3]):?([0-5]\d):?([0-5]\d)\s*Z?\s*$/i.exec(text);
  if (!match) return null;
  const ofDayMs = ((Number(match[1]) * 60 + Number(match[2])) * 60 + Number(match[3])) * 1000;
  const midnightMs = Math.floor(pass.fromMs / 86_400_000) * 86_400_000;
  for (const dayMs of [midnightMs, midnightMs + 86_400_000]) {
    const atMs = dayMs + ofDayMs;
    if (atMs >= pass.fromMs - 1000 && atMs <= pass.toMs + 1000) return atMs;
  }
  return null;
}
