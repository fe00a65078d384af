/** Percentiles of a result; P10 is the lowest. */
export interface Band {
  readonly p10: number;
  readonly p50: number;
  readonly p90: number;
}

/** One outcome and how much it counts. */
export interface WeightedValue {
  readonly value: number;
  readonly weight: number;
}

/** P10, P50 and P90 of weighted outcomes in any order; NaN when there are none. */
export function bandOf(outcomes: readonly WeightedValue[]): Band {
  const sorted = [...outcomes].sort((a, b) => a.value - b.value);
  const total = sorted.reduce((sum, o) => sum + o.weight, 0);
  return {
    p10: percentile(sorted, 0.1 * total),
    p50: percentile(sorted, 0.5 * total),
    p90: percentile(sorted, 0.9 * total),
  };
}

/** The value below which so much weight lies; each outcome stands in the middle of its own weight. */
function percentile(sorted: readonly WeightedValue[], wanted: number): number {
  let below = 0;
  let lastAt = 0;
  let lastValue = sorted[0]?.value ?? Number.NaN;
  for (const { value, weight } of sorted) {
    const at = below + weight / 2;
    if (at >= wanted) {
      return at > lastAt ? lastValue + ((wanted - lastAt) / (at - lastAt)) * (value - lastValue) : value;
    }
    below += weight;
    lastAt = at;
    lastValue = value;
  }
  return lastValue;
}
