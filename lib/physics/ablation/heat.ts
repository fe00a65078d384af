import type { MaterialData } from "./materials";
import type { Sourced } from "./sourced";

/** Temperature of a fragment before the first pulse, K. */
export const START_TEMPERATURE: Sourced = {
  value: 300,
  source: "assumption of this project: a fragment in low orbit, now in the sun, now in the shadow",
};

/**
 * Heat in joules that takes a fragment from its temperature before the first pulse to its melting point.
 * The whole body counts as one temperature and radiates nothing: so the onset comes too early rather
 * than too late.
 */
export function heatToMeltJ(material: MaterialData, massKg: number): number {
  return (
    massKg * material.heatCapacityJPerKgK.value * (material.meltingPointK.value - START_TEMPERATURE.value)
  );
}

/** Heat in joules that one pulse leaves in a fragment which takes `interceptedJ` of it. */
export function residualHeatJ(material: MaterialData, interceptedJ: number): number {
  return material.residualHeatShare.value * interceptedJ;
}
