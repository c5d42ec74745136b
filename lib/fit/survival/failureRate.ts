import jStat from 'jstat';

import type { PoolCheck } from '../poolCheck';

/** Failures and the years they were counted over. */
export interface FailureCount {
  /** Banks known to have failed; each counts once, at its first failure. */
  failures: number;
  /** Years from first use to the first failure, or to the last check, over all banks. */
  bankYears: number;
  banks: number;
}

/** Failures per 100 bank-years, with its exact range. */
export interface FailureRate {
  estimate: number;
  lower: number;
  upper: number;
}

const perBankYears = 100;

/**
 * Counts failed banks and the bank-years watched. A bank is watched from first use to the first check by which it is
 * known to have failed (`hasFailed`, or a check kept as a real failure), else to its last check. A bank that failed
 * and never joined, or stopped reporting, is in neither figure, so the rate is a lower one.
 */
export function countFailures(checks: readonly PoolCheck[]): FailureCount {
  const lastOf = new Map<string, number>();
  const failedOf = new Map<string, number>();
  for (const { bank, ageYears, isKept, hasFailed } of checks) {
    lastOf.set(bank, Math.max(lastOf.get(bank) ?? 0, ageYears));
    if (isKept || hasFailed) failedOf.set(bank, Math.min(failedOf.get(bank) ?? Infinity, ageYears));
  }
  let bankYears = 0;
  for (const [bank, last] of lastOf) bankYears += failedOf.get(bank) ?? last;
  return { failures: failedOf.size, bankYears, banks: lastOf.size };
}

/**
 * Rate of failures per 100 bank-years with the exact interval of a Poisson count: k failures in T bank-years have the
 * limits chi²(a/2; 2k)/2T and chi²(1 - a/2; 2k + 2)/2T, a = 1 - confidence; the lower one is 0 for k = 0.
 * Source: F. Garwood 1936, Biometrika 28, 437-442.
 *
 * Throws RangeError for a count that is not whole and at least 0, bank-years that are not positive, or a confidence
 * outside (0, 1).
 */
export function failureRate(failures: number, bankYears: number, confidence = 0.9): FailureRate {
  if (!Number.isInteger(failures) || failures < 0) throw new RangeError('failureRate requires a whole count');
  if (!(bankYears > 0 && Number.isFinite(bankYears)))
    throw new RangeError('failureRate requires positive bank-years');
  if (!(confidence > 0 && confidence < 1))
    throw new RangeError('failureRate requires a confidence in (0, 1)');
  const tail = (1 - confidence) / 2;
  const rate = (count: number) => (count / bankYears) * perBankYears;
  return {
    estimate: rate(failures),
    lower: failures === 0 ? 0 : rate(jStat.chisquare.inv(tail, 2 * failures) / 2),
    upper: rate(jStat.chisquare.inv(1 - tail, 2 * failures + 2) / 2),
  };
}
