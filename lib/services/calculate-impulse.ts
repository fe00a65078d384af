import type { ImpulseEstimateBody, ImpulseEstimateInput } from "@/lib/contracts/calculations";
import { materialNamed } from "@/lib/physics/ablation/materials";
import { shapeNamed } from "@/lib/physics/ablation/shape";
import { type ImpulseEstimate, type ImpulseQuestion, impulseEstimate } from "@/lib/planning/impulse-estimate";
import { readOrbit } from "./calculate-element-sets";
import type { Outcome } from "./calculate-outcome";
import { isoOf } from "./closure-body";

/** Without a shape nothing is lost to one: a plate held face-on. */
const PLAIN_SHAPE = "plate";

/** What lasing all of an interval does to a fragment, and the best stretch for the aim. */
export function calculateImpulse(input: ImpulseEstimateInput): Outcome<ImpulseEstimateBody> {
  const { fragment, laser, station } = input;
  const material = materialNamed(fragment.material);
  if (material === null) {
    return refusal("fragment.material", `There are no ablation data for the material ${fragment.material}.`);
  }
  const shape = shapeNamed(fragment.shape ?? PLAIN_SHAPE);
  if (shape === null) return refusal("fragment.shape", `The shape ${fragment.shape} is not modelled.`);
  const read = readOrbit(input.elementSet);
  if (!read.ok) return refusal("elementSet", read.reason);
  const question: ImpulseQuestion = {
    station: {
      latitudeDeg: station.latitudeDeg,
      longitudeDeg: station.longitudeDeg,
      altitudeM: station.altitudeM,
    },
    laser,
    fragment: {
      massKg: fragment.massKg,
      areaM2: fragment.areaM2,
      material,
      couplingNPerW: fragment.couplingNPerW ?? null,
      shape,
      spinRateHz: fragment.spinRateHz ?? null,
    },
    elements: read.orbit.elements,
    fromMs: Date.parse(input.from),
    toMs: Date.parse(input.to),
    aim: input.aim,
  };
  const worked = impulseEstimate(question);
  return worked.ok ? { ok: true, body: bodyOf(worked.estimate) } : refusal(worked.path, worked.reason);
}

function refusal(path: string, reason: string): Outcome<never> {
  return { ok: false, path, reason };
}

function bodyOf(estimate: ImpulseEstimate): ImpulseEstimateBody {
  const { deltaV, best } = estimate;
  return {
    samples: estimate.samples.map((sample) => ({
      at: isoOf(sample.atMs),
      elevationDeg: sample.elevationDeg,
      rangeKm: sample.rangeKm,
      transmission: sample.transmission,
      spotDiameterM: sample.spotDiameterM,
      fluenceJPerM2: sample.fluenceJPerM2,
      couplingNPerW: sample.couplingNPerW,
      deltaVMPerS: sample.deltaVMPerS,
    })),
    deltaV,
    semiMajorAxisBeforeKm: estimate.semiMajorAxisBeforeKm,
    semiMajorAxisAfterKm: estimate.semiMajorAxisAfterKm,
    perigeeBeforeKm: estimate.perigeeBeforeKm,
    perigeeAfterKm: estimate.perigeeAfterKm,
    best: best && { from: isoOf(best.fromMs), to: isoOf(best.toMs) },
  };
}
