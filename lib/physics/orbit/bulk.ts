import { BulkPropagator, createSingleThreadRuntime, EciBaseCalculator } from "satellite.js";
import type { Elements } from "./elements";
import { isUsableState } from "./propagate";
import { satrecOf } from "./satrec";

/** Evenly spaced times: a start in Unix ms (fractions count), a step in whole ms, a number of times. */
export interface TimeGrid {
  readonly fromMs: number;
  readonly stepMs: number;
  readonly count: number;
}

/** TEME states of many sets at many times, set by set and time by time. */
export interface BulkStates {
  /** Three numbers a state, km. */
  readonly positionsKm: Float64Array;
  /** Three numbers a state, km/s. */
  readonly velocitiesKmPerS: Float64Array;
  /** 1 where there is a state, 0 where propagation fails: `makeOrbit` has the sentence. */
  readonly usable: Uint8Array;
}

/** A WebAssembly propagator of its own; not for two calls at once. */
export interface Bulk {
  propagate(sets: readonly Elements[], grid: TimeGrid): BulkStates;
}

/**
 * The library wants calendar dates, turns them into whole Julian dates and subtracts the epoch: today that
 * resolves 40 microseconds, 0.3 m along the orbit. Only the difference counts, so the times are moved to a
 * year whose Julian dates are next to nothing, and the epochs by as much. One year has room for a grid.
 */
const NEAR_ZERO_MS = Date.UTC(-4712, 0, 1);
const NEAR_ZERO_JULIAN_DATE = -13.5;
const LONGEST_GRID_MS = 360 * 86_400_000;

/** Loads the WebAssembly module (some 10 ms once). */
export async function openBulk(): Promise<Bulk> {
  const runtime = await createSingleThreadRuntime();
  return {
    propagate(sets, grid) {
      if (sets.length === 0 || grid.count === 0) return emptyStates();
      const propagator = new BulkPropagator({
        runtime,
        calculators: [new EciBaseCalculator()],
        satRecsCount: sets.length,
        datesCount: grid.count,
      });
      try {
        propagator.setSatRecs(sets.map((set) => shifted(set, grid.fromMs)));
        propagator.setDates(dates(grid));
        propagator.run();
        const { position, velocity, error } = propagator.getRawOutput().eci;
        // The library's arrays are views of memory that goes away with the propagator.
        return judge(position.slice(), velocity.slice(), error);
      } finally {
        propagator.dispose();
      }
    },
  };
}

function emptyStates(): BulkStates {
  return {
    positionsKm: new Float64Array(0),
    velocitiesKmPerS: new Float64Array(0),
    usable: new Uint8Array(0),
  };
}

/** The record of a set with its epoch where the dates near zero need it. */
function shifted(set: Elements, fromMs: number): ReturnType<typeof satrecOf> {
  const satrec = satrecOf(set);
  satrec.jdsatepoch = NEAR_ZERO_JULIAN_DATE - (fromMs - set.epochMs) / 86_400_000;
  return satrec;
}

function dates(grid: TimeGrid): Date[] {
  if (!Number.isInteger(grid.stepMs) || grid.stepMs * grid.count > LONGEST_GRID_MS) {
    throw new RangeError("A grid needs steps of whole milliseconds and less than a year.");
  }
  return Array.from({ length: grid.count }, (_, i) => new Date(NEAR_ZERO_MS + i * grid.stepMs));
}

function judge(positionsKm: Float64Array, velocitiesKmPerS: Float64Array, errors: Int8Array): BulkStates {
  const usable = new Uint8Array(errors.length);
  for (let i = 0; i < errors.length; i++) {
    const [x = 0, y = 0, z = 0] = positionsKm.subarray(3 * i, 3 * i + 3);
    const [vx = 0, vy = 0, vz = 0] = velocitiesKmPerS.subarray(3 * i, 3 * i + 3);
    const good = isUsableState(Math.sqrt(x * x + y * y + z * z), vx * vx + vy * vy + vz * vz);
    usable[i] = errors[i] === 0 && good ? 1 : 0;
  }
  return { positionsKm, velocitiesKmPerS, usable };
}
