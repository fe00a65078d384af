/**
 * Complementary error function, to some 1e-14 of its value also far out in the tail: by its power series
 * below 2.5 and by its continued fraction from there (Abramowitz and Stegun, 7.1.6 and 7.1.14).
 */
export function erfc(x: number): number {
  if (x < 0) return 2 - erfc(-x);
  if (x < 2.5) return 1 - erfSeries(x);
  if (x > 27) return 0;
  // Modified Lentz evaluation of 1/(x + (1/2)/(x + 1/(x + (3/2)/(x + ...)))).
  let [f, c, d] = [x, x, 0];
  for (let k = 1; k < 200; k++) {
    d = 1 / (x + (k / 2) * d);
    c = x + k / 2 / c;
    f *= c * d;
    if (Math.abs(c * d - 1) < 1e-16) break;
  }
  return Math.exp(-x * x) / (f * Math.sqrt(Math.PI));
}

function erfSeries(x: number): number {
  let term = x;
  let sum = x;
  for (let n = 1; Math.abs(term) > 1e-17 * Math.abs(sum); n++) {
    term *= (2 * x * x) / (2 * n + 1);
    sum += term;
  }
  return (2 / Math.sqrt(Math.PI)) * Math.exp(-x * x) * sum;
}

/** Probability that a normal variable of mean 0 and standard deviation 1 lies between two values, a < b. */
export function normalBetween(a: number, b: number): number {
  // Both ends are taken to the same tail, where no digits cancel against 1.
  if (a > 0) return (erfc(a / Math.SQRT2) - erfc(b / Math.SQRT2)) / 2;
  if (b < 0) return (erfc(-b / Math.SQRT2) - erfc(-a / Math.SQRT2)) / 2;
  return 1 - (erfc(-a / Math.SQRT2) + erfc(b / Math.SQRT2)) / 2;
}
