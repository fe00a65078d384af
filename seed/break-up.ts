import { type InventedOrbit, meanMotionAtHeight } from "./orbits";
import { randomFrom } from "./random";

/** One invented fragment: its orbit and what we pretend to know of its body. */
export interface InventedFragment {
  readonly orbit: InventedOrbit;
  readonly massKg: number;
  readonly areaM2: number;
  readonly material: "aluminium" | "titanium" | "steel" | "carbon-fibre" | "polyimide";
}

const COUNT = 40;
const FIRST_NUMBER = 91_001;

/**
 * An invented break-up of an invented upper stage, some months ago: pieces within
 * half a degree of one plane's tilt, the node drawn out to some thirty degrees,
 * spread all around the orbit. Mass per area is near 10 kg/m², the mean of small
 * pieces in the NASA standard break-up model (from memory: Johnson et al. 2001).
 */
export function inventBreakUp(): InventedFragment[] {
  const random = randomFrom("break-up of the Quillon upper stage");
  return Array.from({ length: COUNT }, (_, i) => {
    const areaM2 = Math.exp(random.between(Math.log(0.01), Math.log(0.12)));
    const arealKgPerM2 = Math.exp(random.around(Math.log(10), 0.3));
    return {
      orbit: {
        catalogNumber: FIRST_NUMBER + i,
        name: `QL-${String(107 + i * 11).padStart(4, "0")}`,
        meanMotionRevPerDay: meanMotionAtHeight(random.between(690, 860)),
        eccentricity: random.between(0.0006, 0.012),
        inclinationDeg: random.around(74.2, 0.15),
        raanDeg: random.between(120, 152),
        argPericenterDeg: random.between(0, 360),
        meanAnomalyDeg: random.between(0, 360),
        bstar: Math.exp(random.between(Math.log(1e-4), Math.log(2e-3))),
      },
      massKg: Number((areaM2 * arealKgPerM2).toPrecision(2)),
      areaM2: Number(areaM2.toPrecision(2)),
      material: random.pick([
        "aluminium",
        "aluminium",
        "aluminium",
        "titanium",
        "steel",
        "carbon-fibre",
      ] as const),
    };
  });
}
