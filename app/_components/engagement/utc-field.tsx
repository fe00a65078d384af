"use client";

import { Field } from "@/app/_components/field";
import { readUtc, utcWords } from "./read-utc";

interface UtcFieldProps {
  readonly label: string;
  readonly value: string;
  readonly onChange: (words: string) => void;
  readonly hint?: string;
  /** Why the server refused it. */
  readonly error?: string | null;
  readonly milliseconds?: boolean;
  /** Offers a button that writes the present time. */
  readonly offersNow?: boolean;
}

/** A UTC time by typing. What can't be read is said at once, beside the field. */
export function UtcField(props: UtcFieldProps) {
  const { value, milliseconds = false } = props;
  const unreadable = value.trim() !== "" && readUtc(value) === null;
  const example = milliseconds ? "2031-04-06 03:12:45.120Z" : "2031-04-06 03:12:45Z";
  return (
    <Field
      label={props.label}
      hint={props.hint ?? `UTC, like ${example}`}
      error={unreadable ? `Write a UTC time like ${example}.` : props.error}
    >
      {(control) => (
        <div className="flex gap-2">
          <input
            {...control}
            className={`${control.className} figures min-w-0 grow`}
            autoComplete="off"
            value={value}
            onChange={(event) => props.onChange(event.target.value)}
          />
          {props.offersNow ? (
            <button
              type="button"
              className="act min-h-9 shrink-0 px-1"
              aria-label={`${props.label}: now`}
              onClick={() => props.onChange(utcWords(Date.now(), milliseconds))}
            >
              now
            </button>
          ) : null}
        </div>
      )}
    </Field>
  );
}
