import type { PooledLife, PublishedFit } from './types';
import type { FadeAtReference } from './atReference';
import type { BalanceRow } from './balance';
import type { Effect, InputReliability } from './effects';
import type { BankInfluence } from './influence';
import type { Interaction } from './interactions';
import type { MatchedContrast } from './matched';
import type { Prior } from './priors';
import type { Scenario } from './use';
import type { Exclusion, PoolProblem } from './validate';

/** Options of a pooled fit. */
export interface FitPoolOptions {
  /** Fix the calendar exponent; default: mixed over its prior. */
  exponent?: number;
  /** Look for outliers and leave them out (default true). */
  isScreening?: boolean;
  priors?: readonly Prior[];
  scenarios?: readonly Scenario[];
  /** Lives of one cell type in place of the average one. */
  cellType?: string;
  /** Checksum of the data, passed through into the answer. */
  sha256?: string;
  /** An earlier fit of nearly the same pool, to start from. */
  warmStart?: PublishedFit;
  /** Leave out the refits for interactions (and with them clamping by rate class). */
  isWithoutInteractions?: boolean;
  /** Asked often; true ends the fit with kind `stopped`. */
  shouldStop?: () => boolean;
}

/** Why there is no fit. */
export interface FitRefusal {
  ok: false;
  kind: 'input' | 'unconverged' | 'stopped';
  reason: string;
  converged: false;
  problems?: PoolProblem[];
}

/** A check the screen found; `row` is its place in the caller's list, from 0. */
export interface ScreenRow {
  row: number;
  bank: string;
  t: number;
  action: 'quarantine' | 'list';
}

/** Banks and owners of one rate class. */
export interface ClampingClass {
  rateClass: 'below' | 'above';
  cutIt: number;
  clamped: { banks: number; owners: number };
  unclamped: { banks: number; owners: number };
}

/** One parameter of the fit, mixed over exponents. */
export interface ParameterRow {
  name: string;
  estimate: number;
  se: number;
  priorMean: number;
  priorSd: number;
  priorShare: number;
}

/** A fit of the whole pool, as JSON. Lists are empty where a thing was not asked for. */
export interface PooledFit extends PublishedFit {
  ok: true;
  converged: true;
  /** Newton iterations of the first fit, and of all refits together. */
  iterations: number;
  totalIterations: number;
  data: {
    rows: number;
    used: number;
    banks: number;
    owners: number;
    cellTypes: number;
    sha256: string | null;
  };
  exponent: { mode: 'mixed' | 'fixed'; value?: number; weights?: { exponent: number; weight: number }[] };
  objective: number;
  parameters: ParameterRow[];
  covariance: number[][];
  atReference: FadeAtReference;
  lifetimes: (PooledLife & { scenario: string; use: Scenario })[];
  effects: Effect[];
  interactions: Interaction[];
  clampingClasses: ClampingClass[];
  screen: ScreenRow[];
  screenRounds: number;
  /** Checks that no fit takes: out of range (also in `screen`), or of banks whose clamping is unclear. */
  excluded: Exclusion[];
  influence: BankInfluence[];
  balance: BalanceRow[];
  matched: MatchedContrast;
  reliability: InputReliability;
  /** What can't be told from this pool, and what to bear in mind, in words. */
  statements: string[];
}

export type FitPoolResult = PooledFit | FitRefusal;
