import { convert, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Above this a cell is out of any maker's limits, °C; and where cells live, when the figure is read as °F. Common practice, no source. */
const impossibleC = 48;
const usual = { min: 0, max: 40 };

/** Degrees Fahrenheit given as Celsius, of the test or of the year. */
export const temperatureUnit: Rule = ({ fields: { reading, conditions } }) => {
  const given = [reading.temperatureStartC, reading.temperatureEndC, conditions.temperatureMeanC];
  const hot = given.filter((value) => value > impossibleC);
  const worst = hot[0];
  if (worst === undefined) return null;
  const meant = hot.map((value) => convert(value, '°F', '°C'));
  const isMeant = meant.every((value) => value >= usual.min && value <= usual.max);
  const typed = formatQuantity(worst, '°C', { decimals: 0 });
  const repaired = formatQuantity(meant[0]!, '°C', { decimals: 0 });
  return {
    rule: 'temperatureUnit',
    title: isMeant ? '°F typed as °C' : 'Too hot to be true',
    severity: isMeant ? 'repairable' : 'doubtful',
    ownerText: isMeant
      ? `${typed} is beyond what cells stand; as °F it would be ${repaired}. Check the unit.`
      : `${typed} is beyond what cells stand. Check the figure; a cell that hot means stop.`,
    moderatorText: isMeant
      ? `${typed} is beyond any maker's limit; as °F it is ${repaired}.`
      : `${typed} is beyond any maker's limit.`,
    evidence: { typedC: worst, ...(isMeant ? { repairedC: Number(meant[0]!.toFixed(1)) } : {}) },
  };
};
