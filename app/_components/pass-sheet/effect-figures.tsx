import { Figure, Figures } from "@/app/_components/figure";
import { heightText } from "@/app/_components/pass-list/change-cell";
import { durationText, numberText, scaled } from "@/app/_format/figures";
import type { BandBody, EstimateBody } from "@/lib/contracts/passes";

const BAND = "P10 to P90 of the resulting height, from the bands of mass, area, coupling and pointing";

/** What a dwell does, in large figures with what each is. */
export function EffectFigures({ estimate }: { readonly estimate: EstimateBody }) {
  const energy = scaled(estimate.energyJ, "J");
  const seconds = (Date.parse(estimate.to) - Date.parse(estimate.from)) / 1000;
  const { radialMPerS, transverseMPerS, normalMPerS } = estimate.deltaV;
  return (
    <div>
      <Figures label="What the dwell does">
        <Figure
          value={change(estimate.semiMajorAxisAfterKm.p50, estimate.semiMajorAxisBeforeKm)}
          label={`semi-major axis (${band(estimate.semiMajorAxisAfterKm, estimate.semiMajorAxisBeforeKm)})`}
          note={BAND}
        />
        <Figure
          value={change(estimate.perigeeAfterKm.p50, estimate.perigeeBeforeKm)}
          label={`perigee (${band(estimate.perigeeAfterKm, estimate.perigeeBeforeKm)})`}
          note={`${BAND}; J2-mean perigee ${numberText(estimate.perigeeBeforeKm, 1)} km before`}
        />
        <Figure value={durationText(seconds)} label={`dwell, ${numberText(estimate.pulses)} pulses`} />
        <Figure
          value={energy.value}
          unit={energy.unit}
          label="laser energy sent"
          note="pulses times pulse energy"
        />
        <Figure
          value={numberText(Math.hypot(radialMPerS, transverseMPerS, normalMPerS), 1)}
          unit="m/s"
          label={`velocity change: upward ${numberText(radialMPerS, 1)}, along track ${numberText(transverseMPerS, 1)}, across ${numberText(normalMPerS, 1)} m/s`}
          note="summed along the dwell from the exact state at each step"
        />
      </Figures>
      <p className="mt-2 max-w-[80ch] text-[0.8125rem] text-quiet">
        Median of the outcomes; in brackets the middle 80 % of them (P10 … P90), from what is not known of
        mass, area, coupling and pointing.
      </p>
    </div>
  );
}

function change(afterKm: number, beforeKm: number): string {
  return heightText((afterKm - beforeKm) * 1000);
}

function band(after: BandBody, beforeKm: number): string {
  return `${change(after.p10, beforeKm)} … ${change(after.p90, beforeKm)}`;
}
