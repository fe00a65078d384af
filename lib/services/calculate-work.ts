import { parseElementSets } from "@/lib/formats/element-sets";
import { calculateCrossings } from "./calculate-crossings";
import { calculateImpulse } from "./calculate-impulse";
import { calculatePasses } from "./calculate-passes";
import { calculateSky } from "./calculate-sky";

/**
 * The calculations that may take long: pure functions of one plain input each, so that they can run in
 * this process or in another and give the same.
 */
export const CALCULATIONS = {
  "pass-search": calculatePasses,
  "beam-screen": calculateCrossings,
  "impulse-estimate": calculateImpulse,
  "pass-sky": calculateSky,
  "read-element-sets": parseElementSets,
};

export type CalculationName = keyof typeof CALCULATIONS;
export type CalculationInput<N extends CalculationName> = Parameters<(typeof CALCULATIONS)[N]>[0];
export type CalculationResult<N extends CalculationName> = ReturnType<(typeof CALCULATIONS)[N]>;

/** True for the name of a calculation. */
export function isCalculation(name: unknown): name is CalculationName {
  return typeof name === "string" && Object.hasOwn(CALCULATIONS, name);
}
