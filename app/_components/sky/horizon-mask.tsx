import { SKY_CENTRE, SKY_RADIUS, skyPlace } from "./place";

interface Step {
  readonly azimuthDeg: number;
  readonly elevationDeg: number;
}

/** The part of the sky behind a station's horizon, filled from the rim inwards. */
export function HorizonMask({ mask }: { readonly mask: readonly Step[] }) {
  if (mask.length === 0) return null;
  return (
    <path d={maskPath(mask)} fill="var(--harm)" fillOpacity={0.4} fillRule="evenodd" stroke="var(--shut)">
      <title>Behind the horizon mask</title>
    </path>
  );
}

/** The rim, and within it the horizon: an arc for each step, a straight line where it jumps. */
export function maskPath(mask: readonly Step[]): string {
  const steps = [...mask].sort((a, b) => a.azimuthDeg - b.azimuthDeg);
  const [c, r] = [SKY_CENTRE, SKY_RADIUS];
  const rim = `M${c} ${c - r}a${r} ${r} 0 1 1 0 ${2 * r}a${r} ${r} 0 1 1 0 ${-2 * r}Z`;
  const arcs = steps.map((step, i) => {
    const next = steps[i + 1]?.azimuthDeg ?? (steps[0]?.azimuthDeg ?? 0) + 360;
    const radius = (r * (90 - step.elevationDeg)) / 90;
    const [from, middle, to] = [step.azimuthDeg, (step.azimuthDeg + next) / 2, next].map((azimuthDeg) => {
      const { x, y } = skyPlace(azimuthDeg, step.elevationDeg);
      return `${x.toFixed(1)} ${y.toFixed(1)}`;
    });
    const arc = `A${radius.toFixed(1)} ${radius.toFixed(1)} 0 0 1`;
    // Two arcs: one alone can't go all the way round.
    return `${i ? "L" : "M"}${from}${arc} ${middle}${arc} ${to}`;
  });
  return `${rim}${arcs.join("")}Z`;
}
