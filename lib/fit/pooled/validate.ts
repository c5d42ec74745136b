import type { PoolCheck } from '../poolCheck';

/** Something wrong with a row of the pool; `row` counts from 0. */
export interface PoolProblem {
  row: number;
  column: keyof PoolCheck;
  message: string;
}

/** A row that is sound but cannot be in the fit; `row` counts from 0. */
export interface Exclusion {
  row: number;
  bank: string;
  reason: string;
  /** Out of range: quarantined by the screen. Otherwise the bank is only left out. */
  isOutOfRange: boolean;
}

export const maxChecksPerBank = 200;
const maxProblems = 50;

type NumberColumn = {
  [K in keyof PoolCheck]-?: PoolCheck[K] extends number ? K : never;
}[keyof PoolCheck];

/** Physical limits of each number; `isOpen` means the lower bound itself is refused. */
const limits: Record<NumberColumn, { from: number; to: number; isOpen?: boolean; unit: string }> = {
  depthFraction: { from: 0, to: 1, isOpen: true, unit: '' },
  dischargeIt: { from: 0, to: 10, isOpen: true, unit: ' It' },
  temperatureC: { from: -40, to: 80, unit: ' °C' },
  socMeanFraction: { from: 0, to: 1, unit: '' },
  ageYears: { from: 0, to: 60, isOpen: true, unit: ' years' },
  efc: { from: 0, to: 100_000, unit: '' },
  ratedAh: { from: 0, to: 1e6, isOpen: true, unit: ' Ah' },
  capacityAh: { from: 0, to: 1e6, isOpen: true, unit: ' Ah' },
  relSd: { from: 0.0005, to: 0.5, unit: '' },
};
const numberColumns = Object.keys(limits) as NumberColumn[];

/**
 * What makes a pool unfit to be read: numbers missing, not finite or outside their physical limits, keys missing, a
 * bank under two cell types or two owners, more than 200 checks of one bank. At most 50 are named.
 */
export function findProblems(checks: readonly PoolCheck[]): PoolProblem[] {
  const problems: PoolProblem[] = [];
  const banks = new Map<string, { cellType: string; owner: string; count: number }>();
  for (let row = 0; row < checks.length && problems.length < maxProblems; row++) {
    const check = checks[row]!;
    for (const column of numberColumns) {
      const message = numberProblem(check[column], column);
      if (message) problems.push({ row, column, message });
    }
    for (const column of ['bank', 'owner', 'cellType'] as const) {
      if (typeof check[column] !== 'string' || check[column] === '') {
        problems.push({ row, column, message: 'is missing' });
      }
    }
    if (typeof check.isClamped !== 'boolean') {
      problems.push({ row, column: 'isClamped', message: 'must be yes or no' });
    }
    const bankProblem = noteBank(banks, check, row);
    if (bankProblem) problems.push(bankProblem);
  }
  return problems.slice(0, maxProblems);
}

function numberProblem(value: unknown, column: NumberColumn): string | null {
  if (typeof value !== 'number' || Number.isNaN(value)) return 'is missing or not a number';
  if (!Number.isFinite(value)) return 'is not finite';
  const { from, to, isOpen, unit } = limits[column];
  if (value < from || value > to || (isOpen && value === from)) {
    return `is ${value}${unit}; it must be ${isOpen ? 'above' : 'from'} ${from} ${isOpen ? 'and at most' : 'to'} ${to}${unit}`;
  }
  return null;
}

function noteBank(
  banks: Map<string, { cellType: string; owner: string; count: number }>,
  check: PoolCheck,
  row: number,
): PoolProblem | null {
  const known = banks.get(check.bank);
  if (!known) {
    banks.set(check.bank, { cellType: check.cellType, owner: check.owner, count: 1 });
    return null;
  }
  known.count++;
  if (known.cellType !== check.cellType) {
    return { row, column: 'cellType', message: `differs from an earlier row of bank ${check.bank}` };
  }
  if (known.owner !== check.owner) {
    return { row, column: 'owner', message: `differs from an earlier row of bank ${check.bank}` };
  }
  if (known.count === maxChecksPerBank + 1) {
    return { row, column: 'bank', message: `has more than ${maxChecksPerBank} checks` };
  }
  return null;
}

/**
 * Hard range checks before any fit: capacity within 0.4 to 1.25 of the rating, at most two full cycles a day; and
 * banks whose clamping changed more than once, whose clamped share says nothing.
 */
export function findExclusions(checks: readonly PoolCheck[]): Exclusion[] {
  const exclusions: Exclusion[] = [];
  checks.forEach((check, row) => {
    const share = check.capacityAh / check.ratedAh;
    const exclude = (reason: string, isOutOfRange = true) =>
      exclusions.push({ row, bank: check.bank, reason, isOutOfRange });
    if (check.isClampingUnclear) exclude('clamping changed more than once', false);
    else if (!(share > 0.4))
      exclude('capacity at or below 40 % of the rating: outside what the model describes');
    else if (!(share < 1.25)) exclude('capacity at or above 125 % of the rating');
    else if (check.efc > 2 * 365 * check.ageYears) exclude('more than two full cycles a day since new');
  });
  return exclusions;
}
