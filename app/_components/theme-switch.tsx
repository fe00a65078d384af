"use client";

import { useId, useSyncExternalStore } from "react";
import { chooseTheme, chosenTheme, onTheme } from "@/app/_client/theme-store";
import { THEMES, type Theme } from "./theme";

const LABELS: Record<Theme, string> = { system: "As system", light: "Light", dark: "Dark", red: "Red" };

/**
 * Light, dark, or red for eyes used to the dark. The choice is kept in a cookie,
 * so the server draws the next page in it from the start.
 */
export function ThemeSwitch({ initial }: { readonly initial: Theme }) {
  const group = useId();
  const theme = useSyncExternalStore(
    onTheme,
    () => chosenTheme() ?? initial,
    () => initial,
  );
  return (
    <fieldset className="flex items-center text-[0.8125rem]">
      <legend className="sr-only">Theme</legend>
      {THEMES.map((name) => (
        <label
          key={name}
          className="-ml-px flex min-h-7 items-center border border-line px-2.5 text-quiet first-of-type:rounded-l last-of-type:rounded-r has-checked:z-10 has-checked:border-ink has-checked:font-semibold has-checked:text-ink has-focus-visible:outline-2 has-focus-visible:outline-offset-2 has-focus-visible:outline-accent"
        >
          <input
            type="radio"
            name={group}
            value={name}
            checked={theme === name}
            onChange={() => chooseTheme(name)}
            className="sr-only"
          />
          {LABELS[name]}
        </label>
      ))}
    </fieldset>
  );
}
