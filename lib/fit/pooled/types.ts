import type { FitComponent } from './mixture';
import type { ParameterName } from './parameters';
import type { Use } from './use';

/** An estimate with the ends of its 90 % range. */
export interface Ranged {
  estimate: number;
  lower: number;
  upper: number;
}

/** The part of a fit that is published and enough to compute lives and fade with their ranges. */
export interface PublishedFit {
  components: FitComponent[];
  priors: { name: ParameterName; mean: number; sd: number; source: string }[];
  cellTypes: CellTypeRow[];
  /** 95 % quantile of Student's t with cell types + 4 degrees of freedom; widens lives and fade. */
  tQuantile: number;
  reach: Reach;
}

/** One cell type of a fit. */
export interface CellTypeRow {
  cellType: string;
  /** Effect on ln q: above 0 fades faster than the average cell type. */
  m: number;
  se: number;
  banks: number;
  owners: number;
  checks: number;
  /** 1 - se² / sm²: how much of the figure is the cell type's own. */
  ownShare: number;
  reach: { years: number; efc: number };
}

/** How far the checks reach: 95 % quantiles, and the middle 95 % of each condition. */
export interface Reach {
  years: number;
  efc: number;
  conditions: { condition: ConditionName; from: number; to: number }[];
  clampedBanks: number;
  unclampedBanks: number;
}

export type ConditionName = Exclude<keyof Use, 'isClamped'>;

/** How a life stands to what was measured. */
export type PooledLifeStatus = 'measured' | 'projected' | 'extrapolated' | 'beyond';

/** A condition of a use that the pool does not cover, with the nearest value it does. */
export interface OutsidePool {
  condition: ConditionName | 'isClamped';
  value: number | boolean;
  nearest: number | boolean;
}

/** Life of a use. `beyond` means that pages give no number; command line and API carry it with its status. */
export interface PooledLife {
  lnT80: { estimate: number; se: number };
  years: Ranged;
  efc: Ranged;
  /** Years within which 8 of 10 banks reach 80 %. */
  rangeOfBanks: { lower: number; upper: number };
  rangeOfBanksEfc: { lower: number; upper: number };
  /** q after 8 years, as a share of the start capacity. */
  fadeAt8y: Ranged;
  /** Years up to which this use is measured. */
  reach: number;
  /** Capacity left at reach, share of the rating. */
  capacityAtReach: Ranged;
  status: PooledLifeStatus;
  priorShare: number;
  /** `shown`, `leans` on published studies (25-50 %), or `notMeasured` (over 50 %: no number on a page). */
  support: 'shown' | 'leans' | 'notMeasured';
  /** Whose figure it is: a cell type with enough banks, the average cell type, or the pool in place of one with too few. */
  basis: 'cellType' | 'average' | 'pool';
  outside: OutsidePool[];
}
