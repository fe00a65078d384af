import { gmstRad } from "@/lib/physics/frames/earth";

let known: { key: string; cosines: Float64Array; sines: Float64Array } | null = null;

/** Cosine and sine of sidereal time on an even grid; kept for the next object with the same grid. */
export function siderealAngles(
  fromMs: number,
  stepMs: number,
  count: number,
): { cosines: Float64Array; sines: Float64Array } {
  const key = `${fromMs}/${stepMs}/${count}`;
  if (known?.key === key) return known;
  const cosines = new Float64Array(count);
  const sines = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    const angle = gmstRad(fromMs + i * stepMs);
    cosines[i] = Math.cos(angle);
    sines[i] = Math.sin(angle);
  }
  known = { key, cosines, sines };
  return known;
}
