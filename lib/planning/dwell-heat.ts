import { elevationAndRange } from "@/lib/physics/effect/accumulate";
import type { Track } from "@/lib/physics/effect/track";
import type { Shots } from "./dwell-shots";

/** Heat in watts that lasing leaves in the fragment in each step of a span, taken in the step's middle. */
export function heatCurve(track: Track, shots: Shots, fromMs: number, toMs: number, stepS: number): number[] {
  const heat: number[] = [];
  for (let startMs = fromMs; startMs < toMs; startMs = fromMs + heat.length * stepS * 1000) {
    const { rangeKm, elevationRad } = elevationAndRange(track.at(Math.min(toMs, startMs + stepS * 500)));
    heat.push(shots.at(rangeKm, elevationRad).heatJ * shots.repetitionRateHz);
  }
  return heat;
}

/** Seconds from the start of a heat curve until its sum reaches `meltJ`; null when it doesn't. */
export function meltOnset(
  heatW: readonly number[],
  stepS: number,
  lengthS: number,
  meltJ: number,
): number | null {
  let sumJ = 0;
  for (const [i, watts] of heatW.entries()) {
    const seconds = Math.min(stepS, lengthS - i * stepS);
    if (sumJ + watts * seconds >= meltJ) return i * stepS + (meltJ - sumJ) / watts;
    sumJ += watts * seconds;
  }
  return null;
}

/**
 * The shortest lasing in seconds, wherever in the span it begins, that brings the fragment to its melting
 * point: no dwell shorter than this melts it. Null when lasing the whole span doesn't.
 */
export function shortestMeltS(heatW: readonly number[], stepS: number, meltJ: number): number | null {
  let shortest: number | null = null;
  let first = 0;
  let sumJ = 0;
  for (const [last, watts] of heatW.entries()) {
    sumJ += watts * stepS;
    for (let leaving = heatW[first]; leaving !== undefined && sumJ >= meltJ; leaving = heatW[first]) {
      // The run melts the fragment with this much to spare at the end that heats less.
      const slower = Math.min(leaving, watts);
      const spareS = slower > 0 ? Math.min(stepS, (sumJ - meltJ) / slower) : 0;
      const seconds = (last - first + 1) * stepS - spareS;
      shortest = shortest === null ? seconds : Math.min(shortest, seconds);
      sumJ -= leaving * stepS;
      first += 1;
    }
  }
  return shortest;
}
