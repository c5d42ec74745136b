import { formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Highest cell at the end of a charge, V: from here a cell is as good as full; below the second it is not. Common practice, no source. */
const fullV = 3.45;
const notFullV = 3.38;

const endings = {
  voltageAndTail: "the maker's voltage and tail current",
  bms: 'the BMS',
  time: 'time',
};

/** A discharge from a bank that was not full counts too little. */
export const fullCharge: Rule = ({ fields: { reading } }) => {
  const highest = reading.highestCellAtFullV;
  const volts = formatQuantity(highest, 'V', { decimals: 2 });
  const ending = endings[reading.fullChargeEndedBy];
  const isFine = highest >= fullV && reading.fullChargeEndedBy === 'voltageAndTail';
  return {
    rule: 'fullCharge',
    title: isFine ? 'Charge complete' : 'Full charge in doubt',
    severity: isFine ? 'fits' : highest < notFullV ? 'doubtful' : 'look',
    ownerText: isFine
      ? `Charged to ${volts} at the highest cell, ended by ${ending}.`
      : `The charge was ended by ${ending} with the highest cell at ${volts}. A check starts from a full bank: charge to the maker's voltage until the current has fallen to the tail current, never beyond.`,
    moderatorText: `Charge ended by ${ending}, highest cell at ${volts}${isFine ? '' : '; the bank may not have been full'}.`,
    evidence: { highestCellAtFullV: highest, fullChargeEndedBy: reading.fullChargeEndedBy },
  };
};
