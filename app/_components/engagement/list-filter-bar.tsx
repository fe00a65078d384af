"use client";

import { Field } from "@/app/_components/field";
import { STATES } from "@/lib/engagement/states";
import { type EngagementFilters, WHENS, type When } from "./list-filters";

interface ListFilterBarProps {
  readonly filters: EngagementFilters;
  readonly stations: readonly { readonly id: string; readonly name: string }[];
  readonly onChange: (next: EngagementFilters) => void;
}

const WHEN_WORDS: Record<When, string> = {
  ahead: "from now on",
  today: "this UTC day",
  past: "until now",
  all: "all times",
};

/** Which engagements are listed: time, state and station. */
export function ListFilterBar({ filters, stations, onChange }: ListFilterBarProps) {
  return (
    <form className="flex flex-wrap items-end gap-x-5 gap-y-3" onSubmit={(e) => e.preventDefault()}>
      <Field label="Time">
        {(control) => (
          <select
            {...control}
            value={filters.when}
            onChange={(e) =>
              onChange({ ...filters, when: WHENS.find((w) => w === e.target.value) ?? "ahead" })
            }
          >
            {WHENS.map((when) => (
              <option key={when} value={when}>
                {WHEN_WORDS[when]}
              </option>
            ))}
          </select>
        )}
      </Field>
      <Field label="State">
        {(control) => (
          <select
            {...control}
            value={filters.state}
            onChange={(e) => onChange({ ...filters, state: stateOf(e.target.value) })}
          >
            <option value="">every state</option>
            <option value="live">still holding its time</option>
            {STATES.map((state) => (
              <option key={state}>{state}</option>
            ))}
          </select>
        )}
      </Field>
      <Field label="Station">
        {(control) => (
          <select
            {...control}
            value={filters.station}
            onChange={(e) => onChange({ ...filters, station: e.target.value })}
          >
            <option value="">all stations</option>
            {stations.map((s) => (
              <option key={s.id} value={s.id}>
                {s.name}
              </option>
            ))}
          </select>
        )}
      </Field>
    </form>
  );
}

function stateOf(value: string): EngagementFilters["state"] {
  return value === "live" ? "live" : (STATES.find((s) => s === value) ?? "");
}
