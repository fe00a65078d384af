/** The pixel frames of the strip's sizes; the large one has three, so that its words keep their size. */
export const STRIP_SIZES = {
  small: { width: 180, height: 42, left: 2, right: 2, groundY: 32, topY: 5, harmDepth: 4 },
  medium: { width: 320, height: 96, left: 4, right: 4, groundY: 72, topY: 8, harmDepth: 9 },
  largeNarrow: { width: 350, height: 186, left: 4, right: 4, groundY: 132, topY: 28, harmDepth: 12 },
  large: { width: 760, height: 190, left: 4, right: 4, groundY: 142, topY: 28, harmDepth: 14 },
  largeWide: { width: 1240, height: 232, left: 4, right: 4, groundY: 182, topY: 28, harmDepth: 16 },
} as const;

export type StripLayout = keyof typeof STRIP_SIZES;

/** Which screens show which of the large layouts. */
export const LARGE_LAYOUTS = [
  { layout: "largeNarrow", className: "sm:hidden" },
  { layout: "large", className: "hidden sm:block lg:hidden" },
  { layout: "largeWide", className: "hidden lg:block" },
] as const;
