import localFont from "next/font/local";

// Atkinson Hyperlegible (OFL): digits and letters that stay apart in a dim room.
// The files ship with the app; Latin Extended is fetched by the browser only where a name needs it.

const text = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-wght-normal.woff2",
  weight: "200 800",
  variable: "--font-text",
  display: "swap",
});

const textExtended = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-next/files/atkinson-hyperlegible-next-latin-ext-wght-normal.woff2",
  weight: "200 800",
  variable: "--font-text-ext",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [{ prop: "unicode-range", value: "U+0100-02BA, U+1E00-1E9F, U+1EF2-1EFF" }],
});

const figures = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-wght-normal.woff2",
  weight: "200 800",
  variable: "--font-figures",
  display: "swap",
});

const figuresExtended = localFont({
  src: "../node_modules/@fontsource-variable/atkinson-hyperlegible-mono/files/atkinson-hyperlegible-mono-latin-ext-wght-normal.woff2",
  weight: "200 800",
  variable: "--font-figures-ext",
  display: "swap",
  preload: false,
  adjustFontFallback: false,
  declarations: [{ prop: "unicode-range", value: "U+0100-02BA, U+1E00-1E9F, U+1EF2-1EFF" }],
});

/** Class names that define the font variables on the root element. */
export const fontVariables = [text, textExtended, figures, figuresExtended].map((f) => f.variable).join(" ");
