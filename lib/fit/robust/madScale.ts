import { medianAbsoluteDeviation } from 'simple-statistics';

/** 1 / quantile(3/4) of the standard normal distribution, as rounded by convention (R's mad). */
const NORMAL_CONSISTENCY = 1.4826;

/**
 * Standard deviation estimated by the median absolute deviation about the median, which half of the values
 * being wild cannot carry away. Throws RangeError on no values.
 */
export function madScale(values: readonly number[]): number {
  if (values.length === 0) throw new RangeError('madScale requires at least one value');
  return NORMAL_CONSISTENCY * medianAbsoluteDeviation([...values]);
}
