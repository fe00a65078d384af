"use client";

import { useState } from "react";
import { THEMES, type Theme } from "./theme";

/**
 * Light, dark, or red for eyes used to the dark. The choice is kept in a cookie,
 * so the server draws the next page in it from the start.
 */
export function ThemeSwitch({ initial }: { readonly initial: Theme }) {
  const [theme, setTheme] = useState(initial);
  const choose = (next: Theme) => {
    setTheme(next);
    if (next === "system") delete document.documentElement.dataset.theme;
    else document.documentElement.dataset.theme = next;
    // biome-ignore lint/suspicious/noDocumentCookie: the Cookie Store API is not in every browser yet
    document.cookie = `dwellbook.theme=${next}; path=/; max-age=31536000; samesite=lax`;
  };
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
            name="theme"
            value={name}
            checked={theme === name}
            onChange={() => choose(name)}
            className="sr-only"
          />
          {name === "system" ? "As system" : `${name[0]?.toUpperCase()}${name.slice(1)}`}
        </label>
      ))}
    </fieldset>
  );
}
