import { defaultSettings, usualMeanCellV } from '@/lib/measure';
import { formatDuration, formatNumber, formatQuantity, parseDuration, parseNumber } from '@/lib/units';

/** What can be said of a figure from the other figures of the same test alone; `isDoubt` where they disagree. */
export interface Remark {
  text: string;
  isDoubt: boolean;
}

const positive = (text: string): number | undefined => {
  const value = parseNumber(text);
  return value !== undefined && value > 0 ? value : undefined;
};

/** Energy over charge and cells in series, against what LFP can show. */
export function meanVoltageRemark(
  typed: { capacityAh: string; energyKwh: string; method: string },
  series: number,
): Remark | undefined {
  const [chargeAh, energyKwh] = [positive(typed.capacityAh), positive(typed.energyKwh)];
  if (chargeAh === undefined || energyKwh === undefined) return undefined;
  const volts = (energyKwh * 1000) / chargeAh / series;
  const usual = usualMeanCellV[typed.method === 'countedCharge' ? 'countedCharge' : 'countedDischarge'];
  const mean = `Mean ${formatQuantity(volts, 'V', { decimals: 3 })} per cell`;
  if (volts >= usual.min && volts <= usual.max) return { text: `${mean}: fits LFP.`, isDoubt: false };
  const range = `${formatNumber(usual.min, { decimals: 2 })} to ${formatQuantity(usual.max, 'V', { decimals: 2 })}`;
  const text = `${mean}; LFP lies at ${range}. Check both figures, and the unit of the energy.`;
  return { text, isDoubt: true };
}

/** How far charge / current may be from the duration before it is asked about: common practice, no source. */
const doubtedFraction = 0.15;

/** The duration that charge and current come to, against the one noted. */
export function currentRemark(
  typed: { capacityAh: string; meanCurrentA: string; duration: string },
  ratedAh: number,
): Remark | undefined {
  const [chargeAh, currentA] = [positive(typed.capacityAh), positive(typed.meanCurrentA)];
  const seconds = parseDuration(typed.duration);
  if (currentA === undefined) return undefined;
  if (chargeAh === undefined || !seconds) return { text: rateText(currentA, ratedAh), isDoubt: false };
  const wouldTakeS = (chargeAh / currentA) * 3600;
  if (Math.abs(Math.log(wouldTakeS / seconds)) <= Math.log(1 + doubtedFraction)) {
    return { text: `${rateText(currentA, ratedAh)} Goes with charge and duration.`, isDoubt: false };
  }
  const meantA = (chargeAh * 3600) / seconds;
  const would =
    wouldTakeS >= 36_000
      ? formatQuantity(wouldTakeS / 3600, 'h', { decimals: 0 })
      : formatDuration(wouldTakeS);
  const text = [
    `At ${formatQuantity(currentA, 'A')} this would have taken ${would}, but you noted ${formatDuration(seconds)}.`,
    `Did you mean ${formatQuantity(Number(meantA.toPrecision(2)), 'A')}?`,
  ].join(' ');
  return { text, isDoubt: true };
}

const rateText = (currentA: number, ratedAh: number) =>
  `${formatQuantity(currentA / ratedAh, 'It', { decimals: currentA / ratedAh < 0.1 ? 3 : 2 })} for this bank.`;

/** Cells outside the range of the correction to 25 °C. */
export function temperatureRemark(start: string, end: string): Remark | undefined {
  const [startC, endC] = [parseNumber(start), parseNumber(end)];
  if (startC === undefined || endC === undefined) return undefined;
  const { min, max } = defaultSettings.validTemperatureC;
  const mean = (startC + endC) / 2;
  if (mean >= min && mean <= max) return undefined;
  return {
    text: `Mean ${formatQuantity(mean, '°C', { decimals: 0 })}: outside ${min} to ${max} °C no correction to 25 °C is made, and the check is flagged.`,
    isDoubt: false,
  };
}

/** A discharge that left charge in, or went further than the test is to go. */
export function endVoltageRemark(lowest: string): Remark | undefined {
  const volts = positive(lowest);
  const { cutOffCellV } = defaultSettings;
  if (volts === undefined || volts <= cutOffCellV + 0.05) return undefined;
  return {
    text: `The test is to end at ${formatQuantity(cutOffCellV, 'V', { decimals: 1 })}. What was left in adds to the uncertainty.`,
    isDoubt: false,
  };
}
