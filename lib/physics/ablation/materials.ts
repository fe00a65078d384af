import type { Sourced } from "./sourced";

/** Surface materials that have defaults. "unknown" stands for an opaque solid that nobody identified. */
export type Material =
  | "aluminium"
  | "titanium"
  | "steel"
  | "copper"
  | "carbon-fibre"
  | "polyimide"
  | "acrylic"
  | "solar-cell"
  | "unknown";

/** What the pulsed model needs of a material. */
export interface MaterialData {
  /** Momentum coupling at the optimum fluence and 1.06 µm, N/W. */
  readonly couplingAtOptimumNPerW: Sourced;
  /** P10 and P90 of the true coupling lie this factor below and above. */
  readonly couplingBand: Sourced;
  /** Fluence where ablation begins, as a share of the optimum fluence. */
  readonly thresholdShare: Sourced;
  /** Share of the energy on the fragment that stays in it as heat. */
  readonly residualHeatShare: Sourced;
  readonly heatCapacityJPerKgK: Sourced;
  /** Melting point, or for what does not melt the onset of decomposition, K. */
  readonly meltingPointK: Sourced;
}

const RANGE =
  "middle of the range of measurements near 1 µm and some ns in vacuum (Phipps, Loktionov, DLR papers), from memory";
const HEAT = "order of magnitude of residual-heat measurements, from memory";
const HANDBOOK = "handbook value, from memory";

const BAND: Sourced = {
  value: 2,
  source: "published accuracy of the coupling model on aluminium, a factor of 2 (Phipps 2011, abstract)",
};
const THRESHOLD: Sourced = { value: 0.1, source: "a tenth of the optimum, from memory" };

/** Values in the order coupling in µN/W, heat share, heat capacity, melting point. */
function material(values: readonly [number, number, number, number], couplingSource = RANGE): MaterialData {
  const [couplingUNPerW, heatShare, heatCapacity, meltingPoint] = values;
  return {
    couplingAtOptimumNPerW: { value: couplingUNPerW * 1e-6, source: couplingSource },
    couplingBand: BAND,
    thresholdShare: THRESHOLD,
    residualHeatShare: { value: heatShare, source: HEAT },
    heatCapacityJPerKgK: { value: heatCapacity, source: HANDBOOK },
    meltingPointK: { value: meltingPoint, source: HANDBOOK },
  };
}

/** Defaults per material; every value says where it comes from. */
export const MATERIALS: Readonly<Record<Material, MaterialData>> = {
  aluminium: material([50, 0.25, 900, 933.5]),
  titanium: material([27.5, 0.25, 520, 1941]),
  steel: material([27.5, 0.25, 450, 1811]),
  copper: material([22.5, 0.25, 385, 1358]),
  "carbon-fibre": material([75, 0.2, 1000, 600]),
  polyimide: material([85, 0.1, 1090, 800]),
  acrylic: material([150, 0.1, 1460, 430]),
  "solar-cell": material([45, 0.2, 700, 1685]),
  // 420e-6 / (8.5e8 · λ)^(1/4) at 1.06 µm; the heat values are those of aluminium, the lowest metal.
  unknown: material(
    [76.66, 0.25, 900, 933.5],
    "420e-6 / (8.5e8 λ)^(1/4) for opaque solids (Phipps et al. 2010 and 2012), from memory",
  ),
};

/** The material of that name, or null when there are no data for it. */
export function materialNamed(name: string): Material | null {
  return Object.hasOwn(MATERIALS, name) ? (name as Material) : null;
}
