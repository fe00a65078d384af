export type Theme = "system" | "light" | "dark" | "red";

export const THEMES: readonly Theme[] = ["system", "light", "dark", "red"];

/** The theme a cookie names; anything else follows the system. */
export function themeOf(cookie: string | undefined): Theme {
  return THEMES.find((theme) => theme === cookie) ?? "system";
}
