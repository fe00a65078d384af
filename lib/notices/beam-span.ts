import { lookAngles, type SiteFrame, temeToEcef } from "@/lib/physics/frames/earth";
import type { Orbit } from "@/lib/physics/orbit/propagate";
import type { BeamPoint, BeamSpan } from "./notice-facts";

const STEP_MS = 1000;

/** Where the beam points over a dwell, by the second; null when the orbit fails anywhere in it. */
export function beamSpan(orbit: Orbit, frame: SiteFrame, fromMs: number, toMs: number): BeamSpan | null {
  const start = pointAt(orbit, frame, fromMs);
  const end = pointAt(orbit, frame, toMs);
  if (start === null || end === null) return null;
  let minElevationDeg = Math.min(start.elevationDeg, end.elevationDeg);
  let maxElevationDeg = Math.max(start.elevationDeg, end.elevationDeg);
  for (let atMs = fromMs + STEP_MS; atMs < toMs; atMs += STEP_MS) {
    const point = pointAt(orbit, frame, atMs);
    if (point === null) return null;
    minElevationDeg = Math.min(minElevationDeg, point.elevationDeg);
    maxElevationDeg = Math.max(maxElevationDeg, point.elevationDeg);
  }
  return { start, end, minElevationDeg, maxElevationDeg };
}

function pointAt(orbit: Orbit, frame: SiteFrame, atMs: number): BeamPoint | null {
  const propagation = orbit.stateAt(atMs);
  if (!propagation.ok) return null;
  const look = lookAngles(frame, temeToEcef(propagation.state, atMs));
  return {
    azimuthDeg: ((look.azimuthRad * 180) / Math.PI + 360) % 360,
    elevationDeg: (look.elevationRad * 180) / Math.PI,
    rangeKm: look.rangeKm,
  };
}
