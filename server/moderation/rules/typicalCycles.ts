import { daysBetween, formatNumber, formatPercent, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { comparableBefore } from './history';

/** Cycles of the depth given that are rare day after day, and that no home bank does: the sun comes once. Common practice, no source. */
const mostPerDay = 2;
const neverPerDay = 3;
/** A month is known to half a month only, so shorter spans say nothing. */
const shortestDays = 30;

/**
 * The counter by the calendar, in cycles as deep as the owner says they are: a first use typed a year too late makes them
 * more than a day has room for. Where the cycles a day are given, counterDepth compares them.
 */
export const typicalCycles: Rule = (context) => {
  const { bank, computed, fields } = context;
  const { depthFraction } = fields.conditions;
  if (computed.efcFromCounter === null || computed.efcFromDepth !== null) return null;
  const before = comparableBefore(context);
  const from = before?.testedOn ?? bank.firstUseMonth;
  const days = daysBetween(from, fields.reading.testedOn);
  const gained = computed.efcFromCounter - (before?.computed.efc ?? 0);
  if (days < shortestDays || gained < 0) return null;
  const perDay = gained / days / depthFraction;
  const isFine = perDay <= mostPerDay;
  const figures = `${formatQuantity(gained, 'full cycles', { decimals: 0 })} in ${formatQuantity(days, 'days', { decimals: 0 })} at ${formatPercent(depthFraction)} depth are ${formatNumber(perDay, { decimals: 1 })} cycles a day`;
  return {
    rule: 'typicalCycles',
    title: isFine ? 'Cycles of its depth a day' : 'More cycles of its depth than days',
    severity: isFine ? 'fits' : perDay <= neverPerDay ? 'look' : 'doubtful',
    ownerText: isFine
      ? `${figures}.`
      : `${figures}. Check the month of first use, the depth and the counter's unit.`,
    moderatorText: isFine
      ? `${figures}.`
      : `${figures}: more than ${mostPerDay} are rare. First use, depth or counter may be wrong.`,
    evidence: { efcGained: gained, days, depthFraction, cyclesPerDay: perDay },
  };
};
