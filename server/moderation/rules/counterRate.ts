import { daysBetween, formatNumber, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { comparableBefore } from './history';

/** Hours of a day that discharging and charging may take up before the figures are past belief. */
const hoursPerDay = 24;
/** Rates are mostly known to a fifth, so that much more is only worth a look. Common practice, no source. */
const allowance = 1.25;
const shortestDays = 30;

/**
 * The cycles against what the inverter can move: at the peak rate discharging a day's cycles takes efc / peak hours, and
 * charging them again efc / charge rate, together a day at most. Without a peak, the mean rate stands in its place.
 */
export const counterRate: Rule = (context) => {
  const { bank, computed, fields } = context;
  const { peakIt, dischargeIt, chargeIt } = fields.conditions;
  const before = comparableBefore(context);
  const days = daysBetween(before?.testedOn ?? bank.firstUseMonth, fields.reading.testedOn);
  const perDay = (computed.efc - (before?.computed.efc ?? 0)) / days;
  if (days < shortestDays || !(perDay > 0)) return null;
  const fastest = Math.max(peakIt ?? 0, dischargeIt);
  const hours = perDay / fastest + (chargeIt === null ? 0 : perDay / chargeIt);
  const isFine = hours <= hoursPerDay;
  const figures = `${formatNumber(perDay, { decimals: 2 })} full cycles a day at up to ${formatQuantity(fastest, 'It', { significant: 2 })} take ${formatQuantity(hours, 'h', { decimals: 1 })} a day`;
  return {
    rule: 'counterRate',
    title: isFine ? 'Cycles against rate' : 'Cycles faster than the rate allows',
    severity: isFine ? 'fits' : hours <= allowance * hoursPerDay ? 'look' : 'doubtful',
    ownerText: isFine ? `${figures}.` : `${figures}. Check the counter's unit and the rates in use.`,
    moderatorText: isFine ? `${figures}.` : `${figures}, more than the day has: counter or rate is wrong.`,
    evidence: { efcPerDay: perDay, fastestIt: fastest, hoursADay: Number(hours.toFixed(2)) },
  };
};
