/** Repeatable numbers for the invented demo: a multiply-with-xorshift generator, seeded by name. */
export interface Random {
  /** Uniform in [from, to). */
  between(from: number, to: number): number;
  /** About normal, by the sum of six uniforms. */
  around(mean: number, deviation: number): number;
  pick<T>(items: readonly T[]): T;
}

/** A generator whose sequence depends only on `seedText`. */
export function randomFrom(seedText: string): Random {
  let state = 0x9e3779b9;
  for (const ch of seedText) state = Math.imul(state ^ (ch.codePointAt(0) ?? 0), 0x85ebca6b) >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = Math.imul(state ^ (state >>> 15), state | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
  const between = (from: number, to: number): number => from + (to - from) * next();
  return {
    between,
    around(mean, deviation) {
      let sum = 0;
      for (let i = 0; i < 6; i++) sum += next();
      // Six uniforms have variance 1/2.
      return mean + (sum - 3) * Math.SQRT2 * deviation;
    },
    pick(items) {
      const item = items[Math.floor(next() * items.length)];
      if (item === undefined) throw new Error("nothing to pick from");
      return item;
    },
  };
}
