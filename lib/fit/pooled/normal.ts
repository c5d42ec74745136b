/**
 * Standard normal distribution function, to about 1e-14: the series phi(x) (x + x³/3 + x⁵/15 + ...)
 * (Abramowitz & Stegun 26.2.11), 0 or 1 beyond 8. Kept apart from the numeric packages because pages load it.
 */
export function standardNormalCdf(x: number): number {
  if (x > 8) return 1;
  if (x < -8) return 0;
  let term = x;
  let sum = x;
  for (let k = 3; Math.abs(term) > 1e-17 * Math.abs(sum) && k < 400; k += 2) {
    term *= (x * x) / k;
    sum += term;
  }
  return 0.5 + sum * Math.exp(-0.5 * x * x) * 0.3989422804014327;
}

/** 95 % quantile of the standard normal: half width of a 90 % range in se. */
export const z90 = 1.6448536269514722;

/** Where a rising function crosses a level, by bisection. */
export function solveRising(at: (x: number) => number, level: number, low: number, high: number): number {
  let from = low;
  let to = high;
  for (let i = 0; i < 44; i++) {
    const middle = 0.5 * (from + to);
    if (at(middle) < level) from = middle;
    else to = middle;
  }
  return 0.5 * (from + to);
}
