"use client";

import { errorOf, Field } from "@/app/_components/field";
import type { TypedInterruption } from "./firing-form";
import { UtcField } from "./utc-field";

interface InterruptionRowsProps {
  readonly rows: readonly TypedInterruption[];
  readonly onChange: (rows: readonly TypedInterruption[]) => void;
  readonly details: readonly { readonly path: string; readonly message: string }[];
}

/** Interruptions of the beam: when, why, and how many seconds were lost. */
export function InterruptionRows({ rows, onChange, details }: InterruptionRowsProps) {
  const change = (key: number, part: Partial<TypedInterruption>): void =>
    onChange(rows.map((row) => (row.key === key ? { ...row, ...part } : row)));
  const add = (): void => {
    const key = Math.max(0, ...rows.map((row) => row.key)) + 1;
    onChange([...rows, { key, at: "", cause: "", secondsLost: "" }]);
  };
  return (
    <fieldset className="grid gap-3">
      <legend className="font-semibold">Interruptions</legend>
      {rows.length === 0 ? <p className="mt-1 text-quiet">None.</p> : null}
      {rows.map((row, i) => (
        <div key={row.key} className="grid gap-3 border-l-2 border-line pl-3">
          <UtcField
            label={`Interruption ${i + 1} at`}
            milliseconds
            value={row.at}
            onChange={(at) => change(row.key, { at })}
            error={errorOf(details, `interruptions.${i}.at`)}
          />
          <div className="grid gap-3 sm:grid-cols-[1fr_9rem]">
            <Field label="Cause" error={errorOf(details, `interruptions.${i}.cause`)}>
              {(control) => (
                <input
                  {...control}
                  value={row.cause}
                  onChange={(e) => change(row.key, { cause: e.target.value })}
                />
              )}
            </Field>
            <Field label="Lost (s)" error={errorOf(details, `interruptions.${i}.secondsLost`)}>
              {(control) => (
                <input
                  {...control}
                  className={`${control.className} figures`}
                  inputMode="decimal"
                  value={row.secondsLost}
                  onChange={(e) => change(row.key, { secondsLost: e.target.value })}
                />
              )}
            </Field>
          </div>
          <button
            type="button"
            className="act justify-self-start"
            onClick={() => onChange(rows.filter((other) => other.key !== row.key))}
          >
            Remove interruption {i + 1}
          </button>
        </div>
      ))}
      <button type="button" className="act justify-self-start" onClick={add}>
        Add an interruption
      </button>
    </fieldset>
  );
}
