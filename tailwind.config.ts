import type { Config } from "tailwindcss";

/**
 * Names for the palette of app/globals.css. The three themes only swap the
 * variables; default colours are removed there, so that nothing white or blue
 * can slip into the red theme.
 */
export default {
  content: ["./app/**/*.{ts,tsx}"],
  theme: {
    extend: {
      colors: {
        paper: "var(--paper)",
        sheet: "var(--sheet)",
        ink: "var(--ink)",
        quiet: "var(--quiet)",
        line: "var(--line)",
        worth: "var(--worth)",
        harm: "var(--harm)",
        dwell: "var(--dwell)",
        shut: "var(--shut)",
        accent: "var(--accent)",
      },
      fontFamily: {
        text: ["var(--font-text-ext)", "var(--font-text)", "system-ui", "sans-serif"],
        figures: ["var(--font-figures-ext)", "var(--font-figures)", "ui-monospace", "monospace"],
      },
      borderRadius: { DEFAULT: "3px" },
    },
  },
} satisfies Config;
