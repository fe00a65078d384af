"use client";

import { errorOf, Field } from "@/app/_components/field";
import type { TypedChecklist } from "./checklist";
import { UtcField } from "./utc-field";

interface ChecklistFieldsProps {
  readonly typed: TypedChecklist;
  readonly onChange: (next: TypedChecklist) => void;
  readonly details: readonly { readonly path: string; readonly message: string }[];
}

/** What an empty field lacks, in the words of the checklist. */
const MISSING: Record<keyof TypedChecklist, string> = {
  airUnitCalledAt: "When was the air unit called?",
  spotterInPlace: "The spotter must be in place.",
  interlockTestedAt: "When was the interlock tested?",
  clockOffsetMs: "What is the clock's offset, in ms?",
  weather: "What is the weather?",
  crewedListCheckedAt: "When was the crewed list checked?",
};

/** Every value of the checklist, in the order of the work before a dwell. */
export function ChecklistFields({ typed, onChange, details }: ChecklistFieldsProps) {
  const set = (part: Partial<TypedChecklist>): void => onChange({ ...typed, ...part });
  const errorAt = (name: keyof TypedChecklist): string | null => {
    const refused = errorOf(details, `checklist.${name}`);
    if (refused === null) return null;
    const value = typed[name];
    return value === "" || value === false ? MISSING[name] : refused;
  };
  return (
    <fieldset className="grid gap-4">
      <legend className="sr-only">Checklist</legend>
      <UtcField
        label="Air unit called at"
        value={typed.airUnitCalledAt}
        onChange={(airUnitCalledAt) => set({ airUnitCalledAt })}
        error={errorAt("airUnitCalledAt")}
        offersNow
      />
      <UtcField
        label="Interlock tested at"
        hint="UTC; the laser stops when the interlock opens"
        value={typed.interlockTestedAt}
        onChange={(interlockTestedAt) => set({ interlockTestedAt })}
        error={errorAt("interlockTestedAt")}
        offersNow
      />
      <UtcField
        label="Crewed list checked at"
        hint="UTC; the list of crewed spacecraft is whole and of today"
        value={typed.crewedListCheckedAt}
        onChange={(crewedListCheckedAt) => set({ crewedListCheckedAt })}
        error={errorAt("crewedListCheckedAt")}
        offersNow
      />
      <div className="grid gap-4 sm:grid-cols-2">
        <Field label="Clock offset" hint="ms against UTC, −1000 to 1000" error={errorAt("clockOffsetMs")}>
          {(control) => (
            <input
              {...control}
              className={`${control.className} figures`}
              inputMode="decimal"
              autoComplete="off"
              value={typed.clockOffsetMs}
              onChange={(e) => set({ clockOffsetMs: e.target.value })}
            />
          )}
        </Field>
        <Field label="Weather" hint="cloud, wind in m/s" error={errorAt("weather")}>
          {(control) => (
            <input
              {...control}
              autoComplete="off"
              value={typed.weather}
              onChange={(e) => set({ weather: e.target.value })}
            />
          )}
        </Field>
      </div>
      <div>
        <label className="flex min-h-10 items-center gap-2 font-semibold">
          <input
            type="checkbox"
            className="size-5 accent-(--ink)"
            checked={typed.spotterInPlace}
            aria-describedby={errorAt("spotterInPlace") ? "spotter-error" : undefined}
            onChange={(e) => set({ spotterInPlace: e.target.checked })}
          />
          The spotter is in place
        </label>
        {errorAt("spotterInPlace") ? (
          <p id="spotter-error" className="text-sm text-dwell">
            {errorAt("spotterInPlace")}
          </p>
        ) : null}
      </div>
    </fieldset>
  );
}
