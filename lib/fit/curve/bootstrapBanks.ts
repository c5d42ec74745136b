import { uniformInt } from 'pure-rand/distribution/uniformInt';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';
import { quantileSorted } from 'simple-statistics';
import { normalCdf, studentTQuantile } from '../distributions';
import type { FadeSeries, PowerLaw } from './powerLaw';
import { refitPowerLaw } from './refitPowerLaw';
import type { RangedFigure } from './types';

export interface BankSeries extends FadeSeries {
  /** Number of the bank of each check, 0 .. bankCount - 1. */
  bankOf: Int32Array;
  bankCount: number;
}

/**
 * Refits the power law to `resamples` draws of banks with replacement: a bank's checks stay together.
 * Seeded, so the same checks in the same order give the same draws.
 */
export function bootstrapBanks(
  series: BankSeries,
  start: PowerLaw,
  options: { seed: number; resamples: number },
): PowerLaw[] {
  const random = xoroshiro128plus(options.seed);
  const checks = series.fade.length;
  const baseWeights = Float64Array.from(series.sd, (sd) => 1 / (sd * sd));
  const weights = new Float64Array(checks);
  const drawn = new Int32Array(series.bankCount);
  return Array.from({ length: options.resamples }, () => {
    drawn.fill(0);
    for (let b = 0; b < series.bankCount; b++) {
      const bank = uniformInt(random, 0, series.bankCount - 1);
      drawn[bank] = (drawn[bank] as number) + 1;
    }
    for (let i = 0; i < checks; i++) {
      weights[i] = (baseWeights[i] as number) * (drawn[series.bankOf[i] as number] as number);
    }
    return refitPowerLaw(series, weights, start);
  });
}

/**
 * 90 % range by the expanded percentile method: plain percentiles of few banks are too narrow, so
 * the tail probability is that of Student's t with banks - 1 degrees of freedom and variance
 * n / (n - 1). Source: T. C. Hesterberg 2015, The American Statistician 69, 371-386, section 5.3.
 */
export function percentileRange(values: Float64Array, estimate: number, bankCount: number): RangedFigure {
  const sorted = values.slice().sort() as unknown as number[];
  const tail = tailProbability(bankCount);
  return {
    estimate,
    lower: Math.min(quantileSorted(sorted, tail), estimate),
    upper: Math.max(quantileSorted(sorted, 1 - tail), estimate),
  };
}

function tailProbability(bankCount: number): number {
  if (bankCount < 2) return 0;
  return normalCdf(Math.sqrt(bankCount / (bankCount - 1)) * studentTQuantile(0.05, bankCount - 1));
}
