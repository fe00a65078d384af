import type { MaterialData } from "./materials";

/** Temperature of a fragment before the first pulse, K (assumption: a sunlit fragment in low orbit). */
const START_TEMPERATURE_K = 300;

/**
 * Heat in joules that takes a fragment from its temperature before the first pulse to its melting point.
 * The whole body counts as one temperature and radiates nothing: so the onset comes too early rather
 * than too late.
 */
export function heatToMeltJ(material: MaterialData, massKg: number): number {
  return massKg * material.heatCapacityJPerKgK.value * (material.meltingPointK.value - START_TEMPERATURE_K);
}

/** Heat in joules that one pulse leaves in a fragment which takes `interceptedJ` of it. */
export function residualHeatJ(material: MaterialData, interceptedJ: number): number {
  return material.residualHeatShare.value * interceptedJ;
}
