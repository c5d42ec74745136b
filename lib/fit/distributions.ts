import jStat from 'jstat';

/** Quantile of Student's t. `probability` in (0, 1), `degreesOfFreedom` > 0. */
export function studentTQuantile(probability: number, degreesOfFreedom: number): number {
  if (!(probability > 0 && probability < 1) || !(degreesOfFreedom > 0)) {
    throw new RangeError('studentTQuantile requires a probability in (0, 1) and positive degrees of freedom');
  }
  return jStat.studentt.inv(probability, degreesOfFreedom);
}

/** Quantile of the standard normal distribution. `probability` in (0, 1). */
export function normalQuantile(probability: number): number {
  if (!(probability > 0 && probability < 1)) {
    throw new RangeError('normalQuantile requires a probability in (0, 1)');
  }
  return jStat.normal.inv(probability, 0, 1);
}

/** Distribution function of the standard normal distribution. */
export function normalCdf(x: number): number {
  return jStat.normal.cdf(x, 0, 1);
}
