import { daysBetween, formatNumber, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { comparableBefore } from './history';

/** More full cycles a day than a home bank can do: the hard range of the outlier screen. */
const mostPerDay = 2;
/** A month is known to half a month only, so shorter spans say nothing. */
const shortestDays = 30;

/** Full cycles cannot outrun the calendar. */
export const counterCalendar: Rule = (context) => {
  const { bank, computed, fields } = context;
  const before = comparableBefore(context);
  const from = before?.testedOn ?? bank.firstUseMonth;
  const days = daysBetween(from, fields.reading.testedOn);
  if (days < shortestDays) return null;
  const gained = computed.efc - (before?.computed.efc ?? 0);
  const perDay = gained / days;
  const isFine = perDay <= mostPerDay;
  const since = before ? 'since the last check' : 'since first use';
  const figures = `${formatQuantity(gained, 'full cycles', { decimals: 0 })} in ${formatQuantity(days, 'days', { decimals: 0 })} ${since}: ${formatNumber(perDay, { decimals: 2 })} a day`;
  return {
    rule: 'counterCalendar',
    title: isFine ? 'Cycles against calendar' : 'More cycles than days allow',
    severity: isFine ? 'fits' : 'doubtful',
    ownerText: isFine
      ? `${figures}.`
      : `${figures}, more than ${mostPerDay} a day. Check the counter's unit and the month of first use.`,
    moderatorText: isFine ? `${figures}.` : `${figures}; more than ${mostPerDay} is not to be had at home.`,
    evidence: { efcGained: gained, days, efcPerDay: perDay },
  };
};
