import type { PoolCheck } from '../poolCheck';
import { fitComponents } from './components';
import { refitInteractions, type InteractionRefits } from './clampingByRate';
import type { Maximum } from './maximise';
import { defaultPriors, type Prior } from './priors';
import { fitScreened } from './screenedFit';
import { summarise, type PoolEstimates } from './summarise';
import { arrangePool, leaveOut } from './table';
import { findExclusions, findProblems, type Exclusion } from './validate';
import { centresFrom } from './warmStart';
import type { FitPoolOptions, FitPoolResult, FitRefusal } from './fitTypes';

const defaultExponent = 0.5;

/**
 * Fit the pooled fade model to a pool of checks: screen, estimate over calendar exponents, and summarise as lives,
 * effects, interactions, influence and balance. Pure and synchronous; the method stands in lib/fit/README.md.
 * @returns the fit as JSON, or why there is none: input refused (with rows and columns), not converged, or stopped
 * @throws RangeError when priors or the fixed exponent have no sense
 */
export function fitPool(checks: readonly PoolCheck[], options: FitPoolOptions = {}): FitPoolResult {
  const priors = options.priors ?? defaultPriors;
  requireOptions(options, priors);
  if (checks.length === 0) return refuse('input', 'the pool holds no checks');
  const problems = findProblems(checks);
  const first = problems[0];
  if (first) {
    return { ...refuse('input', `row ${first.row + 1}, ${first.column}: ${first.message}`), problems };
  }
  const excluded = findExclusions(checks);
  if (excluded.length === checks.length) {
    return refuse('input', `no check can be used: ${excluded[0]?.reason ?? 'none is in range'}`);
  }
  if (options.cellType !== undefined && !checks.some((check) => check.cellType === options.cellType)) {
    return refuse('input', `the pool has no cell type "${options.cellType}"`);
  }
  const estimates = estimate(checks, excluded, priors, options);
  if ('ok' in estimates) return refuse(estimates.kind, estimates.reason);
  return summarise(checks, estimates, options);
}

function estimate(
  checks: readonly PoolCheck[],
  excluded: Exclusion[],
  priors: readonly Prior[],
  options: FitPoolOptions,
): PoolEstimates | Extract<Maximum, { ok: false }> {
  const { shouldStop } = options;
  const unclear = new Set(excluded.filter((one) => !one.isOutOfRange).map(({ row }) => row));
  const outOfRange = new Set(excluded.filter((one) => one.isOutOfRange).map(({ row }) => row));
  const arranged = arrangePool(
    checks,
    [...checks.keys()].filter((row) => !unclear.has(row)),
  );
  const table = leaveOut(arranged, (row) => outOfRange.has(arranged.inputRow[row]!));
  const exponent = options.exponent ?? defaultExponent;
  const screened = fitScreened(table, {
    ...{ exponent, priors, shouldStop },
    start: options.warmStart && centresFrom(options.warmStart, table, exponent),
    isScreening: options.isScreening ?? true,
  });
  if (!screened.ok) return screened;
  const fitted = fitComponents(screened.table, {
    ...{ priors, exponent: options.exponent, shouldStop },
    start: { psi: screened.psi, centres: screened.centres },
  });
  if (!fitted.ok) return fitted;
  const refits: InteractionRefits | Extract<Maximum, { ok: false }> = options.isWithoutInteractions
    ? { interactions: [], effects: [] }
    : refitInteractions(screened.table, fitted.fits, { priors, shouldStop });
  if ('ok' in refits) return refits;
  return { screened, fits: fitted.fits, refits, priors, excluded };
}

function requireOptions(options: FitPoolOptions, priors: readonly Prior[]): void {
  const { exponent } = options;
  if (exponent !== undefined && !(exponent > 0 && exponent <= 1.5)) {
    throw new RangeError('fitPool requires a calendar exponent above 0 and at most 1.5');
  }
  const isSound =
    priors.length === defaultPriors.length &&
    priors.every(
      ({ name, mean, sd }, i) =>
        name === defaultPriors[i]!.name && Number.isFinite(mean) && sd > 0 && sd < 1e6,
    );
  if (!isSound) throw new RangeError('fitPool requires one finite prior per parameter, in their order');
}

function refuse(kind: FitRefusal['kind'], reason: string): FitRefusal {
  return { ok: false, kind, reason, converged: false };
}
