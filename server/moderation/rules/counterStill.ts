import { daysBetween, formatNumber, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { comparableBefore } from './history';

/** Fewer full cycles a day than a bank does that is used to the depth given. Common practice, no source. */
const leastPerDay = 0.005;
const shortestDays = 60;

/** A counter that hardly moved though the bank is said to be in use. */
export const counterStill: Rule = (context) => {
  const { bank, computed, fields } = context;
  if (computed.efcFromCounter === null) return null;
  const before = comparableBefore(context);
  const days = daysBetween(before?.testedOn ?? bank.firstUseMonth, fields.reading.testedOn);
  const daysInUse = days - (fields.conditions.idleDays ?? 0);
  if (daysInUse < shortestDays) return null;
  const gained = computed.efcFromCounter - (before?.computed.efc ?? 0);
  // A counter that ran backwards has a rule of its own.
  if (gained < 0) return null;
  const perDay = gained / daysInUse;
  const isFine = perDay >= leastPerDay;
  const figures = `${formatQuantity(gained, 'full cycles', { decimals: 1 })} in ${formatQuantity(daysInUse, 'days', { decimals: 0 })} in use`;
  return {
    rule: 'counterStill',
    title: isFine ? 'Counter moves' : 'Counter hardly moved',
    severity: isFine ? 'fits' : 'doubtful',
    ownerText: isFine
      ? `${figures}.`
      : `${figures}: next to nothing. Check the counter and its unit; if the bank stood still, give the days idle.`,
    moderatorText: isFine
      ? `${figures}.`
      : `${figures}, ${formatNumber(perDay, { significant: 2 })} a day: counter, unit or the days idle are wrong.`,
    evidence: { efcGained: gained, daysInUse, efcPerDay: perDay },
  };
};
