import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";

const css = readFileSync(new URL("../../../app/globals.css", import.meta.url), "utf8");
const THEMES = ["light", "dark", "red"] as const;
type Theme = (typeof THEMES)[number];
const NAMES = ["paper", "sheet", "ink", "quiet", "line", "worth", "harm", "dwell", "shut", "accent"];

/** The variables of a theme, as the style sheet sets them. */
function palette(theme: Theme): Map<string, string> {
  const block = theme === "red" ? /:root\[data-theme="red"\] \{([^}]*)\}/ : /:root \{([^}]*)\}/;
  const body = block.exec(css)?.[1] ?? "";
  const colours = new Map<string, string>();
  for (const [, name = "", value = ""] of body.matchAll(/--([a-z]+):\s*([^;]+);/g)) {
    const pair = /light-dark\((#[0-9a-f]{6}), (#[0-9a-f]{6})\)/.exec(value);
    colours.set(name, (pair ? pair[theme === "light" ? 1 : 2] : value) ?? "");
  }
  return colours;
}

/** Relative luminance of WCAG 2.2 (w3.org/TR/WCAG22/#dfn-relative-luminance). */
function luminance(colour: string): number {
  const linear = channels(colour).map((v) => {
    const share = v / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  });
  const [r = 0, g = 0, b = 0] = linear;
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [low = 0, high = 0] = [luminance(a), luminance(b)].sort((x, y) => x - y);
  return (high + 0.05) / (low + 0.05);
}

function channels(colour: string): number[] {
  if (!/^#[0-9a-f]{6}$/.test(colour)) throw new Error(`${colour} is no colour`);
  return [1, 3, 5].map((at) => Number.parseInt(colour.slice(at, at + 2), 16));
}

function colour(theme: Theme, name: string): string {
  return palette(theme).get(name) ?? `no ${name}`;
}

describe("contrast, as it is measured here", () => {
  it("agrees with the published ends of the scale", () => {
    expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 6); // WCAG 2.2: ratios run from 1 to 21
    expect(contrast("#777777", "#ffffff")).toBeCloseTo(4.48, 2); // the grey that just fails, WebAIM's contrast checker (from memory)
  });
});

describe.each(THEMES)("the %s theme", (theme) => {
  it("names every colour", () => {
    expect([...palette(theme).keys()].sort()).toEqual([...NAMES].sort());
    for (const name of NAMES) expect(() => channels(colour(theme, name))).not.toThrow();
  });

  it.each(["ink", "quiet", "dwell", "accent"])("sets text in %s at 4.5:1 or more", (name) => {
    for (const ground of ["paper", "sheet"]) {
      expect(contrast(colour(theme, name), colour(theme, ground))).toBeGreaterThanOrEqual(4.5);
    }
  });

  it("keeps reversed text readable: sheet on ink and on dwell", () => {
    for (const ground of ["ink", "dwell"]) {
      expect(contrast(colour(theme, "sheet"), colour(theme, ground))).toBeGreaterThanOrEqual(4.5);
    }
  });

  it("keeps ink readable on the tint of a chosen row", () => {
    const [sheet, worth] = [channels(colour(theme, "sheet")), channels(colour(theme, "worth"))];
    const tint = sheet.map((v, i) => Math.round(v * 0.86 + (worth[i] ?? 0) * 0.14));
    const hex = `#${tint.map((v) => v.toString(16).padStart(2, "0")).join("")}`;
    expect(contrast(colour(theme, "ink"), hex)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(colour(theme, "quiet"), hex)).toBeGreaterThanOrEqual(4.5);
  });
});

describe("the red theme", () => {
  it("lights no green and no blue", () => {
    for (const name of NAMES) expect(channels(colour("red", name)).slice(1)).toEqual([0, 0]);
  });
});
