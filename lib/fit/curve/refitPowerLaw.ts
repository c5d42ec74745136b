import { K_RANGE, Z_RANGE, type FadeSeries, type PowerLaw } from './powerLaw';

const MAX_STEPS = 40;
const SECTION_STEPS = 60;
const STEP_GOAL = 1e-9;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

/**
 * The same weighted fit as fitPowerLaw with changed weights, from a near start: what a resample of
 * banks needs thousands of times. Gauss-Newton on (ln k, z) written out, without matrices; a section
 * search over z with k in closed form where that does not settle. `weights` are 1/sd^2 times how
 * often the check's bank was drawn.
 */
export function refitPowerLaw(series: FadeSeries, weights: Float64Array, start: PowerLaw): PowerLaw {
  let logK = Math.log(start.k);
  let z = start.z;
  let here = normalEquations(series, weights, Math.exp(logK), z);
  for (let step = 0; step < MAX_STEPS; step++) {
    const determinant = here.kk * here.zz - here.kz * here.kz;
    if (!(determinant > 1e-12 * here.kk * here.zz)) break;
    const deltaLogK = (here.zz * here.kr - here.kz * here.zr) / determinant;
    const deltaZ = (here.kk * here.zr - here.kz * here.kr) / determinant;
    if (Math.abs(deltaLogK) < STEP_GOAL && Math.abs(deltaZ) < STEP_GOAL) {
      return isInside(Math.exp(logK), z) ? { k: Math.exp(logK), z } : sectionSearch(series, weights);
    }
    let share = Math.min(1, 1 / Math.max(Math.abs(deltaLogK), 2 * Math.abs(deltaZ)));
    let next = here;
    for (let halving = 0; halving < 12; halving++) {
      next = normalEquations(series, weights, Math.exp(logK + share * deltaLogK), z + share * deltaZ);
      if (next.rss < here.rss) break;
      share /= 2;
    }
    if (!(next.rss < here.rss)) {
      // Rounding allows no further decrease: near enough when the step left is small.
      const isSettled = Math.abs(deltaLogK) < 1e-6 && Math.abs(deltaZ) < 1e-6;
      if (isSettled && isInside(Math.exp(logK), z)) return { k: Math.exp(logK), z };
      break;
    }
    logK += share * deltaLogK;
    z += share * deltaZ;
    here = next;
    if (z < Z_RANGE.lower - 1 || z > Z_RANGE.upper + 1) break;
  }
  return sectionSearch(series, weights);
}

const isInside = (k: number, z: number) =>
  k >= K_RANGE.lower && k <= K_RANGE.upper && z >= Z_RANGE.lower && z <= Z_RANGE.upper;

function normalEquations(series: FadeSeries, weights: Float64Array, k: number, z: number) {
  const { logEfc, fade } = series;
  let rss = 0;
  let kk = 0;
  let kz = 0;
  let zz = 0;
  let kr = 0;
  let zr = 0;
  for (let i = 0; i < weights.length; i++) {
    const weight = weights[i] as number;
    if (weight === 0) continue;
    const log = logEfc[i] as number;
    const value = k * Math.exp(z * log);
    const residual = (fade[i] as number) - value;
    const weighted = weight * value;
    rss += weight * residual * residual;
    kk += weighted * value;
    kz += weighted * value * log;
    zz += weighted * value * log * log;
    kr += weighted * residual;
    zr += weighted * residual * log;
  }
  return { rss, kk, kz, zz, kr, zr };
}

// For given z the best k is linear; a coarse grid over z keeps the section search off a side minimum.
function sectionSearch(series: FadeSeries, weights: Float64Array): PowerLaw {
  const gridSize = 18;
  const width = (Z_RANGE.upper - Z_RANGE.lower) / gridSize;
  let best: { z: number; rss: number } = { z: Z_RANGE.lower, rss: Infinity };
  for (let g = 0; g <= gridSize; g++) {
    const z = Z_RANGE.lower + g * width;
    const { rss } = bestFade(series, weights, z);
    if (rss < best.rss) best = { z, rss };
  }
  let low: number = Math.max(best.z - width, Z_RANGE.lower);
  let high: number = Math.min(best.z + width, Z_RANGE.upper);
  let left = high - GOLDEN * (high - low);
  let right = low + GOLDEN * (high - low);
  let rssLeft = bestFade(series, weights, left).rss;
  let rssRight = bestFade(series, weights, right).rss;
  for (let step = 0; step < SECTION_STEPS && high - low > 1e-8; step++) {
    if (rssLeft <= rssRight) {
      [high, right, rssRight] = [right, left, rssLeft];
      left = high - GOLDEN * (high - low);
      rssLeft = bestFade(series, weights, left).rss;
    } else {
      [low, left, rssLeft] = [left, right, rssRight];
      right = low + GOLDEN * (high - low);
      rssRight = bestFade(series, weights, right).rss;
    }
  }
  const middle = (low + high) / 2;
  const z = bestFade(series, weights, middle).rss <= best.rss ? middle : best.z;
  return { k: bestFade(series, weights, z).k, z };
}

function bestFade(series: FadeSeries, weights: Float64Array, z: number): { k: number; rss: number } {
  let squares = 0;
  let products = 0;
  let total = 0;
  for (let i = 0; i < weights.length; i++) {
    const weight = weights[i] as number;
    if (weight === 0) continue;
    const power = Math.exp(z * (series.logEfc[i] as number));
    const fade = series.fade[i] as number;
    squares += weight * power * power;
    products += weight * power * fade;
    total += weight * fade * fade;
  }
  const k = Math.min(Math.max(products / squares, K_RANGE.lower), K_RANGE.upper);
  return { k, rss: total - 2 * k * products + k * k * squares };
}
