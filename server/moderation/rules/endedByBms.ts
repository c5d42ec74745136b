import { formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** The BMS trip is the last protection, not the end of a test. */
export const endedByBms: Rule = ({ fields: { reading } }) => {
  if (reading.dischargeEndedBy !== 'bmsTrip') return null;
  const volts = formatQuantity(reading.lowestCellAtEndV, 'V', { decimals: 2 });
  return {
    rule: 'endedByBms',
    title: 'Ended by the BMS',
    severity: 'look',
    ownerText:
      "The BMS ended the discharge. It is the last protection: next time stop the load yourself at the maker's lower voltage, before the BMS must.",
    moderatorText: `The BMS tripped with the lowest cell at ${volts}. See whether one weak cell or a setting ended it.`,
    evidence: { lowestCellAtEndV: reading.lowestCellAtEndV },
  };
};
