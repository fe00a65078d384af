import { ecfToLookAngles, eciToEcf, gstime, propagate, type SatRec } from "satellite.js";
import type { Site } from "@/lib/physics/orbit/elements";

/** Start and end of a time above the limit, Unix ms. */
export interface Found {
  readonly riseMs: number;
  readonly setMs: number;
}

/**
 * The way passes are usually found: satellite.js every 30 seconds for all stations, each crossing of the
 * limit halved down to 10 ms. The benchmark's slow side; nothing of the product is used here.
 */
export function scanPasses(
  satrec: SatRec,
  sites: readonly Site[],
  limitRad: number,
  fromMs: number,
  toMs: number,
): Found[][] {
  const observers = sites.map((s) => ({
    latitude: (s.latitudeDeg * Math.PI) / 180,
    longitude: (s.longitudeDeg * Math.PI) / 180,
    height: s.altitudeM / 1000,
  }));
  const found: Found[][] = sites.map(() => []);
  const above: (number | null)[] = sites.map(() => null);
  const elevations = (atMs: number): number[] => {
    const at = new Date(atMs);
    const got = propagate(satrec, at);
    if (!got) return observers.map(() => -1);
    const ecf = eciToEcf(got.position, gstime(at));
    return observers.map((o) => ecfToLookAngles(o, ecf).elevation);
  };
  const crossing = (k: number, lo: number, hi: number, rising: boolean): number => {
    let [a, b] = [lo, hi];
    while (b - a > 10) {
      const middle = (a + b) / 2;
      if ((elevations(middle)[k] as number) > limitRad === rising) b = middle;
      else a = middle;
    }
    return b;
  };
  let before = elevations(fromMs);
  before.forEach((e, k) => {
    if (e > limitRad) above[k] = fromMs;
  });
  for (let atMs = fromMs; atMs < toMs; ) {
    const nextMs = Math.min(toMs, atMs + 30_000);
    const now = elevations(nextMs);
    for (const [k, e] of now.entries()) {
      const was = before[k] as number;
      if (was <= limitRad && e > limitRad) above[k] = crossing(k, atMs, nextMs, true);
      const riseMs = above[k];
      if (was > limitRad && e <= limitRad && riseMs != null) {
        found[k]?.push({ riseMs, setMs: crossing(k, atMs, nextMs, false) });
        above[k] = null;
      }
    }
    before = now;
    atMs = nextMs;
  }
  above.forEach((riseMs, k) => {
    if (riseMs !== null) found[k]?.push({ riseMs, setMs: toMs });
  });
  return found;
}
