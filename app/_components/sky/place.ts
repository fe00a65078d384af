/** Edge of the square sky chart, its middle and the radius of its horizon. */
export const SKY_SIZE = 320;
export const SKY_CENTRE = SKY_SIZE / 2;
export const SKY_RADIUS = 132;

export interface SkyPlace {
  readonly x: number;
  readonly y: number;
}

/** Zenith in the middle, horizon at the rim, north up, east to the right as on a map. */
export function skyPlace(azimuthDeg: number, elevationDeg: number): SkyPlace {
  const r = (SKY_RADIUS * (90 - elevationDeg)) / 90;
  const a = (azimuthDeg * Math.PI) / 180;
  return { x: SKY_CENTRE + r * Math.sin(a), y: SKY_CENTRE - r * Math.cos(a) };
}

/** Path data through directions of the sky. */
export function skyPath(
  directions: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[],
): string {
  return directions
    .map(({ azimuthDeg, elevationDeg }, i) => {
      const { x, y } = skyPlace(azimuthDeg, elevationDeg);
      return `${i ? "L" : "M"}${x.toFixed(1)} ${y.toFixed(1)}`;
    })
    .join(" ");
}
