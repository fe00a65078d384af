/** The pixel frame of one strip: time runs over x, height over y, both inside margins. */
export interface StripFrame {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  /** y of the ground line (the floor's elevation, no worth). */
  readonly groundY: number;
  /** y of 90° elevation. */
  readonly topY: number;
  /** Greatest depth of the harm area below the ground line. */
  readonly harmDepth: number;
  /** Elevation at the ground line, degrees: see {@link floorOf}. */
  readonly floorDeg: number;
  readonly fromMs: number;
  readonly toMs: number;
}

/** x of an instant. */
export function xOf(frame: StripFrame, atMs: number): number {
  const share = (atMs - frame.fromMs) / (frame.toMs - frame.fromMs);
  return frame.left + Math.min(1, Math.max(0, share)) * (frame.width - frame.left - frame.right);
}

/** The instant at an x, within the pass: what a finger on the strip means. */
export function msAt(frame: StripFrame, x: number): number {
  const share = (x - frame.left) / (frame.width - frame.left - frame.right);
  return frame.fromMs + Math.min(1, Math.max(0, share)) * (frame.toMs - frame.fromMs);
}

/** y of an elevation in degrees; below the floor it stays on the ground line. */
export function yOf(frame: StripFrame, elevationDeg: number): number {
  const share = Math.max(0, (elevationDeg - frame.floorDeg) / (90 - frame.floorDeg));
  return frame.groundY - share * (frame.groundY - frame.topY);
}

/** The elevation at which the arch touches the ground: its lowest, which is where it rises and sets. */
export function floorOf(elevationDeg: readonly number[]): number {
  return elevationDeg.length === 0 ? 0 : Math.min(89, ...elevationDeg);
}

const round = (value: number): string => value.toFixed(1);

/** x of the i-th of `count` evenly spaced samples. */
function sampleX(frame: StripFrame, index: number, count: number): number {
  return xOf(frame, frame.fromMs + ((frame.toMs - frame.fromMs) * index) / Math.max(1, count - 1));
}

/** The arch of elevations as an open path. */
export function archPath(frame: StripFrame, elevationDeg: readonly number[]): string {
  return elevationDeg
    .map((e, i) => `${i ? "L" : "M"}${round(sampleX(frame, i, elevationDeg.length))} ${round(yOf(frame, e))}`)
    .join(" ");
}

/**
 * The area between the ground line and the worth curve, for the gaining (sign 1)
 * or the harming (sign −1) seconds. Worth fills at most 55 % of the height over
 * the ground, harm at most the depth below; both on the same scale.
 */
export function worthPath(frame: StripFrame, worthPerS: readonly number[], sign: 1 | -1): string {
  const greatest = Math.max(...worthPerS.map(Math.abs));
  if (!(greatest > 0)) return "";
  const up = (frame.groundY - frame.topY) * 0.55;
  const points = worthPerS.map((w, i) => {
    const share = Math.max(0, (w * sign) / greatest);
    const y = sign === 1 ? frame.groundY - share * up : frame.groundY + Math.min(frame.harmDepth, share * up);
    return `${round(sampleX(frame, i, worthPerS.length))} ${round(y)}`;
  });
  if (points.length < 2) return "";
  return `M${round(frame.left)} ${round(frame.groundY)} L${points.join(" L")} L${round(frame.width - frame.right)} ${round(frame.groundY)} Z`;
}
