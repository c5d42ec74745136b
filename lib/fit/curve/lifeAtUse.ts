import { fadeAt } from './powerLaw';
import { statusAt } from './status';
import type { CurveFit, LifeStatus, RangedFigure } from './types';

export interface LifeAtUse {
  efcPerYear: number;
  years: RangedFigure;
  efc: RangedFigure;
  /** Reach at this use: the nearer of the years and the EFC of the readings. */
  reachYears: number;
  /** Capacity left at that reach, fraction of rated capacity: estimate only, the curve carries the band. */
  capacityAtReach: number;
  status: LifeStatus;
}

/**
 * Life until 80 % for a use of `efcPerYear` equivalent full cycles per year, by cycles alone.
 * Status against min(reach in years, reach in EFC / EFC per year). Throws RangeError unless positive.
 */
export function lifeAtUse(curve: CurveFit, efcPerYear: number): LifeAtUse {
  if (!(efcPerYear > 0) || !Number.isFinite(efcPerYear)) {
    throw new RangeError('lifeAtUse requires a positive number of EFC per year');
  }
  const { estimate, lower, upper } = curve.efcTo80;
  const years = { estimate: estimate / efcPerYear, lower: lower / efcPerYear, upper: upper / efcPerYear };
  const reachYears = Math.min(curve.reach.years, curve.reach.efc / efcPerYear);
  const law = { k: curve.k.estimate, z: curve.z.estimate };
  return {
    efcPerYear,
    years,
    efc: curve.efcTo80,
    reachYears,
    capacityAtReach: 1 - fadeAt(law, reachYears * efcPerYear),
    status: statusAt(years.estimate, reachYears),
  };
}
