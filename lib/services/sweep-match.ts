/** A pass that is stored, or was found, as far as matching goes. */
export interface Culminating {
  readonly stationId: string;
  readonly culminateMs: number;
}

/** Which stored pass each found one continues, which are new, and which stored ones are found no more. */
export interface PassMatch<S, F> {
  readonly kept: readonly { readonly stored: S; readonly found: F }[];
  readonly added: readonly F[];
  readonly missing: readonly S[];
}

/**
 * Matches the found passes of one fragment with the stored ones: the same station, and culminations no
 * farther apart than `withinMs` (a quarter of the period: half a revolution lies between passes at least).
 * The nearest pair goes first, and nothing is matched twice, so that a pass keeps its identity while
 * element sets move it by seconds or minutes.
 */
export function matchPasses<S extends Culminating, F extends Culminating>(
  stored: readonly S[],
  found: readonly F[],
  withinMs: number,
): PassMatch<S, F> {
  const pairs: { stored: S; found: F; apartMs: number }[] = [];
  for (const s of stored) {
    for (const f of found) {
      const apartMs = Math.abs(s.culminateMs - f.culminateMs);
      if (s.stationId === f.stationId && apartMs <= withinMs) pairs.push({ stored: s, found: f, apartMs });
    }
  }
  pairs.sort((a, b) => a.apartMs - b.apartMs);
  const usedStored = new Set<S>();
  const usedFound = new Set<F>();
  const kept: { stored: S; found: F }[] = [];
  for (const pair of pairs) {
    if (usedStored.has(pair.stored) || usedFound.has(pair.found)) continue;
    usedStored.add(pair.stored);
    usedFound.add(pair.found);
    kept.push({ stored: pair.stored, found: pair.found });
  }
  return {
    kept,
    added: found.filter((f) => !usedFound.has(f)),
    missing: stored.filter((s) => !usedStored.has(s)),
  };
}
