import { usualMeanCellV } from '@/lib/measure';
import { formatNumber, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Energy given in kWh, or in Wh where kWh were read as Wh: a factor of a thousand brings the cell voltage right. */
export const energyUnit: Rule = ({ computed, fields: { reading } }) => {
  const { min, max } = usualMeanCellV[reading.method];
  const isPossible = (volts: number) => volts >= min && volts <= max;
  if (isPossible(computed.meanCellV)) return null;
  const factor = [1000, 1 / 1000].find((one) => isPossible(computed.meanCellV * one));
  if (factor === undefined) return null;
  const repairedWh = reading.energyWh * factor;
  const volts = formatNumber(computed.meanCellV * factor, { decimals: 3 });
  const meant = formatQuantity(repairedWh / 1000, 'kWh', { decimals: 2 });
  return {
    rule: 'energyUnit',
    title: factor > 1 ? 'kWh typed as Wh' : 'Energy a thousand times too large',
    severity: 'repairable',
    ownerText: `The energy would go with the charge if it were ${meant}. Check its unit.`,
    moderatorText: `Read as ${meant} the cells come to ${volts} V, which fits.`,
    evidence: { typedWh: reading.energyWh, repairedWh: Number(repairedWh.toFixed(1)) },
  };
};
