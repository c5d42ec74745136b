/**
 * One approved capacity check as the fit sees it. Conditions are the conditions to date (since new),
 * the capacity is already at reference conditions (25 °C, 0.2 It).
 */
export interface PoolCheck {
  /** Key of the bank; checks of one bank belong together. */
  bank: string;
  /** Key of the owner; counts behind published figures are counts of owners. */
  owner: string;
  /** Key of the cell type. */
  cellType: string;
  /** Held between end plates (rigid or sprung) for more than half of the full cycles. */
  isClamped: boolean;
  /** Typical depth of discharge, 0..1. */
  depthFraction: number;
  /** Mean discharge rate, It (1/h). */
  dischargeIt: number;
  /** Mean cell temperature, °C. */
  temperatureC: number;
  /** Mean state of charge, 0..1. */
  socMeanFraction: number;
  /** Years since first use. */
  ageYears: number;
  /** Equivalent full cycles since new. */
  efc: number;
  /** Rated capacity, Ah (any level, cell or bank, as long as capacityAh is of the same). */
  ratedAh: number;
  /** Measured capacity at reference conditions, Ah. */
  capacityAh: number;
  /** Relative standard deviation of what is new at each check (0.012 = 1.2 %). */
  relSd: number;
  /** Where temperatureC comes from (default metered); ranges of the effect of heat allow for guesses. */
  temperatureSource?: ValueSource;
  /** Where socMeanFraction comes from (default metered). */
  socSource?: ValueSource;
  /** Clamping changed more than once since new: the bank is left out of the fit and of every contrast. */
  isClampingUnclear?: boolean;
  /** Marked as a real failure: the outlier screen neither takes it out nor judges its neighbours by it. */
  isKept?: boolean;
  /** The bank is known to have failed by this check; on its last one, also since then. */
  hasFailed?: boolean;
}

/** How a value was obtained. */
export type ValueSource = 'metered' | 'readOff' | 'estimated';
