import { derive } from './derived';
import { fadePoint } from './fade';
import type { LifeOptions } from './life';
import { checkQuantiles } from './newCheck';
import { at } from './parameters';
import type { PublishedFit, Ranged } from './types';
import type { Use } from './use';

/**
 * Capacity left of new banks of a use at an age, share of the rating: quantiles over banks, over the unknown parameters
 * and, unless a cell type has enough banks, over cell types. Equation 21 of the README without a meter's noise.
 * @param probabilities from 0 to 1, such as 0.1 for the tenth of banks with the least left
 */
export function banksAt(
  fit: PublishedFit,
  use: Use,
  years: number,
  probabilities: readonly number[],
  options: LifeOptions = {},
): number[] {
  return checkQuantiles(fit, use, years, 0, { ...options, probabilities });
}

/**
 * Share of a fade that the calendar has taken, GA / (GA + GB), with its 90 % range on the logit scale; the rest is
 * cycling's. The same for all banks and cell types of a use.
 */
export function calendarShareAt(fit: PublishedFit, use: Use, years: number): Ranged {
  const { mean, se } = derive(fit, { kind: 'average' }, ({ psi, exponent }) => {
    const { calendarShare, slope } = fadePoint({ psi, exponent }, use, years);
    const rest = 1 - calendarShare;
    // The slope of ln q holds dln GA times the share and dln GB times the rest; the logit is ln GA - ln GB.
    const gradient = Array.from(slope, (value, i) => (i < at.lnB ? value / calendarShare : -value / rest));
    return { value: Math.log(calendarShare / rest), gradient };
  });
  const share = (logit: number) => 1 / (1 + Math.exp(-logit));
  return {
    estimate: share(mean),
    lower: share(mean - fit.tQuantile * se),
    upper: share(mean + fit.tQuantile * se),
  };
}
