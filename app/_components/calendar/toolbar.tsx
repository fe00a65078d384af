"use client";

import { Button } from "@/app/_components/button";
import { Field } from "@/app/_components/field";
import { alignTo, type CalendarView, spanWords, stepView, ZOOMS } from "./calendar-view";

interface ToolbarProps {
  /** `show` as it is drawn now, with the screen's default filled in. */
  readonly view: CalendarView & { readonly show: "week" | "day" | "list" };
  readonly stations: readonly { readonly id: string; readonly name: string }[];
  readonly fragments: readonly { readonly id: string; readonly name: string }[];
  readonly onChange: (next: CalendarView) => void;
}

const SHOWS = [
  ["week", "Week"],
  ["day", "Day"],
  ["list", "List"],
] as const;

/** Where and when: earlier, later, today, week, day or list, the day's zoom, station and fragment. */
export function Toolbar({ view, stations, fragments, onChange }: ToolbarProps) {
  return (
    <div className="grid gap-3">
      <div className="flex flex-wrap items-end gap-x-6 gap-y-3">
        <Select
          label="Station"
          value={view.station}
          all="all stations"
          options={stations}
          onChange={(station) => onChange({ ...view, station })}
        />
        <Select
          label="Passes of"
          value={view.fragment}
          all="the 30 best, any fragment"
          options={fragments}
          onChange={(fragment) => onChange({ ...view, fragment })}
        />
        <Choice label="Show">
          {SHOWS.map(([show, words]) => (
            <Chosen key={show} on={view.show === show} onClick={() => onChange({ ...view, show })}>
              {words}
            </Chosen>
          ))}
        </Choice>
        {view.show === "day" ? (
          <Choice label="Zoom of the day">
            {ZOOMS.map((zoom) => (
              <Chosen
                key={zoom}
                on={view.zoom === zoom}
                onClick={() => onChange({ ...view, zoom, atMs: alignTo(zoom, zoomStart(view)) })}
              >
                {zoom} h
              </Chosen>
            ))}
          </Choice>
        ) : null}
      </div>
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <Button onClick={() => onChange(stepView(view, -1))}>Earlier</Button>
        <Button onClick={() => onChange({ ...view, atMs: alignTo(view.zoom, Date.now()) })}>Now</Button>
        <Button onClick={() => onChange(stepView(view, 1))}>Later</Button>
        <h2 className="figures text-lg font-semibold" aria-live="polite">
          {spanWords(view)} <span className="text-[0.8125rem] font-normal text-quiet">UTC</span>
        </h2>
      </div>
    </div>
  );
}

/** Zooming in on the day that holds the present goes to the present; else to the day's beginning. */
function zoomStart(view: CalendarView): number {
  const nowMs = Date.now();
  return alignTo(24, view.atMs) === alignTo(24, nowMs) && view.zoom === 24 ? nowMs : view.atMs;
}

function Select(props: {
  readonly label: string;
  readonly value: string;
  readonly all: string;
  readonly options: readonly { readonly id: string; readonly name: string }[];
  readonly onChange: (value: string) => void;
}) {
  return (
    <Field label={props.label}>
      {(control) => (
        <select {...control} value={props.value} onChange={(e) => props.onChange(e.target.value)}>
          <option value="">{props.all}</option>
          {props.options.map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </select>
      )}
    </Field>
  );
}

function Choice({ label, children }: { readonly label: string; readonly children: React.ReactNode }) {
  return (
    <fieldset>
      <legend className="mb-1 font-semibold">{label}</legend>
      <div className="flex">{children}</div>
    </fieldset>
  );
}

function Chosen(props: {
  readonly on: boolean;
  readonly onClick: () => void;
  readonly children: React.ReactNode;
}) {
  return (
    <button
      type="button"
      aria-pressed={props.on}
      onClick={props.onClick}
      className="min-h-9.5 border-y border-r border-quiet px-3 font-semibold first:rounded-l first:border-l last:rounded-r aria-pressed:bg-ink aria-pressed:text-sheet"
    >
      {props.children}
    </button>
  );
}
