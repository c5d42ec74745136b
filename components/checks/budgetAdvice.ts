import type { Computed } from '@/lib/contract/checks';
import { combineInQuadrature, coverageFactor } from '@/lib/measure';
import { formatQuantity } from '@/lib/units';

/** What would make a part of the budget smaller at the next check. */
const remedies: Record<string, string> = {
  reading: 'a meter with less scatter, or a mean of several readings',
  temperature: 'cells nearer to 25 °C, or a thermometer on a cell itself',
  rate: 'a load nearer to 0.2 It',
  notCorrected: 'a test at 15 to 35 °C and 0.05 to 0.5 It, which can be corrected',
  cutOff: 'stopping nearer to the cut-off, and reading the lowest cell there',
  fullCharge: "ending the charge by the maker's voltage and tail current",
  imbalance: 'both cell voltages read at full and at the end, or a rebalance before the test',
  logGaps: 'a log without gaps',
  countedCharge: 'counting while discharging',
  gain: 'a meter with a smaller error of its own, the same one at each check',
};

const decimalsOf = (plusMinus: number) => (plusMinus >= 10 ? 0 : plusMinus >= 1 ? 1 : 2);

/**
 * What would reduce the uncertainty of a check most, in a sentence: the largest part of what is new at each check, with
 * what its ± would be without that part. Undefined where nothing stands out.
 */
export function budgetAdvice({
  budget,
  capacityRefAh,
  expandedAh,
}: Pick<Computed, 'budget' | 'capacityRefAh' | 'expandedAh'>): string | undefined {
  const [largest, ...others] = budget.newEachCheck;
  const remedy = largest && remedies[largest.name];
  if (!largest || remedy === undefined) return undefined;
  const withoutAh = coverageFactor * combineInQuadrature(others.map(({ relSd }) => relSd)) * capacityRefAh;
  const ah = (value: number) => formatQuantity(value, 'Ah', { decimals: decimalsOf(value) });
  return `What would reduce it most: ${remedy}. Without that part it would be ±${ah(withoutAh)} in place of ±${ah(expandedAh)}.`;
}

export interface BudgetHalf {
  label: string;
  fraction: number;
}

/** The two parts of the whole: shares of the variance of one capacity, taken by itself. */
export function budgetHalves({
  relSdMeter,
  relSdNew,
}: Pick<Computed, 'relSdMeter' | 'relSdNew'>): BudgetHalf[] {
  const total = relSdMeter ** 2 + relSdNew ** 2;
  if (!(total > 0)) return [];
  return [
    { label: 'new at each check', fraction: relSdNew ** 2 / total },
    { label: "the meter's own error, the same at each check", fraction: relSdMeter ** 2 / total },
  ];
}
