import { formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Where the correction to 25 °C holds: calculation 2 of the product description. */
const validC = { min: 15, max: 35 };

/** Outside its range the temperature is not corrected for. */
export const testTemperature: Rule = ({ fields: { reading } }) => {
  const meanC = (reading.temperatureStartC + reading.temperatureEndC) / 2;
  const mean = formatQuantity(meanC, '°C', { decimals: 0 });
  const isFine = meanC >= validC.min && meanC <= validC.max;
  const range = `${validC.min} to ${formatQuantity(validC.max, '°C')}`;
  return {
    rule: 'testTemperature',
    title: isFine ? 'Test temperature' : `Tested at ${mean}`,
    severity: isFine ? 'fits' : 'look',
    ownerText: isFine
      ? `Cells at ${mean} in the mean.`
      : `Cells at ${mean}. The correction to 25 °C holds from ${range}, so this capacity stays as measured; a check in a milder week says more.`,
    moderatorText: isFine
      ? `Cells at ${mean} in the mean; corrected to 25 °C.`
      : `Cells at ${mean}, outside ${range}: not corrected to 25 °C.`,
    evidence: { meanTemperatureC: meanC },
  };
};
