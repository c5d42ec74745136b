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

/** A bracket so narrow that its ends are the same to any purpose, in units of x. */
const narrow = 1e-12;

/**
 * Where a rising function crosses a level: false position, its older end's miss halved when the same end moves twice
 * (the Illinois rule; Dowell and Jarratt 1971, BIT 11, 168-174), with a halving wherever that is slow.
 */
export function solveRising(at: (x: number) => number, level: number, low: number, high: number): number {
  let [from, to] = [low, high];
  let [under, over] = [at(from) - level, at(to) - level];
  if (under >= 0) return from;
  if (over <= 0) return to;
  let lastSide = 0;
  for (let i = 0; i < 80 && to - from > narrow; i++) {
    const cut = from - (under * (to - from)) / (over - under);
    // Far from the crossing a distribution is flat, and its chord says little: every third step halves.
    const isChord = i % 3 !== 0 && cut > from && cut < to;
    const middle = isChord ? cut : 0.5 * (from + to);
    const miss = at(middle) - level;
    if (miss === 0) return middle;
    const side = miss < 0 ? -1 : 1;
    if (side < 0) {
      [from, under] = [middle, miss];
      if (isChord && lastSide === side) over /= 2;
    } else {
      [to, over] = [middle, miss];
      if (isChord && lastSide === side) under /= 2;
    }
    lastSide = isChord ? side : 0;
  }
  return 0.5 * (from + to);
}
