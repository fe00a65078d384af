/**
 * Hermite's polynomial of degree five through value, rate and second rate at both ends of `s` seconds; `t`
 * from 0 to 1 between them.
 */
export function quintic(
  r0: number,
  v0: number,
  a0: number,
  r1: number,
  v1: number,
  a1: number,
  t: number,
  s: number,
): number {
  const c1 = v0 * s;
  const c2 = 0.5 * a0 * s * s;
  const miss = r1 - r0 - c1 - c2;
  const missRate = v1 * s - c1 - 2 * c2;
  const missSecond = a1 * s * s - 2 * c2;
  const c3 = 10 * miss - 4 * missRate + 0.5 * missSecond;
  const c4 = -15 * miss + 7 * missRate - missSecond;
  const c5 = 6 * miss - 3 * missRate + 0.5 * missSecond;
  return r0 + t * (c1 + t * (c2 + t * (c3 + t * (c4 + t * c5))));
}

/** Hermite's polynomial of degree three through value and rate at both ends of `s` seconds; `t` from 0 to 1. */
export function cubic(v0: number, a0: number, v1: number, a1: number, t: number, s: number): number {
  const c1 = a0 * s;
  const miss = v1 - v0 - c1;
  const missRate = a1 * s - c1;
  return v0 + t * (c1 + t * (3 * miss - missRate + t * (missRate - 2 * miss)));
}
