import type { LinearFit } from '../linearLeastSquares';

export interface Influence {
  /** Diagonal of the hat matrix. */
  leverage: number;
  /** Residual over its own standard deviation. */
  standardised: number;
  /** The same with the scatter estimated without the observation. */
  studentised: number;
  /** Change of its own fitted value, in standard errors, when it is left out. */
  dffits: number;
  /** Cook's distance: change of all fitted values when it is left out. */
  cook: number;
}

/**
 * What leaving out each observation would change in a linear fit, without refitting.
 * Source: R. D. Cook 1977, Technometrics 19, 15-18; Belsley, Kuh and Welsch 1980, Regression Diagnostics,
 * chapter 2. NaN where an observation determines its own fitted value (leverage 1).
 */
export function influenceOf(fit: LinearFit): Influence[] {
  const { residuals, leverage, residualSd, degreesOfFreedom, coefficients } = fit;
  return residuals.map((residual, i) => {
    const hat = leverage[i] as number;
    const standardised = residual / (residualSd * Math.sqrt(1 - hat));
    const without = Math.sqrt((degreesOfFreedom - standardised ** 2) / (degreesOfFreedom - 1));
    const studentised = standardised / without;
    const odds = hat / (1 - hat);
    return {
      leverage: hat,
      standardised,
      studentised,
      dffits: studentised * Math.sqrt(odds),
      cook: (standardised ** 2 * odds) / coefficients.length,
    };
  });
}
