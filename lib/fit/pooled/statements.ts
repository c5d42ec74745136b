import type { PoolCheck } from '../poolCheck';
import type { Exclusion } from './validate';

const conditionWords: [keyof PoolCheck, string][] = [
  ['depthFraction', 'depth'],
  ['dischargeIt', 'rate'],
  ['temperatureC', 'temperature'],
  ['socMeanFraction', 'state of charge'],
];

/** What a pool can't tell, and what a reader should bear in mind, in plain words. */
export function describeLimits(checks: readonly PoolCheck[], excluded: readonly Exclusion[]): string[] {
  const banks = new Map<string, number>();
  for (const check of checks) banks.set(check.bank, (banks.get(check.bank) ?? 0) + 1);
  const cellTypes = new Set(checks.map((check) => check.cellType)).size;
  const statements: string[] = [];
  if (banks.size < 60) {
    statements.push(
      `${count(banks.size, 'bank')} only: most figures rest on published studies, not on this pool.`,
    );
  }
  if (banks.size === 1) statements.push('One bank: how far banks differ is not measured.');
  if (cellTypes === 1) statements.push('One cell type: how far cell types differ is not measured.');
  const clamped = checks.filter((check) => check.isClamped).length;
  if (clamped === 0) statements.push('No bank is clamped: the effect of clamping is not measured.');
  if (clamped === checks.length)
    statements.push('Every bank is clamped: the effect of clamping is not measured.');
  for (const [key, words] of conditionWords) {
    if (isConstant(checks, key))
      statements.push(`All banks have the same ${words}: its effect is not measured.`);
  }
  const single = [...banks.values()].filter((n) => n === 1).length;
  if (single > 0) {
    statements.push(
      `${count(single, 'bank')} with one check: there only errors above about 10 % can be seen by the screen.`,
    );
  }
  statements.push(...describeOrder(checks));
  for (const reason of new Set(excluded.map((exclusion) => exclusion.reason))) {
    const n = excluded.filter((exclusion) => exclusion.reason === reason).length;
    statements.push(`${count(n, 'check')} left out: ${reason}.`);
  }
  statements.push(
    'No sudden drop late in life is modelled: every long life is optimistic if there is one.',
    'Banks that stopped reporting may have done worse.',
  );
  return statements;
}

/** Counters that run backwards and checks of the same age within a bank. */
function describeOrder(checks: readonly PoolCheck[]): string[] {
  const byBank = new Map<string, PoolCheck[]>();
  for (const check of checks) {
    const known = byBank.get(check.bank);
    if (known) known.push(check);
    else byBank.set(check.bank, [check]);
  }
  const falling: string[] = [];
  const sameDay: string[] = [];
  for (const [bank, own] of byBank) {
    const sorted = own.slice().sort((a, b) => a.ageYears - b.ageYears || a.efc - b.efc);
    if (sorted.some((check, i) => i > 0 && check.efc < sorted[i - 1]!.efc)) falling.push(bank);
    if (sorted.some((check, i) => i > 0 && check.ageYears === sorted[i - 1]!.ageYears)) sameDay.push(bank);
  }
  const statements: string[] = [];
  if (falling.length > 0) {
    statements.push(
      `Full cycles fall from one check to the next in ${named(falling)}: one of the counts is wrong, which one can't be told.`,
    );
  }
  if (sameDay.length > 0) {
    statements.push(`Two checks of the same age in ${named(sameDay)}: both are used, as repeats.`);
  }
  return statements;
}

function named(banks: string[]): string {
  const shown = banks.slice(0, 5).join(', ');
  return `${count(banks.length, 'bank')} (${shown}${banks.length > 5 ? ', ...' : ''})`;
}

function count(n: number, noun: string): string {
  return `${n} ${noun}${n === 1 ? '' : 's'}`;
}

function isConstant(checks: readonly PoolCheck[], key: keyof PoolCheck): boolean {
  return checks.every((check) => check[key] === checks[0]![key]);
}
