/** One step of a station's horizon: from an azimuth on, clockwise, up to the next step's. */
export interface MaskStep {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}

/**
 * Elevation of the horizon in degrees at an azimuth (degrees, any turn). The last step runs on over north to
 * the first; without steps the horizon is nowhere in the way (−90).
 */
export function maskElevationDeg(mask: readonly MaskStep[], azimuthDeg: number): number {
  return highestMaskDeg(mask, azimuthDeg, 0);
}

/**
 * The highest horizon within some degrees to both sides of an azimuth. Steps need no order; an azimuth of 360
 * is that of 0.
 */
export function highestMaskDeg(mask: readonly MaskStep[], azimuthDeg: number, aroundDeg: number): number {
  if (mask.length === 0) return -90;
  const fromDeg = turn(azimuthDeg - aroundDeg);
  const widthDeg = Math.min(360, 2 * aroundDeg);
  // The step that holds at the beginning of the range is the one begun last before it.
  const holding = mask.reduce((best, step) =>
    turn(fromDeg - step.azimuthDeg) < turn(fromDeg - best.azimuthDeg) ? step : best,
  );
  const begun = mask.filter((step) => turn(step.azimuthDeg - fromDeg) <= widthDeg);
  return Math.max(holding.elevationDeg, ...begun.map((step) => step.elevationDeg));
}

function turn(deg: number): number {
  return ((deg % 360) + 360) % 360;
}
