/** A figure with its 90 % range. */
export interface RangedFigure {
  estimate: number;
  lower: number;
  upper: number;
}

/** How far a figure lies from what was measured: within reach, to 2x, to 3x, further. */
export type LifeStatus = 'measured' | 'projected' | 'extrapolated' | 'beyond';

/** Capacity left after `efc` equivalent full cycles, as a fraction of rated capacity. */
export interface CurvePoint {
  efc: number;
  capacityFraction: number;
  lower: number;
  upper: number;
  status: LifeStatus;
}

/** A power law of fade, q = k (efc / 500)^z, over one group of checks, with 90 % ranges over its banks. */
export interface CurveFit {
  ok: true;
  /** Fade at 500 EFC, fraction of rated capacity. */
  k: RangedFigure;
  /** Exponent of EFC. */
  z: RangedFigure;
  /** Set when z ended on the edge of its allowed range: the checks do not tell its value. */
  zBound: 'lower' | 'upper' | null;
  owners: number;
  banks: number;
  checks: number;
  /** 95 % quantiles of the checks: how far the readings go. */
  reach: { efc: number; years: number };
  /** Mean over the banks of EFC per year at the last check. */
  efcPerYear: number;
  /** Capacity left at reach: measured, not projected. */
  capacityAtReach: RangedFigure;
  /** EFC until 80 % of rated capacity; show the number only as `status` allows. */
  efcTo80: RangedFigure;
  status: LifeStatus;
  /** From 0 to three times the reach, evenly spaced; reach and twice reach are grid points. */
  points: CurvePoint[];
  /** Resamples of banks behind the ranges. */
  resamples: number;
}

/** Why a group has no curve: a result, not a mistake. */
export type CurveRefusalReason =
  'tooFewOwners' | 'tooFewChecks' | 'tooLittleSpread' | 'noFade' | 'notConverged' | 'protectsOthers';

export interface CurveRefusal {
  ok: false;
  reason: CurveRefusalReason;
}

export type CurveResult = CurveFit | CurveRefusal;
