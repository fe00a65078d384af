import type { Orbit } from "@/lib/physics/orbit/propagate";
import { findPasses, type PassEvent } from "@/lib/physics/passes/find-passes";
import { isoTime } from "@/lib/physics/time";
import type { SweepStation } from "./sweep-ground";

const HOUR_MS = 3_600_000;

/**
 * A pass that lasts longer is not worked out: the object stands too far out for a ground laser (a low one
 * is up for minutes, a circular orbit at 5,000 km for about an hour), and its screening would take minutes.
 */
const LONGEST_MS = 2 * HOUR_MS;

/** Searched beyond both ends, so that no pass that is kept is cut by an end. */
const MARGIN_MS = LONGEST_MS + HOUR_MS;

/** A pass over one station of the sweep. */
export interface FoundPass {
  readonly station: SweepStation;
  readonly stationId: string;
  readonly culminateMs: number;
  readonly event: PassEvent;
}

/** The part of time that is swept, and the moment it happens. */
export interface SweepSpan {
  readonly fromMs: number;
  readonly toMs: number;
  readonly nowMs: number;
}

/**
 * The passes of one orbit that are not over now and rise before `toMs + margin`; those that rise after
 * `toMs` are there for matching only. Failures are sentences. The search begins where the sweep does,
 * whatever the time: done again later it finds the same to the last digit.
 */
export function findForSweep(
  orbit: Orbit,
  stations: readonly SweepStation[],
  span: SweepSpan,
): { passes: FoundPass[]; failures: string[] } {
  const { passes, failure } = findPasses(orbit, stations, span.fromMs - MARGIN_MS, span.toMs + MARGIN_MS);
  const overMs = Math.max(span.fromMs, span.nowMs);
  const failures = failure === null ? [] : [failure];
  const found: FoundPass[] = [];
  const tooLong = new Map<string, number>();
  for (const { stationIndex, pass } of passes) {
    const station = stations[stationIndex];
    if (!station || pass.setMs <= overMs) continue;
    if (pass.setMs - pass.riseMs > LONGEST_MS) {
      if (!tooLong.has(station.name)) tooLong.set(station.name, pass.riseMs);
      continue;
    }
    found.push({ station, stationId: station.id, culminateMs: Math.round(pass.culminateMs), event: pass });
  }
  for (const [name, riseMs] of tooLong) {
    failures.push(
      `Passes longer than 2 h over ${name} are not worked out (one from ${isoTime(Math.round(riseMs))}).`,
    );
  }
  return { passes: found, failures };
}
