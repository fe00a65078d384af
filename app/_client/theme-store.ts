import type { Theme } from "@/app/_components/theme";

const listeners = new Set<() => void>();
/** What was chosen since the page loaded; null until then. */
let chosen: Theme | null = null;

/** The choice of this page load, or null. */
export function chosenTheme(): Theme | null {
  return chosen;
}

/** Tells of every choice, so that two switches on a page agree; returns how to stop. */
export function onTheme(listener: () => void): () => void {
  listeners.add(listener);
  return () => {
    listeners.delete(listener);
  };
}

/** Draws the page in the theme at once, and keeps the choice in a cookie for the server. */
export function chooseTheme(theme: Theme): void {
  chosen = theme;
  if (theme === "system") delete document.documentElement.dataset.theme;
  else document.documentElement.dataset.theme = theme;
  // biome-ignore lint/suspicious/noDocumentCookie: the Cookie Store API is not in every browser yet
  document.cookie = `dwellbook.theme=${theme}; path=/; max-age=31536000; samesite=lax`;
  for (const listener of listeners) listener();
}
