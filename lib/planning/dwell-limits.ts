import type { DwellLimits } from "./choose-dwell";
import { contains, type Interval } from "./interval";
import type { PulsedLaser } from "./laser";
import { timeWords, trimmed } from "./words";

/** A limit that a dwell breaks: the field it is about, and a sentence with numbers and units. */
export interface BrokenLimit {
  readonly path: string;
  readonly message: string;
}

interface LimitArgs {
  readonly dwell: Interval;
  readonly riseMs: number;
  readonly openings: readonly Interval[];
  readonly limits: DwellLimits;
}

/** The opening that holds the dwell, without regard to guard time; null when it lies in none. */
function openingAround(dwell: Interval, openings: readonly Interval[]): Interval | null {
  return openings.find((opening) => contains(opening, dwell)) ?? null;
}

/** True when a dwell lies in one opening with its guard time, after acquisition: it may be offered. */
export function fitsOpenings({ dwell, riseMs, openings, limits }: LimitArgs): boolean {
  const opening = openingAround(dwell, openings);
  const guardMs = limits.guardS * 1000;
  return (
    opening !== null &&
    dwell.fromMs >= Math.max(opening.fromMs + guardMs, riseMs + limits.acquisitionS * 1000) &&
    dwell.toMs <= opening.toMs - guardMs
  );
}

/**
 * Every limit of the station that a dwell breaks. A dwell that touches closed time is not measured for
 * guard time: its closures speak for themselves. `meltOnsetS` counts from the start of this dwell.
 */
export function brokenLimits(
  args: LimitArgs & { readonly laser: PulsedLaser | null; readonly meltOnsetS: number | null },
): BrokenLimit[] {
  const { dwell, limits } = args;
  if (!(dwell.fromMs < dwell.toMs)) return [{ path: "to", message: "The dwell must end after it begins." }];
  const broken: BrokenLimit[] = [];
  const lengthS = (dwell.toMs - dwell.fromMs) / 1000;
  if (dwell.fromMs % 1000 !== 0) {
    broken.push({ path: "from", message: "A dwell begins on a whole second." });
  }
  if (dwell.toMs % 1000 !== 0) broken.push({ path: "to", message: "A dwell ends on a whole second." });
  broken.push(...edgeLimits(args));
  if (lengthS < limits.minDwellS) {
    const message = `The dwell lasts ${trimmed(lengthS, 3)} s; the shortest is ${limits.minDwellS} s.`;
    broken.push({ path: "to", message });
  }
  if (lengthS > limits.maxDwellS) {
    const message = `The dwell lasts ${trimmed(lengthS, 3)} s; the longest is ${limits.maxDwellS} s.`;
    broken.push({ path: "to", message });
  }
  if (args.laser) broken.push(...laserLimits(lengthS, limits, args.laser));
  if (args.meltOnsetS !== null && args.meltOnsetS < lengthS) {
    const message = `The fragment may reach its melting point ${trimmed(args.meltOnsetS, 1)} s into the dwell.`;
    broken.push({ path: "to", message });
  }
  return broken;
}

function edgeLimits({ dwell, riseMs, openings, limits }: LimitArgs): BrokenLimit[] {
  const broken: BrokenLimit[] = [];
  const acquiredMs = riseMs + limits.acquisitionS * 1000;
  if (dwell.fromMs < acquiredMs) {
    const message = `The target is acquired and identified ${limits.acquisitionS} s after rise, at ${timeWords(acquiredMs)}, at the earliest.`;
    broken.push({ path: "from", message });
  }
  const opening = openingAround(dwell, openings);
  if (!opening) return broken;
  const guardMs = limits.guardS * 1000;
  const guard = `${limits.guardS} s guard time is kept free there.`;
  if (dwell.fromMs < opening.fromMs + guardMs) {
    broken.push({ path: "from", message: `The opening begins at ${timeWords(opening.fromMs)}; ${guard}` });
  }
  if (dwell.toMs > opening.toMs - guardMs) {
    broken.push({ path: "to", message: `The opening ends at ${timeWords(opening.toMs)}; ${guard}` });
  }
  return broken;
}

function laserLimits(lengthS: number, limits: DwellLimits, laser: PulsedLaser): BrokenLimit[] {
  const broken: BrokenLimit[] = [];
  // The pulse at the very end of the half-open dwell is not fired.
  const pulses = Math.ceil(lengthS * laser.repetitionRateHz - 1e-6);
  const energyJ = pulses * laser.pulseEnergyJ;
  if (limits.maxPulses !== null && pulses > limits.maxPulses) {
    broken.push({ path: "to", message: `The dwell takes ${pulses} pulses; at most ${limits.maxPulses}.` });
  }
  if (limits.maxEnergyJ !== null && energyJ > limits.maxEnergyJ) {
    const message = `The dwell takes ${trimmed(energyJ, 0)} J; at most ${trimmed(limits.maxEnergyJ, 0)} J.`;
    broken.push({ path: "to", message });
  }
  return broken;
}
