import type { Sourced } from "./sourced";

/**
 * Shapes with a known efficiency. The fragment's area means: sphere and cylinder, the area that the beam
 * sees (cylinder from the side); plates, the area of one face.
 */
export type Shape = "sphere" | "cylinder" | "plate" | "tumbling-plate";

const LOCAL_NORMAL =
  "impulse along the local normal (Liedahl et al. 2013, Adv. Space Res. 52, 895), integral over the lit surface";

const EFFICIENCY: Readonly<Record<Shape, Sourced>> = {
  sphere: { value: 2 / 3, source: LOCAL_NORMAL },
  cylinder: { value: Math.PI / 4, source: `${LOCAL_NORMAL}, seen from the side` },
  plate: { value: 1, source: `${LOCAL_NORMAL}, held face-on` },
  "tumbling-plate": { value: 1 / 3, source: `${LOCAL_NORMAL}, mean cos² over all directions` },
};

const SPINNING_PLATE: Sourced = {
  value: 1 / 2,
  source: `${LOCAL_NORMAL}, mean cos² over a turn about an axis across the beam`,
};

/**
 * Share of the impulse of a face-on plate that acts along the beam, means over the motion. It takes the
 * place of the overall 0.3 of the literature and is never multiplied by it. The parts across the beam
 * cancel over a turn or by symmetry. A plate that spins about a fixed axis loses half when the axis lies
 * across the beam; spheres, and cylinders about their own axis, lose nothing by spinning.
 */
export function axialEfficiency(shape: Shape, spinRateHz: number | null): Sourced {
  if (shape === "plate" && spinRateHz !== null && spinRateHz > 0) return SPINNING_PLATE;
  return EFFICIENCY[shape];
}

/** The shape of that name, or null. */
export function shapeNamed(name: string): Shape | null {
  return Object.hasOwn(EFFICIENCY, name) ? (name as Shape) : null;
}

/**
 * Way in metres that the rim of a spinning fragment of the given projected area moves during one pulse.
 * Nanometres at one turn a second: for pulses a spinning fragment stands still.
 */
export function rimSmearM(spinRateHz: number, areaM2: number, pulseWidthNs: number): number {
  const radiusM = Math.sqrt(areaM2 / Math.PI);
  return 2 * Math.PI * spinRateHz * radiusM * pulseWidthNs * 1e-9;
}
