import { formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Spread between cells, V, worth a look and past belief, when full and when empty: common practice, no source. */
const full = { look: 0.1, doubtful: 0.4 };
const empty = { look: 0.3, doubtful: 0.8 };

/** A wide spread means that balance, not capacity, may have ended the test. */
export const cellSpread: Rule = ({ fields: { reading } }) => {
  const atFull =
    reading.lowestCellAtFullV === null ? null : reading.highestCellAtFullV - reading.lowestCellAtFullV;
  const atEnd =
    reading.highestCellAtEndV === null ? null : reading.highestCellAtEndV - reading.lowestCellAtEndV;
  if (atFull === null && atEnd === null) return null;
  const exceeds = (name: 'look' | 'doubtful') =>
    (atFull !== null && atFull > full[name]) || (atEnd !== null && atEnd > empty[name]);
  const severity = exceeds('doubtful') ? 'doubtful' : exceeds('look') ? 'look' : 'fits';
  const parts = [
    ...(atFull === null ? [] : [`${millivolts(atFull)} between cells at full`]),
    ...(atEnd === null ? [] : [`${millivolts(atEnd)} at the end`]),
  ].join(', ');
  return {
    rule: 'cellSpread',
    title: severity === 'fits' ? 'Cell spread' : 'Wide cell spread',
    severity,
    ownerText:
      severity === 'fits'
        ? `${parts}.`
        : `${parts}. The bank ends with its weakest cell, so balance may hide capacity. Check the balance, and add the event if you rebalance.`,
    moderatorText:
      severity === 'fits' ? `${parts}.` : `${parts}. Imbalance, not fade, may have ended the test.`,
    evidence: {
      ...(atFull === null ? {} : { atFullV: Number(atFull.toFixed(3)) }),
      ...(atEnd === null ? {} : { atEndV: Number(atEnd.toFixed(3)) }),
    },
  };
};

const millivolts = (volts: number) => formatQuantity(volts * 1000, 'mV', { decimals: 0 });
