import { formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/**
 * Lowest cell at the end of a full discharge under load, V: at or below the first a cell is as good as empty, above
 * the second a part of its charge is still in. Common practice, no source.
 */
const emptyV = 2.9;
const partlyFullV = 3.05;

/** A discharge that stopped early counts too little. */
export const cutoffReached: Rule = ({ fields: { reading } }) => {
  const lowest = reading.lowestCellAtEndV;
  const volts = formatQuantity(lowest, 'V', { decimals: 2 });
  const isFine = lowest <= emptyV;
  const cell = reading.endedByCell ? `cell ${reading.endedByCell}` : 'the lowest cell';
  return {
    rule: 'cutoffReached',
    title: isFine ? 'Discharge complete' : 'Cut-off not reached',
    severity: isFine ? 'fits' : lowest <= partlyFullV ? 'look' : 'doubtful',
    ownerText: isFine
      ? `Ended with ${cell} at ${volts}.`
      : `The lowest cell was still at ${volts}, so some charge was left in. Stop at the maker's lower voltage next time; a test that ended early can be counted only with a wider uncertainty.`,
    moderatorText: isFine
      ? `Ended with ${cell} at ${volts}.`
      : `Lowest cell still at ${volts} at the end; ${formatQuantity(emptyV, 'V', { decimals: 2 })} or less is usual. The capacity is likely higher than counted.`,
    evidence: { lowestCellAtEndV: lowest, usualV: emptyV },
  };
};
