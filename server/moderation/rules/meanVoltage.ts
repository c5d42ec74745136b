import { usualMeanCellV } from '@/lib/measure';
import { formatNumber, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Energy over charge and cells in series is a voltage the chemistry can show. */
export const meanVoltage: Rule = ({ computed, fields }) => {
  const { min, max } = usualMeanCellV[fields.reading.method];
  const volts = formatQuantity(computed.meanCellV, 'V', { decimals: 3 });
  const rate = formatQuantity(computed.meanIt, 'It', { decimals: 2 });
  const isFine = computed.meanCellV >= min && computed.meanCellV <= max;
  const range = `${formatNumber(min, { decimals: 2 })} to ${formatQuantity(max, 'V', { decimals: 2 })}`;
  return {
    rule: 'meanVoltage',
    title: 'Mean voltage',
    severity: isFine ? 'fits' : 'doubtful',
    ownerText: isFine
      ? `${volts} per cell goes with LFP.`
      : `Wh over Ah gives ${volts} per cell; LFP lies at ${range}. One of the two figures, or the cells in series, may be of something else.`,
    moderatorText: isFine
      ? `${volts} per cell fits LFP at ${rate}.`
      : `${volts} per cell at ${rate}; LFP lies at ${range}. Ah and Wh are not of the same cells.`,
    evidence: { meanCellV: computed.meanCellV, lowestV: min, highestV: max },
  };
};
