import type { BinPoint } from '@/components/charts';
import type { FitBin, PublishedFitReport, ResidualCondition } from '@/lib/contract/fits';
import { formatCount, formatInstant, formatNumber } from '@/lib/units';

/** "The public fit of 1 December 2026: 3,720 checks on 1,085 banks of 838 owners." */
export function fitSentence({ fittedAt, evidence, codeVersion }: PublishedFitReport): string {
  const { checks, banks, owners } = evidence;
  return `The public fit of ${formatInstant(fittedAt)}, by version ${codeVersion}: ${formatCount(checks)} checks on ${formatCount(banks)} banks of ${formatCount(owners)} owners.`;
}

interface ConditionWords {
  label: string;
  xName: string;
  unitX: string;
  format: (value: number) => string;
}

const plain = (value: number) => formatNumber(value);
const percent = (value: number) => formatNumber(value * 100);

export const residualWords: Record<ResidualCondition, ConditionWords> = {
  ageYears: { label: 'Years since new', xName: 'age', unitX: 'years', format: plain },
  efc: { label: 'Full cycles since new', xName: 'equivalent full cycles', unitX: 'EFC', format: plain },
  temperatureC: { label: 'Cell temperature', xName: 'cell temperature', unitX: '°C', format: plain },
  depthFraction: { label: 'Depth', xName: 'depth', unitX: '%', format: percent },
  dischargeIt: { label: 'Discharge rate', xName: 'discharge rate', unitX: 'It', format: plain },
  socMeanFraction: { label: 'Mean charge level', xName: 'mean charge level', unitX: '%', format: percent },
};

export const pointOf = ({ evidence, ...bin }: FitBin): BinPoint => ({
  ...bin,
  owners: evidence.owners,
  checks: evidence.checks,
});

/** The farthest median from 0, in words: what a good fit keeps small. */
export function residualFinding(bins: readonly FitBin[], { format, unitX }: ConditionWords): string {
  const farthest = bins.reduce<FitBin | undefined>(
    (most, bin) => (most === undefined || Math.abs(bin.median) > Math.abs(most.median) ? bin : most),
    undefined,
  );
  if (!farthest) return 'No bin has at least 5 owners yet.';
  const { from, to, median } = farthest;
  const place =
    from === null
      ? `below ${format(to ?? 0)} ${unitX}`
      : to === null
        ? `from ${format(from)} ${unitX}`
        : `${format(from)} to ${format(to)} ${unitX}`;
  const size = formatNumber(Math.abs(median) * 100, { decimals: 1 });
  if (size === '0.0') return 'Every median lies within 0.05 % of the prediction.';
  return `The median is farthest off at ${place}: ${size} % ${median > 0 ? 'above' : 'below'} the prediction.`;
}
