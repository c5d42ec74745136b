import { coverageFactor, defaultSettings } from '@/lib/measure';
import {
  daysBetween,
  formatDate,
  formatMonth,
  formatNumber,
  formatPercent,
  formatQuantity,
} from '@/lib/units';

import type { ComputedCase } from './computedCase';

const exact = (value: number, decimals: number) => formatNumber(value, { decimals });
const inBrackets = (value: number, decimals: number) =>
  value < 0 ? `(${exact(value, decimals)})` : exact(value, decimals);

/** Calculation 2: the capacity brought to 25 °C and 0.2 It, with the numbers filled in. */
export function normalisationLines({ reading, computed }: ComputedCase): string[] {
  const { referenceTemperatureC, referenceIt, peukertExponent, perKelvinBelow, perKelvinAbove } =
    defaultSettings;
  const { capacityRefAh, meanTemperatureC, meanIt } = computed;
  const formula = 'Q_ref = Q / [1 + k_T × (T − 25 °C)] × (I / 0.2 It)^(p − 1)';
  if (!computed.isCorrected)
    return [formula, `Q_ref = Q = ${formatQuantity(capacityRefAh, 'Ah', { decimals: 2 })}`];
  const perKelvin = meanTemperatureC > referenceTemperatureC ? perKelvinAbove : perKelvinBelow;
  const difference = inBrackets(meanTemperatureC - referenceTemperatureC, 2);
  return [
    formula,
    [
      `= ${exact(reading.capacityAh, 2)} / [1 + ${perKelvin} × ${difference}]`,
      `× (${exact(meanIt, 4)} / ${referenceIt})^${exact(peukertExponent - 1, 2)}`,
    ].join(' '),
    `= ${formatQuantity(capacityRefAh, 'Ah', { decimals: 2 })}`,
  ];
}

/** What the ± is, with the numbers filled in. */
export function uncertaintyLines({ computed }: ComputedCase): string[] {
  const { relSdNew, relSdMeter, capacityRefAh, expandedAh } = computed;
  const percent = (fraction: number) => formatPercent(fraction, 2);
  const meterAh = coverageFactor * relSdMeter * capacityRefAh;
  const capacity = formatQuantity(capacityRefAh, 'Ah', { decimals: 1 });
  return [
    'u = √(u₁² + u₂² + …), relative standard uncertainties',
    `New at each check: ± = k × u × Q_ref = ${coverageFactor} × ${percent(relSdNew)} × ${capacity} = ${formatQuantity(expandedAh, 'Ah', { decimals: 2 })}`,
    `This meter's own error: ${coverageFactor} × ${percent(relSdMeter)} × ${capacity} = ${formatQuantity(meterAh, 'Ah', { decimals: 2 })}`,
  ];
}

/** State of health, of the rated capacity and of the bank's own start where it is known. */
export function sohLines({ bank, computed }: ComputedCase): string[] {
  const { capacityRefAh, sohFraction } = computed;
  const share = (ofAh: number, fraction: number) =>
    `${exact(capacityRefAh, 1)} / ${exact(ofAh, 1)} = ${formatPercent(fraction, 1)}`;
  const lines = [`Of rated: Q_ref / Q_rated = ${share(bank.ratedAh, sohFraction)}`];
  if (bank.startCapacityAh !== null)
    lines.push(`Of its own start: ${share(bank.startCapacityAh, capacityRefAh / bank.startCapacityAh)}`);
  return lines;
}

/** Calculation 3: full cycles by the counter and by depth, with the numbers filled in. */
export function cycleLines(computedCase: ComputedCase): string[] {
  return [...counterLines(computedCase), ...depthLines(computedCase)];
}

function counterLines({ bank, conditions, computed }: ComputedCase): string[] {
  const { counterKind, counterValue } = conditions;
  if (counterKind === null || counterValue === null || computed.efcFromCounter === null) return [];
  const efc = exact(computed.efcFromCounter, 1);
  if (counterKind === 'efc') return [`By the counter: ${efc}, as it shows full cycles`];
  const rated = formatQuantity(bank.ratedAh, 'Ah');
  if (counterKind === 'ah')
    return [`By the counter: ${formatQuantity(counterValue, 'Ah')} / ${rated} = ${efc}`];
  const volts = formatQuantity(bank.cellType.nominalV * bank.series, 'V', { decimals: 1 });
  return [`By the counter: ${formatQuantity(counterValue, 'kWh')} × 1000 / (${rated} × ${volts}) = ${efc}`];
}

function depthLines({ bank, reading, conditions, previous, computed }: ComputedCase): string[] {
  const { depthFraction, cyclesPerDay, idleDays } = conditions;
  if (cyclesPerDay === null || computed.efcFromDepth === null) return [];
  const since = previous?.reading.testedOn ?? bank.firstUseMonth;
  const days = Math.max(0, daysBetween(since, reading.testedOn));
  const inUse = idleDays === null ? exact(days, 0) : `(${exact(days, 0)} − ${exact(idleDays, 0)})`;
  const before = previous ? `${exact(previous.computed.efc, 1)} + ` : '';
  const sinceText = previous ? formatDate(since) : formatMonth(since);
  return [
    `By depth: ${before}${exact(depthFraction, 2)} × ${formatNumber(cyclesPerDay)} a day × ${inUse} days since ${sinceText} = ${exact(computed.efcFromDepth, 1)}`,
  ];
}

/** Every number of the calculation that is judgement, said as what it is. */
export const judgementSentence = (() => {
  const { perKelvinBelow, perKelvinAbove, peukertExponent, peukertSd, validTemperatureC, validIt } =
    defaultSettings;
  return [
    `k_T = ${perKelvinBelow} per K below 25 °C and ${perKelvinAbove} above, its standard uncertainty half of it;`,
    `p = ${peukertExponent} ± ${peukertSd}: judgement from common practice, no source.`,
    `Used from ${validTemperatureC.min} to ${validTemperatureC.max} °C and ${validIt.min} to ${validIt.max} It; outside, no correction is made and the check is flagged.`,
    'The reference, 25 °C and 0.2 It, is that of IEC 62619 and 62620.',
  ].join(' ');
})();
