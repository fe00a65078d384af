"use client";

import { Field } from "@/app/_components/field";
import { HOUR_CHOICES, orderOf, type PassFilters } from "./filters";

interface FilterBarProps {
  readonly filters: PassFilters;
  readonly onChange: (next: PassFilters) => void;
  readonly stations: readonly { readonly id: string; readonly name: string }[];
  readonly fragments: readonly { readonly id: string; readonly name: string }[];
  readonly nowMs: number;
}

const DAY_MS = 86_400_000;

/** Which passes are listed: station, fragment, window, and whether closed ones are shown. */
export function FilterBar({ filters, onChange, stations, fragments, nowMs }: FilterBarProps) {
  const midnightMs = Math.floor(nowMs / DAY_MS) * DAY_MS;
  const days = Array.from({ length: 7 }, (_, i) => new Date(midnightMs + (i + 1) * DAY_MS).toISOString());
  return (
    <form
      className="grid grid-cols-2 items-end gap-x-5 gap-y-3 sm:flex sm:flex-wrap"
      onSubmit={(e) => e.preventDefault()}
    >
      <Choice
        label="Station"
        value={filters.station}
        onChange={(station) => onChange({ ...filters, station })}
        options={[["", "all stations"], ...stations.map((s) => [s.id, s.name] as const)]}
      />
      <Choice
        label="Fragment"
        value={filters.fragment}
        onChange={(fragment) => onChange({ ...filters, fragment })}
        options={[["", "all fragments"], ...fragments.map((f) => [f.id, f.name] as const)]}
      />
      <Choice
        label="From (UTC)"
        value={filters.from}
        onChange={(from) => onChange({ ...filters, from })}
        options={[["", "now"], ...days.map((d) => [d, `${d.slice(0, 10)} 00:00Z`] as const)]}
      />
      <Choice
        label="Window"
        value={String(filters.hours)}
        onChange={(hours) => onChange({ ...filters, hours: Number(hours) })}
        options={HOUR_CHOICES.map((h) => [String(h), h === 168 ? "7 days" : `${h} h`] as const)}
      />
      <Choice
        label="Order"
        value={filters.sort}
        onChange={(sort) => onChange({ ...filters, sort: orderOf(sort) })}
        options={[
          ["time", "by rise"],
          ["semi-major axis", "by drop of semi-major axis"],
          ["perigee", "by drop of perigee"],
        ]}
      />
      <label className="flex min-h-10 items-center gap-2">
        <input
          type="checkbox"
          className="size-5 accent-(--ink)"
          checked={filters.worthOnly}
          onChange={(e) => onChange({ ...filters, worthOnly: e.target.checked })}
        />
        only worth lasing
      </label>
    </form>
  );
}

/** One choice of the bar. */
function Choice(props: {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly options: readonly (readonly [string, string])[];
}) {
  return (
    <Field label={props.label}>
      {(control) => (
        <select {...control} value={props.value} onChange={(e) => props.onChange(e.target.value)}>
          {props.options.map(([value, text]) => (
            <option key={value} value={value}>
              {text}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}
